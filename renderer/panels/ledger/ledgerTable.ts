import type { ColumnMapping, RowAccount } from '../../../shared-core/catalogue/catalogue.ts';
import type { Cosmology } from '../../../shared-core/cosmology/cosmology.ts';
import { PUBLISHED_SETS } from '../../../shared-core/cosmology/publishedSets.ts';
import { type ShownUnits, shownKey, shownValue } from '../../../shared-core/report/quantity.ts';
import { shellsJson } from '../../../shared-core/report/shellsJson.ts';
import { shellsTable } from '../../../shared-core/report/shellsTable.ts';
import { labelledRows, type Table } from '../../../shared-core/report/table.ts';
import type { ShellStatistics } from '../../../shared-core/shells/shell.ts';
import type { Study } from '../../../shared-core/study/schema.ts';
import type { FootprintPicture } from '../../engine/protocol.ts';

/** What a ledger is made of, outside of any signal. */
export interface LedgerFacts {
  readonly study: Study;
  readonly shells: readonly ShellStatistics[];
  /** One shell from the first edge to the last. */
  readonly all: ShellStatistics | null;
  readonly units: ShownUnits;
  readonly cosmology: Cosmology;
  /** Null for a plan without a catalogue. */
  readonly account: RowAccount | null;
  readonly mapping: ColumnMapping | null;
  readonly footprint: Pick<FootprintPicture, 'origin' | 'areaDeg2' | 'estimate'> | null;
}

/** The ledger as the report's table: the same notes and numbers as the command's. */
export function ledgerTable({ study, ...facts }: LedgerFacts): Table<ShellStatistics> {
  const table = shellsTable({
    ...facts,
    cuts: study.cuts,
    region: study.region,
    set: PUBLISHED_SETS.find((one) => one.key === study.cosmologySet) ?? null,
    p0Mpc3PerH3: study.p0Mpc3PerH3,
  });
  if (study.source?.kind !== 'demo') return table;
  const invented = 'The catalogue is invented: no real sky, survey or galaxy is meant.';
  return { ...table, notes: [...table.notes, invented] };
}

/** The ledger as the command's --json gives it; a plan has no catalogue in it. */
export const ledgerJson = (facts: LedgerFacts): unknown => shellsJson(ledgerTable(facts));

/**
 * Tab-separated, every digit, for pasting into a spreadsheet or a notebook: the header holds the JSON names, the row
 * of all comes last, and the notes follow after an empty line.
 */
export function asTsv<Row>(table: Table<Row>): string {
  const { quantities, units, numbered = '#', notes } = table;
  const lines = [
    [numbered, ...quantities.map((q) => shownKey(q, units))],
    ...labelledRows(table).map(([label, row]) => [
      label,
      ...quantities.map((q) => shownValue(q, row, units) ?? ''),
    ]),
    ...(notes.length === 0 ? [] : [[], ...notes.map((note) => [note.replaceAll(/\s+/g, ' ')])]),
  ];
  return lines.map((cells) => `${cells.join('\t')}\n`).join('');
}
