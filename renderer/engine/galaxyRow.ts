import type { Catalogue } from '../../shared-core/catalogue/catalogue.ts';
import type { GalaxyRow } from './protocol.ts';
import type { NamedColumn } from './stages/columnRows.ts';

/** Everything known of one row of the catalogue; `columns` are those read for colours. */
export function galaxyRow(catalogue: Catalogue, row: number, columns: readonly NamedColumn[]): GalaxyRow {
  return {
    line: catalogue.line[row]!,
    raDeg: catalogue.raDeg[row]!,
    decDeg: catalogue.decDeg[row]!,
    redshift: catalogue.redshift[row]!,
    weight: catalogue.weight?.[row] ?? null,
    magnitude: catalogue.magnitude?.[row] ?? null,
    extras: [
      ...[...catalogue.extras].map(([column, values]) => [column, values[row]!] as const),
      ...columns
        .filter(({ column }) => !catalogue.extras.has(column))
        .map(({ column, rows }) => [column, rows[row]!] as const),
    ],
  };
}
