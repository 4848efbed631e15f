import { z } from '../../shared-core/base/schema.ts';
import type { Reply } from '../../shared-core/bridge/calls.ts';
import { idSchema } from '../../shared-core/bridge/messages.ts';
import type { Desk } from '../files/desk.ts';
import { CHANNELS } from './channels.ts';
import type { DesktopWindows } from './desktopWindows.ts';
import { type SenderEvent, senderAllowed } from './rules.ts';

/** The event of a message; Electron's is one. */
export interface CallEvent extends SenderEvent {
  readonly sender: { readonly id: number };
}

/** The receiving side of Electron's messages; ipcMain is one. */
export interface CallReceiver {
  handle(channel: string, listener: (event: CallEvent, message: unknown) => Promise<unknown>): void;
}

const messageSchema = z.strictObject({
  windowId: idSchema,
  call: z.string(),
  argument: z.unknown(),
  bytes: z.instanceof(Uint8Array).nullable(),
});

/** Answers the calls of the desktop's windows, after checking who sent them. */
export function receiveCalls(receiver: CallReceiver, desk: Desk, windows: DesktopWindows): void {
  const answer = async (event: CallEvent, from: 'page' | 'preload', message: unknown): Promise<Reply> => {
    if (!senderAllowed(event))
      return refusal('The message did not come from the window itself: it was refused.');
    const parsed = messageSchema.safeParse(message);
    if (!parsed.success)
      return refusal('The window sent a message that its host does not understand: load it again.');
    const { windowId, call, argument, bytes } = parsed.data;
    if (!(await windows.recognise(event.sender.id, windowId)))
      return refusal('The message came from a window that is not known: it was refused.');
    return await desk.answer(windowId, from, call, argument, bytes);
  };
  receiver.handle(CHANNELS.call, (event, message) => answer(event, 'page', message));
  receiver.handle(CHANNELS.dropped, (event, message) => answer(event, 'preload', message));
}

function refusal(refused: string): Reply {
  return { refused, refusedKind: 'use' };
}
