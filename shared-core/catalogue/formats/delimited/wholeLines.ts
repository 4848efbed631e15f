import { Refusal } from '../../../base/refusal.ts';

/** Longest line or row. A table with more in one row is no catalogue, and memory must stay bounded. */
export const LONGEST_ROW = 1_048_576;

export const LF = 10;
export const CR = 13;
/** What ends a line: LF (also that of CRLF), or CR where a file knows no LF. */
export type LineBreak = typeof LF | typeof CR;

/** Told from the first bytes: CR alone where there is a CR and no LF. */
export function detectLineBreak(head: Uint8Array): LineBreak {
  return head.includes(LF) || !head.includes(CR) ? LF : CR;
}

/**
 * The same bytes in blocks of whole lines: each block ends with a line break, one being added after the file's last
 * line where it has none. A block is valid until the next one is asked for; `nextLine` tells the number of the line
 * that follows all blocks given out so far.
 *
 * Throws Refusal for a line longer than LONGEST_ROW bytes.
 */
export async function* wholeLines(
  blocks: AsyncIterable<Uint8Array>,
  lineBreak: LineBreak,
  nextLine: () => number,
): AsyncGenerator<Uint8Array> {
  let open = new Uint8Array(0);
  for await (const block of blocks) {
    const end = block.lastIndexOf(lineBreak) + 1;
    if (end > 0) {
      const lines = block.subarray(0, end);
      yield open.length === 0 ? lines : joined(open, lines);
      open = block.slice(end);
    } else {
      open = joined(open, block);
    }
    if (open.length > LONGEST_ROW) {
      throw new Refusal(
        `Line ${nextLine()} is longer than ${LONGEST_ROW} bytes, which no row of a catalogue is: give a table with one galaxy a line, separated by commas, tabs, semicolons or bars.`,
      );
    }
  }
  if (open.length > 0) yield joined(open, Uint8Array.of(lineBreak));
}

export function joined(a: Uint8Array, b: Uint8Array): Uint8Array<ArrayBuffer> {
  const both = new Uint8Array(a.length + b.length);
  both.set(a);
  both.set(b, a.length);
  return both;
}
