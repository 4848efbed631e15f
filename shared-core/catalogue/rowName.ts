import type { ReadWatch } from './formats/delimited/byteStream.ts';
import type { RowSink } from './formats/delimited/lineScanner.ts';
import { openTable } from './formats/delimited/openTable.ts';
import { resolveMapping } from './mapping.ts';
import type { ColumnChoice } from './spellings.ts';

/** The row was read: the rest of the file is not asked for. */
class Found extends Error {}

/**
 * What stands in the name column (the mapping's id) of the row at a line: names are not kept in memory, since they are
 * asked for one by one. Reads no further than the row.
 *
 * @param mapping as for loadCatalogue
 * @returns the trimmed text; null where it is empty, where no column has names, and for a line that has no row
 * @throws Refusal as loadCatalogue does; Cancelled when the signal was raised
 */
export async function rowName(
  bytes: AsyncIterable<Uint8Array>,
  mapping: ColumnChoice | undefined,
  line: number,
  watch: ReadWatch = {},
): Promise<string | null> {
  const table = await openTable(bytes, watch);
  try {
    const { id } = resolveMapping(table.header, mapping);
    if (id === null) return null;
    const cell = table.header.indexOf(id);
    let name: string | null = null;
    const sink: RowSink = {
      numbers: (at) => at !== line,
      text(at, row) {
        if (at < line) return;
        if (at === line) name = row[cell]?.trim() || null;
        throw new Found();
      },
    };
    try {
      await table.numbers([], 0, sink);
    } catch (error) {
      if (!(error instanceof Found)) throw error;
    }
    return name;
  } finally {
    await table.close();
  }
}
