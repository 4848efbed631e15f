import type { ColumnMapping, RowAccount } from '../catalogue/catalogue.ts';
import type { Cosmology } from '../cosmology/cosmology.ts';
import type { ShellStatistics } from '../shells/shell.ts';
import type { Footprint } from '../sky/region.ts';
import { asObjects, type Table } from './table.ts';

export interface ShellsResult {
  readonly table: Table<ShellStatistics>;
  /** Null for a plan, which has no catalogue; the mapping likewise. */
  readonly account: RowAccount | null;
  readonly mapping: ColumnMapping | null;
  /** Null where neither a region nor a catalogue says which sky it is. */
  readonly footprint: Pick<Footprint, 'origin' | 'areaDeg2' | 'estimate'> | null;
  readonly cosmology: Cosmology;
  readonly p0Mpc3PerH3: number;
  /** Key of the published set, or null for own parameters. */
  readonly cosmologyName: string | null;
}

/** The ledger as a JSON value for scripts: everything that is needed to repeat it, every digit. */
export function shellsJson({
  table,
  account,
  mapping,
  footprint,
  cosmology,
  p0Mpc3PerH3,
  cosmologyName,
}: ShellsResult): unknown {
  return {
    catalogue: account && {
      rowsRead: account.rowsRead,
      kept: account.kept,
      setAside: account.setAside,
      reasons: account.reasons,
      repeatedPositions: account.repeatedPositions,
      columns: mapping,
    },
    cosmology: {
      name: cosmologyName,
      ...cosmology.parameters,
      omegaDe0: cosmology.omegaDe0,
      omegaK0: cosmology.omegaK0,
    },
    region: footprint && {
      areaDeg2: footprint.areaDeg2,
      estimated: footprint.origin === 'estimated',
      ...(footprint.estimate === null ? {} : footprint.estimate),
    },
    p0Mpc3PerH3,
    lengthUnit: table.units.perH ? 'Mpc/h' : 'Mpc',
    shells: asObjects(table),
  };
}
