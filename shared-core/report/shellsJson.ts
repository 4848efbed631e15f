import type { ColumnMapping, RowAccount } from '../catalogue/catalogue.ts';
import type { ShellStatistics } from '../shells/shell.ts';
import type { ShellConditions } from '../shells/statistics.ts';
import type { Footprint } from '../sky/region.ts';
import { asObjects, type Table } from './table.ts';

export interface ShellsResult {
  readonly table: Table<ShellStatistics>;
  readonly account: RowAccount;
  readonly mapping: ColumnMapping;
  readonly footprint: Pick<Footprint, 'origin' | 'areaDeg2' | 'estimate'>;
  readonly conditions: ShellConditions;
  /** Key of the published set, or null for own parameters. */
  readonly cosmologyName: string | null;
}

/** The ledger as a JSON value for scripts: everything that is needed to repeat it, every digit. */
export function shellsJson({
  table,
  account,
  mapping,
  footprint,
  conditions,
  cosmologyName,
}: ShellsResult): unknown {
  const { cosmology } = conditions;
  return {
    catalogue: {
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
    region: {
      areaDeg2: footprint.areaDeg2,
      estimated: footprint.origin === 'estimated',
      ...(footprint.estimate === null ? {} : footprint.estimate),
    },
    p0Mpc3PerH3: conditions.p0Mpc3PerH3,
    lengthUnit: table.units.perH ? 'Mpc/h' : 'Mpc',
    shells: asObjects(table),
  };
}
