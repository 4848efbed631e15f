import type { ColumnMapping, Cut, RowAccount } from '../catalogue/catalogue.ts';
import type { Cosmology } from '../cosmology/cosmology.ts';
import type { PublishedSet } from '../cosmology/publishedSets.ts';
import type { ShellStatistics } from '../shells/shell.ts';
import type { Footprint, Region } from '../sky/region.ts';
import { describeRegion } from '../sky/regionText.ts';
import { describeCuts } from './cuts.ts';
import {
  describeAccount,
  describeColumns,
  describeCosmology,
  describeFootprint,
  describeMethod,
} from './notes.ts';
import type { ShownUnits } from './quantity.ts';
import { PLAN_QUANTITIES, SHELL_QUANTITIES } from './shellQuantities.ts';
import { shellsMeta } from './shellsJson.ts';
import type { Table } from './table.ts';

/** What a ledger of shells is made of. */
export interface ShellsFacts {
  readonly shells: readonly ShellStatistics[];
  /** One shell from the first edge to the last; null where there are no shells. */
  readonly all: ShellStatistics | null;
  readonly units: ShownUnits;
  /** Null for a plan, which has no catalogue; the mapping likewise. */
  readonly account: RowAccount | null;
  readonly mapping: ColumnMapping | null;
  readonly cuts: readonly Cut[];
  /** Null where nobody stated one. */
  readonly region: Region | null;
  /** Null where neither a region nor a catalogue says which sky it is. */
  readonly footprint: Pick<Footprint, 'origin' | 'areaDeg2' | 'estimate'> | null;
  readonly cosmology: Cosmology;
  /** Null for own parameters. */
  readonly set: PublishedSet | null;
  readonly p0Mpc3PerH3: number;
}

/** The ledger as a table, with every quantity and the notes that let a reader repeat it: window and command have this one. */
export function shellsTable(facts: ShellsFacts): Table<ShellStatistics> {
  const { shells, all, units, account, mapping, cuts, region, footprint, cosmology, set } = facts;
  return {
    rows: shells,
    quantities: account === null ? PLAN_QUANTITIES : SHELL_QUANTITIES,
    units,
    numbered: 'shell',
    all,
    notes: [
      account === null ? 'A plan: no catalogue, so volumes alone.' : describeAccount(account),
      ...(mapping === null ? [] : [describeColumns(mapping)]),
      ...(account === null ? [] : [describeCuts(cuts)]),
      ...(footprint === null
        ? []
        : [describeFootprint(footprint, region === null ? null : describeRegion(region))]),
      describeCosmology(cosmology, set),
      describeMethod(facts.p0Mpc3PerH3),
      ...(all === null
        ? []
        : ['Shells: "all" is one shell from the first edge to the last, not the sum of the rows.']),
    ],
    meta: shellsMeta(facts),
  };
}
