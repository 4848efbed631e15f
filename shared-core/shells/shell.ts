/** What one redshift shell is worth. Distances and volumes in Mpc, times in Gyr. */
export interface ShellStatistics {
  readonly zMin: number;
  readonly zMax: number;
  /** Galaxies with zMin <= z < zMax (the last shell takes z = zMax too). */
  readonly count: number;
  readonly weightedCount: number;
  /** Of the galaxies, unweighted; null in an empty shell. */
  readonly zMean: number | null;
  readonly zMedian: number | null;
  /** sum(w z)/sum(w), w = weight / (1 + n(z) P0); null in an empty shell. */
  readonly zEffective: number | null;
  readonly comovingMinMpc: number;
  readonly comovingMaxMpc: number;
  readonly lookbackMinGyr: number;
  readonly lookbackMaxGyr: number;
  readonly ageMinGyr: number;
  readonly ageMaxGyr: number;
  readonly volumeMpc3: number;
  readonly densityPerMpc3: number;
  /** Poisson: sqrt(sum w^2) / V. */
  readonly densityErrorPerMpc3: number;
  /** Integral of (nP0/(1+nP0))^2 dV, with n(z) resolved in slices. */
  readonly effectiveVolumeMpc3: number;
  /** The same with one mean density for the shell. */
  readonly effectiveVolumeUniformMpc3: number;
  /** 2 pi / V^(1/3). */
  readonly fundamentalWavenumberPerMpc: number;
}

/** How the shells' edges come about. */
export type ShellScheme =
  | { readonly kind: 'edges'; readonly edges: readonly number[] }
  | {
      readonly kind: 'redshift' | 'comoving' | 'lookback' | 'volume' | 'count';
      readonly shells: number;
      /** Default: the least and greatest redshift kept. */
      readonly zMin: number | null;
      readonly zMax: number | null;
    };
