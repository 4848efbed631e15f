import type { Catalogue } from '../../shared-core/catalogue/catalogue.ts';
import { findRepeats, keptRepeats } from '../../shared-core/catalogue/positions.ts';
import { type NamesFile, REPEATS_HEADER, repeatLines } from '../../shared-core/catalogue/repeatsCsv.ts';

const PART_LINES = 1024;

/** Every galaxy of a sample that repeats the position of an earlier one, as CSV text in parts. */
export async function repeatsList(
  catalogue: Catalogue,
  /** The rows of the sample, in any order. */
  rows: Uint32Array,
  file: NamesFile,
): Promise<string[]> {
  const keep = new Uint8Array(catalogue.raDeg.length);
  for (const row of rows) keep[row] = 1;
  const repeats = keptRepeats(findRepeats(catalogue.raDeg, catalogue.decDeg), keep);
  const parts: string[] = [];
  let lines = [REPEATS_HEADER];
  for await (const line of repeatLines(catalogue, repeats, file)) {
    lines.push(line);
    if (lines.length < PART_LINES) continue;
    parts.push(lines.join(''));
    lines = [];
  }
  return [...parts, lines.join('')];
}
