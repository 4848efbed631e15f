import { csvCell } from '../base/cell.ts';
import type { Catalogue } from './catalogue.ts';
import type { Repeats } from './positions.ts';
import { namesAtLines } from './rowName.ts';
import type { ColumnChoice } from './spellings.ts';

/** First line of a file of repeated positions, with its line end (RFC 4180: CR LF). */
export const REPEATS_HEADER = 'line,name,ra_deg,dec_deg,repeats_line\r\n';

/** Where the names of rows are read. */
export interface NamesFile {
  readonly mapping: ColumnChoice | null;
  readonly open: () => Promise<AsyncIterable<Uint8Array>>;
}

/**
 * Kept rows that repeat the position of an earlier kept row, each with its name, the position and the line that it
 * repeats: lines of a CSV file (whose header is REPEATS_HEADER) in file order. The file is read once more, for the
 * names; memory is that of the rows listed.
 *
 * @param repeats of this catalogue's rows
 * @throws Refusal as loadCatalogue does
 */
export async function* repeatLines(
  { line, raDeg, decDeg }: Catalogue,
  { row, first }: Repeats,
  { mapping, open }: NamesFile,
): AsyncGenerator<string> {
  if (row.length === 0) return;
  const lines = Float64Array.from(row, (at) => line[at]!);
  const names = await namesAtLines(await open(), mapping ?? undefined, lines);
  for (let k = 0; k < row.length; k++) {
    const at = row[k]!;
    const name = csvCell(names[k] ?? '');
    yield `${lines[k]},${name},${raDeg[at]},${decDeg[at]},${line[first[k]!]}\r\n`;
  }
}
