import type { CancelSignal } from '../../../shared-core/base/cancelled.ts';
import { Refusal } from '../../../shared-core/base/refusal.ts';
import type { Catalogue } from '../../../shared-core/catalogue/catalogue.ts';
import { columnsAtLines } from '../../../shared-core/catalogue/columnsAtLines.ts';
import type { SortedSample } from '../../../shared-core/shells/sample.ts';
import type { ColumnValues } from '../protocol.ts';
import { startSha256 } from '../sourceBytes.ts';
import type { StageTools } from '../surroundings.ts';

/** The numbers of one column for every row of a catalogue that was kept. */
export interface NamedColumn {
  readonly column: string;
  readonly rows: ArrayLike<number>;
}

interface Places {
  readonly catalogue: Catalogue;
  /** SHA-256 of the bytes that it was read from. */
  readonly sha256: string;
  /** Columns read before. */
  readonly known: readonly NamedColumn[];
  readonly open: () => Promise<AsyncIterable<Uint8Array>>;
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
  const { catalogue, sha256, known, open, signal } = places;
  const rowsOf = (column: string): ArrayLike<number> | undefined =>
    known.find((k) => k.column === column)?.rows ?? catalogue.extras.get(column);
  const missing = columns.filter((column) => rowsOf(column) === undefined);
  const read = new Map<string, Float64Array>();
  if (missing.length > 0) {
    const hash = startSha256();
    const found = await columnsAtLines(await open(), missing, catalogue.line, {
      signal,
      onBytes: (chunk) => hash.update(chunk),
    });
    // Rows of another file may be as many, and would lend their numbers to other galaxies.
    if (hash.digestHex() !== sha256)
      throw new Refusal("The catalogue's file has changed since it was read: read it again.");
    for (const [column, rows] of found) read.set(column, rows);
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

/** The numbers of columns for the galaxies of a sample, in its order. */
export function inSampleOrder(
  columns: readonly NamedColumn[],
  { count, order }: SortedSample,
  floats: StageTools['floats'],
): ColumnValues[] {
  return columns.map(({ column, rows }) => {
    const values = floats(count);
    for (let i = 0; i < count; i++) values[i] = rows[order[i]!]!;
    return { column, values };
  });
}

function hasNumber(rows: ArrayLike<number>): boolean {
  for (let i = 0; i < rows.length; i++) if (Number.isFinite(rows[i])) return true;
  return false;
}
