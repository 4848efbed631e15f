import { join } from 'node:path';
import { Refusal } from '../../shared-core/base/refusal.ts';
import {
  CALLS,
  type CallName,
  checkArgument,
  isCallName,
  type Reply,
} from '../../shared-core/bridge/calls.ts';
import { type Calls, type Handler, withBytes } from './callHandlers.ts';
import { ExportFiles } from './exportFiles.ts';
import { FileHandles } from './fileHandles.ts';
import { FileHistory } from './history.ts';
import type { HostParts } from './hostParts.ts';
import { openCalls } from './openCalls.ts';
import { saveCalls } from './saveCalls.ts';
import { HEARTBEAT_MS, UnsavedWorks } from './unsavedWork.ts';

/** Everything that a window's host does with files, the same in both hosts. */
export interface Desk {
  readonly handles: FileHandles;
  /** Answers one call of a window. Never throws: what goes wrong is a refusal with one sentence. */
  answer(
    windowId: string,
    from: 'page' | 'preload',
    call: unknown,
    argument: unknown,
    bytes: Uint8Array | null,
  ): Promise<Reply>;
  windowOpened(windowId: string): void;
  windowClosed(windowId: string): Promise<void>;
  close(): void;
}

export function createDesk(host: HostParts): Desk {
  const lockFolder = join(host.userFolder, 'locks');
  const livingWindows = new Set<string>();
  const handles = new FileHandles(host.urlOf);
  const history = new FileHistory(host.userFolder, lockFolder, host.warn);
  const unsaved = new UnsavedWorks(host.userFolder, lockFolder, livingWindows);
  const exports = new ExportFiles();
  const calls: Calls = {
    ...openCalls({ host, handles, history }),
    ...saveCalls({ host, handles, history, exports, lockFolder }),
    recentStudies: () => history.recent(),
    forgetRecent: ({ id }) => history.forget(id).then(nothing),
    keepUnsaved: ({ workId, title }, { windowId, bytes }) =>
      unsaved.keep(workId, title, bytes, windowId).then(nothing),
    listUnsaved: () => unsaved.list(),
    lookAtUnsaved: async ({ workId }) => withBytes({}, await unsaved.read(workId)),
    takeUnsaved: async ({ workId }, { windowId }) => withBytes({}, await unsaved.take(workId, windowId)),
    dropUnsaved: ({ workId }, { windowId }) => unsaved.drop(workId, windowId).then(nothing),
    setWindowState: async (state, { windowId }) => nothing(host.windows.setState(windowId, state)),
    answerClose: async ({ close }, { windowId }) => nothing(host.windows.answerClose(windowId, close)),
  };
  const heart = setInterval(() => void unsaved.beat().catch(() => undefined), HEARTBEAT_MS);
  heart.unref();

  return {
    handles,
    answer: (windowId, from, call, argument, bytes) =>
      answerCall(calls, host.warn, { windowId, from, call, argument, bytes }),
    windowOpened: (windowId) => void livingWindows.add(windowId),
    async windowClosed(windowId) {
      livingWindows.delete(windowId);
      await exports.abandonAllOf(windowId);
    },
    close: () => clearInterval(heart),
  };
}

interface Asked {
  windowId: string;
  from: 'page' | 'preload';
  call: unknown;
  argument: unknown;
  bytes: Uint8Array | null;
}

async function answerCall(calls: Calls, warn: (sentence: string) => void, asked: Asked): Promise<Reply> {
  try {
    const { call, windowId, from } = asked;
    if (!isCallName(call) || CALLS[call].from !== from)
      throw new Refusal(
        `The window asked for something that no host does (${String(call).slice(0, 40)}): start the program again.`,
        'use',
      );
    const bytes = asked.bytes ?? new Uint8Array(0);
    const argument = checkArgument(call, asked.argument, bytes.length);
    const handler = calls[call] as Handler<CallName>;
    const result = await handler(argument, { windowId, bytes });
    return result instanceof Object && 'withBytes' in result
      ? { answer: result.answer, bytes: result.withBytes }
      : { answer: result, bytes: null };
  } catch (error) {
    if (error instanceof Refusal) return { refused: error.message, refusedKind: error.kind };
    warn(
      `${String(asked.call).slice(0, 40)} failed: ${error instanceof Error ? error.stack : String(error)}`,
    );
    const words = error instanceof Error ? error.message.split('\n')[0]!.slice(0, 200) : 'unknown';
    const refused = `Something failed inside the program (${words}): nothing was changed, try again.`;
    return { refused, refusedKind: 'input' };
  }
}

function nothing(_done: unknown): Record<string, never> {
  return {};
}
