import { Refusal } from '../base/refusal.ts';

/**
 * One message that carries a head (JSON as UTF-8) and raw bytes behind it: the head's length as four bytes, most
 * significant first, then the head, then the rest.
 */
export function joinFrame(head: Uint8Array, rest: Uint8Array | null): Uint8Array<ArrayBuffer> {
  const frame = new Uint8Array(4 + head.length + (rest?.length ?? 0));
  new DataView(frame.buffer).setUint32(0, head.length);
  frame.set(head, 4);
  if (rest !== null) frame.set(rest, 4 + head.length);
  return frame;
}

/** The head and the rest of a frame, as views into it. Throws Refusal (use) when it is cut off. */
export function splitFrame(frame: Uint8Array): { head: Uint8Array; rest: Uint8Array } {
  const cutOff = new Refusal('A message between the window and its host was cut off: try again.', 'use');
  if (frame.length < 4) throw cutOff;
  const length = new DataView(frame.buffer, frame.byteOffset, frame.byteLength).getUint32(0);
  if (length > frame.length - 4) throw cutOff;
  return { head: frame.subarray(4, 4 + length), rest: frame.subarray(4 + length) };
}
