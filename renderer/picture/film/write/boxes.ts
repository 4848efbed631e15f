import { joined } from './filmFile.ts';

/* Boxes of the ISO base media file format (ISO/IEC 14496-12): length, four letters, content. */

/** A box below 4 GB. @param type four letters; © is the one byte 0xa9 */
export function box(type: string, ...content: readonly Uint8Array[]): Uint8Array<ArrayBuffer> {
  const length = 8 + content.reduce((sum, part) => sum + part.length, 0);
  return joined([u32(length), letters(type), ...content]);
}

/** A box with version and flags (section 4.2). */
export const fullBox = (
  type: string,
  version: number,
  flags: number,
  ...content: readonly Uint8Array[]
): Uint8Array<ArrayBuffer> => box(type, u32(version * 2 ** 24 + flags), ...content);

export const letters = (text: string): Uint8Array =>
  Uint8Array.from(text, (letter) => letter.charCodeAt(0) & 0xff);

export function u16(...values: readonly number[]): Uint8Array {
  const out = new Uint8Array(2 * values.length);
  const view = new DataView(out.buffer);
  for (const [i, value] of values.entries()) view.setUint16(2 * i, value);
  return out;
}

export function u32(...values: readonly number[]): Uint8Array {
  const out = new Uint8Array(4 * values.length);
  const view = new DataView(out.buffer);
  for (const [i, value] of values.entries()) view.setUint32(4 * i, value);
  return out;
}

export function u64(...values: readonly number[]): Uint8Array {
  const out = new Uint8Array(8 * values.length);
  const view = new DataView(out.buffer);
  for (const [i, value] of values.entries()) view.setBigUint64(8 * i, BigInt(value));
  return out;
}

export const zeros = (count: number): Uint8Array => new Uint8Array(count);
