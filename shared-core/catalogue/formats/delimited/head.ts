import { Refusal } from '../../../base/refusal.ts';
import { textDecoder } from '../../../base/textCoding.ts';
import { joined, type LineBreak } from './wholeLines.ts';

/** Enough to judge the delimiter by. */
const HEAD_BYTES = 4096;

/** What a file begins with, once comments and blank lines are passed. */
export interface Head {
  /** Whole lines, the header first. */
  readonly bytes: Uint8Array;
  /** The line on which they begin. */
  readonly line: number;
  /** The last comment line before it. */
  readonly comment: string | null;
}

/** The line that comes next while the head is read. */
export interface Place {
  line: number;
}

/**
 * Passes comment lines (#) and blank lines and gives the lines from the header on: some four kilobytes, or a block of
 * lines if that is more. `place` is kept up to date. Throws Refusal where there is nothing else in the file.
 */
export async function readHead(
  blocks: AsyncGenerator<Uint8Array>,
  lineBreak: LineBreak,
  place: Place,
): Promise<Head> {
  const decoder = textDecoder('utf-8');
  let comment: string | null = null;
  let head: Uint8Array = new Uint8Array(0);
  let headLine = 1;
  while (head.length < HEAD_BYTES) {
    const next = await blocks.next();
    if (next.done) break;
    const lines = next.value;
    let at = 0;
    while (at < lines.length) {
      const end = lines.indexOf(lineBreak, at);
      if (head.length === 0) {
        const line = decoder.decode(lines.subarray(at, end)).trim();
        if (line !== '' && !line.startsWith('#')) {
          headLine = place.line;
          head = lines.slice(at);
        } else if (line !== '') {
          comment = line;
        }
      } else if (at === 0) {
        head = joined(head, lines);
      }
      at = end + 1;
      place.line++;
    }
  }
  if (head.length === 0) throw nothingThere(place.line === 1);
  return { bytes: head, line: headLine, comment };
}

/** The sentence for a file without any row. */
export function nothingThere(isEmpty: boolean): Refusal {
  const what = isEmpty ? 'is empty' : 'holds nothing but blank lines and comments';
  return new Refusal(
    `This file ${what}, where a header and a line for each galaxy were expected: choose another file.`,
  );
}
