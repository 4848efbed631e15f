import { Refusal } from '../base/refusal.ts';
import type { Cosmology } from '../cosmology/cosmology.ts';
import { cbrt, cube, square } from '../numerics/elementary/elementary.ts';
import { checkEdges } from './edges.ts';
import { rankBelow, type SortedSample } from './sample.ts';
import type { ShellStatistics } from './shell.ts';

/** Whole sphere, square degrees: 4 pi (180/pi)^2. */
export const WHOLE_SKY_DEG2 = 4 * Math.PI * square(180 / Math.PI);
/** Default P0 of the FKP weight, (Mpc/h)^3: common practice for galaxies near k = 0.1 h/Mpc, no source. */
export const DEFAULT_P0_MPC3_PER_H3 = 10_000;

const FEWEST_IN_SLICE = 50;
const MOST_SLICES = 32;

export interface ShellConditions {
  readonly cosmology: Cosmology;
  readonly areaDeg2: number;
  /** Power at which the effective volume is taken, (Mpc/h)^3. */
  readonly p0Mpc3PerH3: number;
}

/**
 * What each shell between the edges is worth.
 *
 * n(z) is resolved in slices of equal redshift width inside each shell, as many as leave 50 galaxies to a slice
 * on average, at most 32. With n_s the (weighted) number density of slice s and V_s its volume:
 * V_eff = sum_s [n_s P0/(1 + n_s P0)]^2 V_s (Feldman, Kaiser & Peacock 1994, ApJ 426, 23, weights of eq. 2.3.4;
 * Tegmark 1997, PRL 79, 3806), and z_eff = sum w z / sum w over galaxies with w = weight/(1 + n_s P0).
 * V = area/(4 pi) [V_C(zMax) - V_C(zMin)] with V_C the all-sky comoving volume (Hogg 1999, eq. 29).
 *
 * @param edges ascending redshifts in 0..1100, at least two
 * @throws Refusal ('use') for unusable edges, area (0 < area <= whole sky) or P0 (> 0)
 */
export function shellStatistics(
  sample: SortedSample,
  edges: readonly number[],
  conditions: ShellConditions,
): ShellStatistics[] {
  checkEdges(edges);
  const { areaDeg2, p0Mpc3PerH3 } = conditions;
  if (!(p0Mpc3PerH3 > 0 && Number.isFinite(p0Mpc3PerH3)))
    throw new Refusal(`P0 is ${p0Mpc3PerH3}, expected a number above 0 in (Mpc/h)^3, such as 10000.`, 'use');
  if (!(areaDeg2 > 0 && areaDeg2 <= WHOLE_SKY_DEG2 * (1 + 1e-12)))
    throw new Refusal(
      `The region's area is ${areaDeg2} square degrees, expected above 0 and at most ${WHOLE_SKY_DEG2.toFixed(2)}: check the region.`,
      'use',
    );
  return edges.slice(1).map((zMax, i) => {
    const last = i === edges.length - 2;
    return oneShell(sample, edges[i]!, zMax, last, conditions);
  });
}

/** All shells as one, from the first edge to the last: what shellStatistics says of that one shell. */
export function allAsOne(
  sample: SortedSample,
  edges: readonly number[],
  conditions: ShellConditions,
): ShellStatistics {
  return shellStatistics(sample, [edges[0]!, edges.at(-1)!], conditions)[0]!;
}

function oneShell(
  sample: SortedSample,
  zMin: number,
  zMax: number,
  last: boolean,
  { cosmology, areaDeg2, p0Mpc3PerH3 }: ShellConditions,
): ShellStatistics {
  const sky = areaDeg2 / WHOLE_SKY_DEG2;
  const p0Mpc3 = p0Mpc3PerH3 / cube(cosmology.h);
  const from = rankBelow(sample, zMin);
  const to = rankBelow(sample, zMax, last);
  const count = to - from;
  const weightedCount = sumOfWeights(sample, from, to);
  const volumeMpc3 = sky * cosmology.shellVolumeAllSkyMpc3(zMin, zMax);
  const densityPerMpc3 = weightedCount / volumeMpc3;

  let effectiveVolumeMpc3 = 0;
  let sumW = 0;
  let sumWz = 0;
  const slices = Math.min(MOST_SLICES, Math.max(1, Math.floor(count / FEWEST_IN_SLICE)));
  let start = from;
  let startZ = zMin;
  for (let s = 1; s <= slices; s++) {
    const z = s === slices ? zMax : zMin + ((zMax - zMin) * s) / slices;
    const end = s === slices ? to : rankBelow(sample, z);
    const sliceMpc3 = slices === 1 ? volumeMpc3 : sky * cosmology.shellVolumeAllSkyMpc3(startZ, z);
    const weight = sumOfWeights(sample, start, end);
    const power = (weight / sliceMpc3) * p0Mpc3;
    effectiveVolumeMpc3 += sliceMpc3 * square(power / (1 + power));
    sumW += weight / (1 + power);
    sumWz += sumOfWeightedRedshifts(sample, start, end) / (1 + power);
    start = end;
    startZ = z;
  }
  const meanPower = densityPerMpc3 * p0Mpc3;
  return {
    zMin,
    zMax,
    count,
    weightedCount,
    zMean: count === 0 ? null : (sample.sumRedshift[to]! - sample.sumRedshift[from]!) / count,
    zMedian: count === 0 ? null : median(sample.redshift, from, to),
    zEffective: sumW > 0 ? sumWz / sumW : null,
    comovingMinMpc: cosmology.comovingMpc(zMin),
    comovingMaxMpc: cosmology.comovingMpc(zMax),
    lookbackMinGyr: cosmology.lookbackGyr(zMin),
    lookbackMaxGyr: cosmology.lookbackGyr(zMax),
    ageMinGyr: cosmology.ageGyr(zMin),
    ageMaxGyr: cosmology.ageGyr(zMax),
    volumeMpc3,
    densityPerMpc3,
    densityErrorPerMpc3: Math.sqrt(sumOfSquaredWeights(sample, from, to)) / volumeMpc3,
    effectiveVolumeMpc3,
    effectiveVolumeUniformMpc3: volumeMpc3 * square(meanPower / (1 + meanPower)),
    fundamentalWavenumberPerMpc: (2 * Math.PI) / cbrt(volumeMpc3),
  };
}

function sumOfWeights({ weighted }: SortedSample, from: number, to: number): number {
  return weighted === null ? to - from : weighted.sumWeight[to]! - weighted.sumWeight[from]!;
}

function sumOfSquaredWeights({ weighted }: SortedSample, from: number, to: number): number {
  return weighted === null ? to - from : weighted.sumWeightSquared[to]! - weighted.sumWeightSquared[from]!;
}

function sumOfWeightedRedshifts({ weighted, sumRedshift }: SortedSample, from: number, to: number): number {
  const sums = weighted === null ? sumRedshift : weighted.sumWeightRedshift;
  return sums[to]! - sums[from]!;
}

function median(sorted: Float64Array, from: number, to: number): number {
  const middle = (from + to) >>> 1;
  if ((to - from) % 2 === 1) return sorted[middle]!;
  const below = sorted[middle - 1]!;
  return below + (sorted[middle]! - below) / 2;
}
