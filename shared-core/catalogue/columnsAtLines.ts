import { readText } from './cleaning.ts';
import type { ReadWatch } from './formats/delimited/byteStream.ts';
import type { RowSink } from './formats/delimited/lineScanner.ts';
import { openTable } from './formats/delimited/openTable.ts';
import { columnNamed } from './mapping.ts';

/**
 * The numbers of some columns in the rows at given lines, NaN where a cell holds none: what a catalogue that is in
 * memory was loaded without. Memory is that of these numbers.
 *
 * @param lines in increasing order, as a catalogue has them
 * @returns by the name asked for, arrays as long as `lines`; NaN at a line that has no row
 * @throws Refusal as loadCatalogue does, and for a column that is not there; Cancelled when the signal was raised
 */
export async function columnsAtLines(
  bytes: AsyncIterable<Uint8Array>,
  columns: readonly string[],
  lines: ArrayLike<number>,
  watch: ReadWatch = {},
): Promise<Map<string, Float64Array>> {
  const table = await openTable(bytes, watch);
  try {
    const { header, decimals } = table;
    const cells = columns.map((column) => header.indexOf(columnNamed(header, column)));
    const wanted = [...new Set(cells)];
    const out = wanted.map(() => new Float64Array(lines.length).fill(Number.NaN));
    const read = new Float64Array(wanted.length);
    let next = 0;
    const sink: RowSink = {
      numbers(line, values) {
        while (lines[next]! < line) next++;
        if (lines[next] === line) for (let k = 0; k < out.length; k++) out[k]![next] = values[k]!;
        return true;
      },
      text(line, row) {
        if (readText(row, header.length, wanted, 0, read, decimals.mark) === null) sink.numbers(line, read);
      },
    };
    await table.numbers(wanted, 0, sink);
    return new Map(columns.map((column, i) => [column, out[wanted.indexOf(cells[i]!)]!]));
  } finally {
    await table.close();
  }
}
