import { checkReply } from '../../shared-core/bridge/calls.ts';
import { hostEventSchema, type OpenedFile } from '../../shared-core/bridge/messages.ts';
import { checkSize, randomId } from './checks.ts';
import type { PageFiles, Wire } from './wire.ts';

/** What the desktop's preload script puts on the page's global object; everything from it is checked here. */
export interface DesktopApi {
  call(message: unknown): Promise<unknown>;
  dropped(windowId: unknown, files: unknown): Promise<unknown>;
  onEvent(listener: (event: unknown) => void): void;
}

export function connectDesktopWire(api: DesktopApi, windowId = randomId()): Wire {
  return {
    windowId,
    async call(call, argument, bytes = null) {
      checkSize(call, bytes);
      const { head, rest } = headAndBytes(await api.call({ windowId, call, argument, bytes }));
      return checkReply(call, head, rest);
    },
    onEvent: (handler) =>
      api.onEvent((event) => {
        const parsed = hostEventSchema.safeParse(event);
        if (parsed.success) handler(parsed.data);
      }),
    // The desktop's host and its window end together.
    onLost: () => undefined,
  };
}

/** In the desktop the host holds every file: the preload script tells it the paths of dropped ones. */
export function desktopFiles(api: DesktopApi, windowId: string): PageFiles {
  return {
    async adopt(files): Promise<OpenedFile[]> {
      const { head, rest } = headAndBytes(await api.dropped(windowId, [...files]));
      return checkReply('openDropped', head, rest).answer;
    },
    fingerprint: async () => null,
    read: async () => null,
    release: () => undefined,
  };
}

function headAndBytes(reply: unknown): { head: unknown; rest: Uint8Array | null } {
  if (typeof reply !== 'object' || reply === null) return { head: reply, rest: null };
  const { bytes = null, ...head } = reply as { bytes?: unknown };
  return { head, rest: bytes instanceof Uint8Array ? bytes : null };
}
