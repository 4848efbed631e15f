import { Refusal } from '../../../base/refusal.ts';
import { type StreamingDecoder, streamingDecoder } from '../../../base/textDecoder.ts';
import { refuseOtherKinds } from './fileKinds.ts';

// Of the first block: this many characters that no table holds, and above this share of it, and the file is not
// text. A few names in Latin-1 stay below it.
const ODD_AT_LEAST = 5;
const MOST_ODD_SHARE = 0.1;
const REPLACEMENT = 0xfffd;

/** The byte-order mark decides; without one it is UTF-8 (RFC 3629; Unicode Standard, section 23.8). */
function decoderFor(head: Uint8Array): StreamingDecoder {
  const [first, second, third, fourth] = head;
  if (first === 0xff && second === 0xfe) {
    if (third === 0 && fourth === 0 && head.length >= 4) throw notText('UTF-32 text');
    return streamingDecoder('utf-16le');
  }
  if (first === 0xfe && second === 0xff) return streamingDecoder('utf-16be');
  return streamingDecoder('utf-8');
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
 * Bytes to text, a piece a block: UTF-8, or UTF-16 by its byte-order mark, the mark itself dropped. Bytes that are
 * not valid in the encoding (a name in Latin-1) become U+FFFD, which no number can hold, so no value changes.
 *
 * Throws Refusal for other kinds of file, for binary data and for NUL characters anywhere.
 */
export async function* decodeText(blocks: AsyncIterable<Uint8Array>): AsyncGenerator<string> {
  let decoder: StreamingDecoder | null = null;
  for await (const block of blocks) {
    const isFirst = decoder === null;
    if (isFirst) refuseOtherKinds(block);
    decoder ??= decoderFor(block);
    const text = decoder.decode(block, { stream: true });
    if (text.includes('\0')) throw notText('binary data (a NUL byte)');
    if (isFirst && looksBinary(text)) throw notText('binary data');
    if (text !== '') yield text;
  }
  const rest = decoder?.decode() ?? '';
  if (rest !== '') yield rest;
}
