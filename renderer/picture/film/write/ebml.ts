import { joined } from './filmFile.ts';

/*
 * Elements of the Extensible Binary Meta Language (RFC 8794): an identifier, the length of what follows, and that.
 */

/** An element with what it holds. @param id with its own length marker, as standards write it, such as 0x1a45dfa3 */
export const element = (id: number, ...content: readonly Uint8Array[]): Uint8Array<ArrayBuffer> => {
  const length = content.reduce((sum, part) => sum + part.length, 0);
  return joined([unsigned(id), sizeBytes(length), ...content]);
};

/** Length that is not known before the end (RFC 8794, section 6.2), in eight bytes. */
const UNKNOWN_SIZE = Uint8Array.of(0x01, 0xff, 0xff, 0xff, 0xff, 0xff, 0xff, 0xff);

/** The beginning of an element that ends with the file. */
export const openElement = (id: number): Uint8Array<ArrayBuffer> => joined([unsigned(id), UNKNOWN_SIZE]);

/** An unsigned whole number below 2^53, in as few bytes as it takes (section 7.2). */
export function unsigned(value: number): Uint8Array<ArrayBuffer> {
  const bytes: number[] = [];
  for (let rest = value; rest > 0 || bytes.length === 0; rest = Math.floor(rest / 256))
    bytes.unshift(rest % 256);
  return Uint8Array.from(bytes);
}

/** A float of eight bytes (section 7.3). */
export function float64(value: number): Uint8Array<ArrayBuffer> {
  const out = new Uint8Array(8);
  new DataView(out.buffer).setFloat64(0, value);
  return out;
}

/** A length as a number of variable size (section 4): as many bytes as there are zeros before the first one, and one. */
function sizeBytes(length: number): Uint8Array {
  let bytes = 1;
  // All ones is the unknown length, so the greatest value of each width is left out.
  while (length >= 2 ** (7 * bytes) - 1) bytes++;
  const out = new Uint8Array(bytes);
  let rest = length;
  for (let i = bytes - 1; i >= 0; i--) {
    out[i] = rest % 256;
    rest = Math.floor(rest / 256);
  }
  out[0]! |= 0x80 >> (bytes - 1);
  return out;
}
