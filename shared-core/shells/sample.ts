import { argsort } from '../numerics/sorting.ts';
import { runningSums } from '../numerics/sums.ts';

/**
 * Galaxies sorted by redshift with running sums, so that any shell's numbers cost a few binary searches.
 * Running sums have one element more than there are galaxies; element i is the sum over the first i.
 */
export interface SortedSample {
  readonly count: number;
  /** Ascending. */
  readonly redshift: Float64Array;
  /** order[i]: index, in the arrays given, of the i-th galaxy by redshift. */
  readonly order: Uint32Array;
  readonly sumRedshift: Float64Array;
  /** Null where every galaxy weighs 1. */
  readonly weighted: {
    readonly sumWeight: Float64Array;
    readonly sumWeightSquared: Float64Array;
    readonly sumWeightRedshift: Float64Array;
  } | null;
}

/**
 * Sorts and sums a sample.
 * @param redshift of every galaxy, finite
 * @param weight of every galaxy (same length), or null when all weigh 1
 * @param indices which of them belong to the sample; null takes all
 */
export function sortSample(
  redshift: Float64Array,
  weight: Float64Array | null,
  indices: Uint32Array | null = null,
): SortedSample {
  // Weights that are all 1 change nothing, and leaving them out saves half the memory.
  if (weight?.every((w) => w === 1)) return sortSample(redshift, null, indices);
  const chosen = indices === null ? redshift : gather(redshift, indices);
  const order = argsort(chosen);
  const sorted = gather(chosen, order);
  if (indices !== null) for (let i = 0; i < order.length; i++) order[i] = indices[order[i]!]!;
  if (weight !== null) orderTiesByWeight(sorted, order, weight);
  const sumRedshift = runningSums(sorted);
  const weighted = weight === null ? null : weightSums(gather(weight, order), sorted);
  return { count: sorted.length, redshift: sorted, order, sumRedshift, weighted };
}

/** How many galaxies of the sample have a redshift below z (or, with `orEqual`, not above it). */
export function rankBelow(sample: SortedSample, z: number, orEqual = false): number {
  const { redshift } = sample;
  let low = 0;
  let high = redshift.length;
  while (low < high) {
    const middle = (low + high) >>> 1;
    const value = redshift[middle]!;
    if (value < z || (orEqual && value === z)) low = middle + 1;
    else high = middle;
  }
  return low;
}

function weightSums(weight: Float64Array, redshift: Float64Array): SortedSample['weighted'] {
  return {
    sumWeight: runningSums(weight),
    sumWeightSquared: runningSums(weight.map((w) => w * w)),
    sumWeightRedshift: runningSums(weight.map((w, i) => w * redshift[i]!)),
  };
}

function gather(values: Float64Array, indices: Uint32Array): Float64Array {
  const out = new Float64Array(indices.length);
  for (let i = 0; i < indices.length; i++) out[i] = values[indices[i]!]!;
  return out;
}

function allAlike(weight: Float64Array, order: Uint32Array, start: number, end: number): boolean {
  for (let i = start + 1; i < end; i++) if (weight[order[i]!] !== weight[order[start]!]) return false;
  return true;
}

// Rows of one redshift keep the order of the file after a stable sort; by weight instead, the running sums
// (and with them the last digit of every number) do not depend on the order of the file's rows.
function orderTiesByWeight(sorted: Float64Array, order: Uint32Array, weight: Float64Array): void {
  for (let start = 0; start < sorted.length; ) {
    let end = start + 1;
    while (end < sorted.length && sorted[end] === sorted[start]) end++;
    if (end - start > 1 && !allAlike(weight, order, start, end))
      order.subarray(start, end).sort((a, b) => weight[a]! - weight[b]! || a - b);
    start = end;
  }
}
