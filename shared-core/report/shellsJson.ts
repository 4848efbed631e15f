import type { ShellsFacts } from './shellsTable.ts';
import { asObject, asObjects, type Table } from './table.ts';

/** The selection and the conditions of a ledger as plain values: everything that is needed to repeat it but the file. */
export function shellsMeta({
  account,
  mapping,
  cuts,
  region,
  footprint,
  cosmology,
  set,
  p0Mpc3PerH3,
  units,
}: Omit<ShellsFacts, 'shells' | 'all'>): Record<string, unknown> {
  return {
    catalogue: account && {
      rowsRead: account.rowsRead,
      kept: account.kept,
      setAside: account.setAside,
      reasons: account.reasons,
      repeatedPositions: account.repeatedPositions,
      columns: mapping,
    },
    // Both bounds are included.
    cuts: account && cuts.map(({ column, min, max }) => ({ column, min, max })),
    cosmology: {
      name: set?.key ?? null,
      ...cosmology.parameters,
      omegaDe0: cosmology.omegaDe0,
      omegaK0: cosmology.omegaK0,
    },
    region: footprint && {
      areaDeg2: footprint.areaDeg2,
      estimated: footprint.origin === 'estimated',
      ...(footprint.estimate === null ? {} : footprint.estimate),
      ...(region === null ? {} : { parts: region.parts, holes: region.holes }),
    },
    p0Mpc3PerH3,
    lengthUnit: units.perH ? 'Mpc/h' : 'Mpc',
  };
}

/** The ledger as a JSON value for scripts: what its metadata say, and every digit of the shells and of all as one. */
export function shellsJson<Row>(table: Table<Row>): unknown {
  return {
    ...table.meta,
    shells: asObjects(table),
    all: table.all == null ? null : asObject(table, table.all),
  };
}
