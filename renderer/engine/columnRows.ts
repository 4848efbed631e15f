import type { CancelSignal } from '../../shared-core/base/cancelled.ts';
import { Refusal } from '../../shared-core/base/refusal.ts';
import type { Catalogue, ColumnMapping } from '../../shared-core/catalogue/catalogue.ts';
import { loadCatalogue } from '../../shared-core/catalogue/loadCatalogue.ts';

/** The numbers of one column for every row of a catalogue that was kept. */
export interface NamedColumn {
  readonly column: string;
  readonly rows: ArrayLike<number>;
}

interface Places {
  readonly catalogue: Catalogue;
  /** Columns read before. */
  readonly known: readonly NamedColumn[];
  readonly open: () => Promise<AsyncIterable<Uint8Array>>;
  readonly mapping: ColumnMapping | null;
  readonly signal: CancelSignal;
}

/**
 * The numbers of columns for the rows of a catalogue, in its order; the file is read once more only for those that are
 * nowhere yet. NaN where a cell holds no number.
 *
 * @throws Refusal for a column that the file has not, that holds no number at all, and for a file that has changed;
 * Cancelled
 */
export async function columnRows(columns: readonly string[], places: Places): Promise<NamedColumn[]> {
  const { catalogue, known, open, mapping, signal } = places;
  const rowsOf = (column: string): ArrayLike<number> | undefined =>
    known.find((k) => k.column === column)?.rows ?? catalogue.extras.get(column);
  const missing = columns.filter((column) => rowsOf(column) === undefined);
  const read = new Map<string, Float64Array>();
  if (missing.length > 0) {
    const again = await loadCatalogue(await open(), {
      ...(mapping === null ? {} : { mapping }),
      extras: missing,
      contains: null,
      cuts: [],
      signal,
    });
    if (again.catalogue.line.length !== catalogue.line.length)
      throw new Refusal(
        `The catalogue's file has changed: ${again.catalogue.line.length} rows are kept now, ${catalogue.line.length} were before. Open it again.`,
      );
    for (const [column, rows] of again.catalogue.extras) read.set(column, rows);
  }
  return columns.map((column) => {
    const rows = rowsOf(column) ?? read.get(column)!;
    if (rows.length > 0 && !hasNumber(rows))
      throw new Refusal(
        `Column ${column} holds no number in the rows that are in: colour by a column of numbers.`,
      );
    return { column, rows };
  });
}

function hasNumber(rows: ArrayLike<number>): boolean {
  for (let i = 0; i < rows.length; i++) if (Number.isFinite(rows[i])) return true;
  return false;
}
