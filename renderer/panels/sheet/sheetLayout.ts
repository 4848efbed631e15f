/** How the sheet lays out the numbers of a shell: edges in two columns, the rest one below the other. */
export const EDGE_ROWS = [
  { name: 'redshift', near: 'zMin', far: 'zMax' },
  { name: 'comoving distance', near: 'comovingMinMpc', far: 'comovingMaxMpc' },
  { name: 'lookback time', near: 'lookbackMinGyr', far: 'lookbackMaxGyr' },
  { name: 'age of the universe', near: 'ageMinGyr', far: 'ageMaxGyr' },
] as const;

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
