import { Refusal } from '../base/refusal.ts';
import type { ColumnMapping } from './catalogue.ts';
import type { Decimals } from './formats/delimited/decimals.ts';
import type { Delimiter } from './formats/delimited/delimiter.ts';
import { openTable } from './formats/delimited/openTable.ts';
import { isBlank } from './formats/delimited/table.ts';
import { keptText } from './keptText.ts';
import { resolveMapping, suggestMapping } from './mapping.ts';
import type { ColumnChoice } from './spellings.ts';

/** The head of a file, for choosing its columns by eye. */
export interface Preview {
  readonly header: readonly string[];
  readonly delimiter: Delimiter;
  readonly decimals: Decimals;
  /** First rows as text, cells trimmed and no longer than 200 characters; a row may have more or fewer cells than the header. */
  readonly rows: readonly (readonly string[])[];
  /** Line of each row in the file. */
  readonly lines: readonly number[];
  /** What the header's spelling suggests; parts that it does not are left out. */
  readonly suggestion: ColumnChoice;
  /** The whole mapping, or null where right ascension, declination or redshift is not found. */
  readonly mapping: ColumnMapping | null;
  /** Then the sentence that says what is missing. */
  readonly problem: string | null;
}

/**
 * Reads no more than the head of the file and lets go of the source. `rowCount` rows at most, fewer in a shorter file.
 * Throws Refusal as openTable does.
 */
export async function previewCatalogue(
  bytes: AsyncIterable<Uint8Array>,
  rowCount = 20,
  options: { readonly delimiter?: Delimiter | undefined } = {},
): Promise<Preview> {
  const table = await openTable(bytes, options);
  const rows: string[][] = [];
  const lines: number[] = [];
  try {
    if (rowCount > 0) {
      gather: for await (const records of table.rows()) {
        for (let i = 0; i < records.rows.length; i++) {
          const row = records.rows[i]!;
          if (isBlank(row)) continue;
          rows.push(row.map(keptText));
          lines.push(records.lines[i]!);
          if (rows.length === rowCount) break gather;
        }
      }
    }
  } finally {
    await table.close();
  }
  const { header, delimiter, decimals } = table;
  return {
    header,
    delimiter,
    decimals,
    rows,
    lines,
    suggestion: suggestMapping(header),
    ...mappingOf(header),
  };
}

function mappingOf(header: readonly string[]): Pick<Preview, 'mapping' | 'problem'> {
  try {
    return { mapping: resolveMapping(header), problem: null };
  } catch (fault) {
    if (fault instanceof Refusal) return { mapping: null, problem: fault.message };
    throw fault;
  }
}
