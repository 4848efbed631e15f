import { Refusal } from '../../shared-core/base/refusal.ts';
import { checkReply } from '../../shared-core/bridge/calls.ts';
import { joinFrame, splitFrame } from '../../shared-core/bridge/frame.ts';
import { checkSize } from './checks.ts';
import type { Wire } from './wire.ts';

/** A line to the host on which nothing is said; resolves once it is open. */
export type OpenLine = (url: string, onEnd: () => void) => Promise<void>;

export interface LocalWireParts {
  /** The window's own address, with the token, ending in "/". */
  base: string;
  windowId: string;
  fetch: typeof fetch;
  openLine: OpenLine;
}

/** Reaches the local host by HTTP: a frame goes, a frame comes back. */
export async function connectLocalWire({ base, windowId, fetch, openLine }: LocalWireParts): Promise<Wire> {
  const gone = () =>
    new Refusal(
      'The program behind this window does not answer: start it again in the terminal; your work of a moment ago was kept.',
    );
  let isLost = false;
  const handlers: (() => void)[] = [];
  const lost = () => {
    isLost = true;
    for (const handler of handlers) handler();
  };
  await openLine(`${base.replace(/^http/, 'ws')}line/${windowId}`, lost).catch(() => {
    throw gone();
  });

  return {
    windowId,
    async call(call, argument, bytes = null) {
      checkSize(call, bytes);
      const head = new TextEncoder().encode(JSON.stringify({ windowId, call, argument }));
      const response = await fetch(`${base}call`, {
        method: 'POST',
        headers: { 'content-type': 'application/octet-stream' },
        body: joinFrame(head, bytes),
      }).catch(() => {
        throw gone();
      });
      if (!response.ok) throw gone();
      const reply = splitFrame(new Uint8Array(await response.arrayBuffer()));
      return checkReply(call, JSON.parse(new TextDecoder().decode(reply.head)), reply.rest);
    },
    // The local host has no menu and asks for nothing on its own.
    onEvent: () => undefined,
    onLost(handler) {
      handlers.push(handler);
      if (isLost) handler();
    },
  };
}

/** The line as a browser opens it. */
export const openWebSocketLine: OpenLine = (url, onEnd) =>
  new Promise((resolve, reject) => {
    const socket = new WebSocket(url);
    socket.addEventListener('open', () => {
      socket.addEventListener('close', onEnd);
      resolve();
    });
    socket.addEventListener('error', () => reject(new Error('the line did not open')));
  });
