import type { RadialReading } from '../../../shared-core/study/schema.ts';

/** How the sheet lays out the numbers of a shell: edges in two columns, the rest one below the other. */
export const EDGE_ROWS = [
  { name: 'redshift', typedIn: 'redshift', near: 'zMin', far: 'zMax' },
  { name: 'comoving distance', typedIn: 'comoving', near: 'comovingMinMpc', far: 'comovingMaxMpc' },
  { name: 'lookback time', typedIn: 'lookback', near: 'lookbackMinGyr', far: 'lookbackMaxGyr' },
  { name: 'age of the universe', typedIn: 'redshift', near: 'ageMinGyr', far: 'ageMaxGyr' },
] as const;

/** The field that moves the edge whose number is explained. */
export const MOVE_EDGE_ID = 'move-this-edge';

/** Which edge a number of a shell (null: of all as one) tells the place of, and in what it is best typed. */
export function edgeTold(
  key: string,
  shell: number | null,
  shells: number,
): { readonly index: number; readonly unit: RadialReading } | null {
  const row = EDGE_ROWS.find(({ near, far }) => near === key || far === key);
  if (row === undefined) return null;
  const near = row.near === key;
  const index = shell === null ? (near ? 0 : shells) : near ? shell : shell + 1;
  return { index, unit: row.typedIn };
}

export const SHEET_GROUPS = [
  {
    title: 'Galaxies',
    rows: [
      { key: 'count', name: 'galaxies N' },
      { key: 'weightedCount', name: 'sum of weights' },
      { key: 'zMean', name: 'mean redshift' },
      { key: 'zMedian', name: 'median redshift' },
      { key: 'zEffective', name: 'effective redshift' },
    ],
  },
  {
    title: 'Worth',
    rows: [
      { key: 'volumeMpc3', name: 'volume V' },
      { key: 'densityPerMpc3', name: 'density n' },
      { key: 'densityErrorPerMpc3', name: 'Poisson error of n' },
      { key: 'effectiveVolumeMpc3', name: 'effective volume V eff' },
      { key: 'effectiveVolumeUniformMpc3', name: 'V eff uniform' },
      { key: 'fundamentalWavenumberPerMpc', name: 'fundamental k' },
    ],
  },
] as const;

/** Every key that the sheet shows, so that a test can hold it against the core's list. */
export const SHEET_KEYS: readonly string[] = [
  ...EDGE_ROWS.flatMap((row) => [row.near, row.far]),
  ...SHEET_GROUPS.flatMap((group) => group.rows.map((row) => row.key)),
];
