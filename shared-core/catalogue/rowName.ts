import type { ReadWatch } from './formats/delimited/byteStream.ts';
import type { RowSink } from './formats/delimited/lineScanner.ts';
import { openTable } from './formats/delimited/openTable.ts';
import { resolveMapping } from './mapping.ts';
import type { ColumnChoice } from './spellings.ts';

/** The last row was read: the rest of the file is not asked for. */
class Found extends Error {}

/**
 * What stands in the name column (the mapping's id) of the rows at some lines: names are not kept in memory, since they
 * are asked for of few. Reads no further than the last of the rows.
 *
 * @param mapping as for loadCatalogue
 * @param lines in increasing order
 * @returns for each line the trimmed text; null where it is empty, where no column has names, and for a line that has
 *   no row
 * @throws Refusal as loadCatalogue does; Cancelled when the signal was raised
 */
export async function namesAtLines(
  bytes: AsyncIterable<Uint8Array>,
  mapping: ColumnChoice | undefined,
  lines: ArrayLike<number>,
  watch: ReadWatch = {},
): Promise<(string | null)[]> {
  const table = await openTable(bytes, watch);
  try {
    const names = Array.from(lines, (): string | null => null);
    const { id } = resolveMapping(table.header, mapping);
    if (id === null) return names;
    const cell = table.header.indexOf(id);
    let next = 0;
    const isNext = (line: number): boolean => {
      while (lines[next]! < line) next++;
      return lines[next] === line;
    };
    const sink: RowSink = {
      numbers: (line) => next < lines.length && !isNext(line),
      text(line, row) {
        if (isNext(line)) names[next++] = row[cell]?.trim() || null;
        if (next >= lines.length) throw new Found();
      },
    };
    try {
      await table.numbers([], 0, sink);
    } catch (error) {
      if (!(error instanceof Found)) throw error;
    }
    return names;
  } finally {
    await table.close();
  }
}

/** The name in one row, as namesAtLines gives it. */
export async function rowName(
  bytes: AsyncIterable<Uint8Array>,
  mapping: ColumnChoice | undefined,
  line: number,
  watch: ReadWatch = {},
): Promise<string | null> {
  return (await namesAtLines(bytes, mapping, [line], watch))[0]!;
}
