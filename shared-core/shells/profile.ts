import { cube, exp, square } from '../numerics/elementary/elementary.ts';
import { rankBelow, type SortedSample } from './sample.ts';
import { type ShellConditions, WHOLE_SKY_DEG2 } from './statistics.ts';

/** The density along the line of sight in bins; arrays of one length, edges one longer. */
export interface DensityProfile {
  readonly zEdges: Float64Array;
  readonly count: Float64Array;
  readonly densityPerMpc3: Float64Array;
  /** The histogram smoothed with a Gaussian over neighbouring bins, galaxies and volumes alike. */
  readonly smoothPerMpc3: Float64Array;
  /** n P0 of the smoothed curve: above 1, counting noise is below the clustering signal. */
  readonly power: Float64Array;
}

/**
 * n(z) in bins, and a smooth curve through it: sum_j K_ij W_j / sum_j K_ij V_j with a Gaussian K in bin number.
 * @param zEdges ascending redshifts, at least two
 * @param smoothingBins standard deviation of the Gaussian, in bins; 0 leaves the histogram as it is
 */
export function densityProfile(
  sample: SortedSample,
  zEdges: Float64Array,
  smoothingBins: number,
  { cosmology, areaDeg2, p0Mpc3PerH3 }: ShellConditions,
): DensityProfile {
  const bins = zEdges.length - 1;
  const sky = areaDeg2 / WHOLE_SKY_DEG2;
  const weight = new Float64Array(bins);
  const count = new Float64Array(bins);
  const volumeMpc3 = new Float64Array(bins);
  let rank = rankBelow(sample, zEdges[0]!);
  for (let i = 0; i < bins; i++) {
    const next = rankBelow(sample, zEdges[i + 1]!, i === bins - 1);
    const sums = sample.weighted?.sumWeight;
    count[i] = next - rank;
    weight[i] = sums === undefined ? next - rank : sums[next]! - sums[rank]!;
    volumeMpc3[i] = sky * cosmology.shellVolumeAllSkyMpc3(zEdges[i]!, zEdges[i + 1]!);
    rank = next;
  }
  const p0Mpc3 = p0Mpc3PerH3 / cube(cosmology.h);
  const smoothPerMpc3 = smooth(weight, volumeMpc3, smoothingBins);
  return {
    zEdges,
    count,
    densityPerMpc3: weight.map((w, i) => w / volumeMpc3[i]!),
    smoothPerMpc3,
    power: smoothPerMpc3.map((n) => n * p0Mpc3),
  };
}

function smooth(weight: Float64Array, volume: Float64Array, sigma: number): Float64Array {
  const reach = Math.ceil(4 * sigma);
  return weight.map((_, i) => {
    let [w, v] = [0, 0];
    for (let j = Math.max(0, i - reach); j <= Math.min(weight.length - 1, i + reach); j++) {
      const kernel = sigma > 0 ? exp(-0.5 * square((i - j) / sigma)) : 1;
      w += kernel * weight[j]!;
      v += kernel * volume[j]!;
    }
    return w / v;
  });
}
