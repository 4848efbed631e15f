import { Refusal } from '../../../base/refusal.ts';
import { textDecoder, utf8Bytes } from '../../../base/textCoding.ts';
import { refuseOtherKinds } from './fileKinds.ts';

// Of the first block: this many characters that no table holds, and above this share of it, and the file is not
// text. A few names in Latin-1 stay below it.
const ODD_AT_LEAST = 5;
const MOST_ODD_SHARE = 0.1;
const REPLACEMENT = 0xfffd;

type Encoding = 'utf-8' | 'utf-16le' | 'utf-16be';

/** The byte-order mark decides; without one it is UTF-8 (RFC 3629; Unicode Standard, section 23.8). */
function encodingOf(head: Uint8Array): { readonly encoding: Encoding; readonly markBytes: number } {
  const [first, second, third, fourth] = head;
  if (first === 0xff && second === 0xfe) {
    if (third === 0 && fourth === 0 && head.length >= 4) throw notText('UTF-32 text');
    return { encoding: 'utf-16le', markBytes: 2 };
  }
  if (first === 0xfe && second === 0xff) return { encoding: 'utf-16be', markBytes: 2 };
  return { encoding: 'utf-8', markBytes: first === 0xef && second === 0xbb && third === 0xbf ? 3 : 0 };
}

function notText(what: string): Refusal {
  return new Refusal(
    `This file holds ${what}, where text in UTF-8 (or in UTF-16 with a byte-order mark) was expected: save the table as CSV in UTF-8.`,
  );
}

function looksBinary(text: string): boolean {
  let odd = 0;
  for (let i = 0; i < text.length; i++) {
    const code = text.charCodeAt(i);
    // Control characters other than tab, line feed, vertical tab, form feed and carriage return.
    if (code < 9 || (code > 13 && code < 32) || code === REPLACEMENT) odd++;
  }
  return odd >= ODD_AT_LEAST && odd > MOST_ODD_SHARE * text.length;
}

/**
 * The file's text as UTF-8 without a byte-order mark: as it is, or made from UTF-16 where the mark says so. Bytes
 * that are not valid UTF-8 (a name in Latin-1) stay; they become U+FFFD where they are shown, and no number holds
 * any, so no value changes.
 *
 * Throws Refusal for other kinds of file, for binary data and for NUL characters anywhere.
 */
export async function* asUtf8(blocks: AsyncIterable<Uint8Array>): AsyncGenerator<Uint8Array> {
  let encoding: Encoding | null = null;
  let wide = textDecoder('utf-16le');
  for await (const block of blocks) {
    let bytes = block;
    const isFirst = encoding === null;
    if (encoding === null) {
      refuseOtherKinds(block);
      const found = encodingOf(block);
      encoding = found.encoding;
      bytes = block.subarray(found.markBytes);
      if (encoding === 'utf-16be') wide = textDecoder('utf-16be');
    }
    if (encoding !== 'utf-8') bytes = utf8Bytes(wide.decode(bytes, { stream: true }));
    if (bytes.includes(0)) throw notText('binary data (a NUL byte)');
    if (isFirst && looksBinary(textDecoder('utf-8').decode(bytes, { stream: true })))
      throw notText('binary data');
    if (bytes.length > 0) yield bytes;
  }
  const rest = utf8Bytes(wide.decode());
  if (rest.length > 0) yield rest;
}
