import type { ColumnMapping, RowAccount } from '../../../shared-core/catalogue/catalogue.ts';
import type { Cosmology } from '../../../shared-core/cosmology/cosmology.ts';
import { PUBLISHED_SETS } from '../../../shared-core/cosmology/publishedSets.ts';
import {
  describeAccount,
  describeColumns,
  describeCosmology,
  describeFootprint,
  describeMethod,
} from '../../../shared-core/report/notes.ts';
import { type ShownUnits, shownKey, shownValue } from '../../../shared-core/report/quantity.ts';
import { SHELL_QUANTITIES } from '../../../shared-core/report/shellQuantities.ts';
import { shellsJson } from '../../../shared-core/report/shellsJson.ts';
import type { Table } from '../../../shared-core/report/table.ts';
import type { ShellStatistics } from '../../../shared-core/shells/shell.ts';
import { describeRegion } from '../../../shared-core/sky/regionText.ts';
import type { Study } from '../../../shared-core/study/schema.ts';
import type { FootprintPicture } from '../../engine/protocol.ts';

/** What a ledger is made of, outside of any signal. */
export interface LedgerFacts {
  readonly study: Study;
  readonly shells: readonly ShellStatistics[];
  readonly units: ShownUnits;
  readonly cosmology: Cosmology;
  /** Null for a plan without a catalogue. */
  readonly account: RowAccount | null;
  readonly mapping: ColumnMapping | null;
  readonly footprint: Pick<FootprintPicture, 'origin' | 'areaDeg2' | 'estimate'> | null;
}

/** The ledger as the report's table: the same notes and numbers as the command's. */
export function ledgerTable(facts: LedgerFacts): Table<ShellStatistics> {
  const { study, shells, units, cosmology, account, mapping, footprint } = facts;
  const set = PUBLISHED_SETS.find((one) => one.key === study.cosmologySet) ?? null;
  return {
    rows: shells,
    quantities: SHELL_QUANTITIES,
    units,
    notes: [
      account === null ? 'A plan: no catalogue, so volumes alone.' : describeAccount(account),
      ...(mapping === null ? [] : [describeColumns(mapping)]),
      ...(footprint === null
        ? []
        : [describeFootprint(footprint, study.region === null ? null : describeRegion(study.region))]),
      describeCosmology(cosmology, set),
      describeMethod(study.p0Mpc3PerH3),
      ...(study.source?.kind === 'demo'
        ? ['The catalogue is invented: no real sky, survey or galaxy is meant.']
        : []),
    ],
  };
}

/** The ledger as the command's --json gives it; a plan has no catalogue in it. */
export function ledgerJson(facts: LedgerFacts): unknown {
  const { study, cosmology, account, mapping, footprint } = facts;
  return shellsJson({
    table: ledgerTable(facts),
    account,
    mapping,
    footprint,
    cosmology,
    p0Mpc3PerH3: study.p0Mpc3PerH3,
    cosmologyName: study.cosmologySet,
  });
}

/** Tab-separated, every digit, for pasting into a spreadsheet or a notebook. The header holds the JSON names. */
export function asTsv<Row>({ rows, quantities, units }: Table<Row>): string {
  const lines = [
    quantities.map((q) => shownKey(q, units)),
    ...rows.map((row) => quantities.map((q) => shownValue(q, row, units) ?? '')),
  ];
  return lines.map((cells) => `${cells.join('\t')}\n`).join('');
}
