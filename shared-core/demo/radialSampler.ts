import type { DepthAxis } from './depthAxis.ts';

/** Draws comoving distances with a given density along the axis. */
export interface RadialSampler {
  /** Distance (Mpc) below which the share u of all lies, 0 <= u < 1. */
  distanceMpc(u: number): number;
}

const ENTRIES = 4096;

/**
 * Inverts the cumulative sum of `weight` (one number a knot of the axis, per Mpc, not below 0) into an even table,
 * so that a draw costs one look-up.
 */
export function createRadialSampler(axis: DepthAxis, weight: Float64Array): RadialSampler {
  const knots = weight.length;
  const cumulative = new Float64Array(knots);
  for (let i = 1; i < knots; i++) cumulative[i] = cumulative[i - 1]! + (weight[i - 1]! + weight[i]!) / 2;
  const total = cumulative[knots - 1]!;
  const distance = new Float64Array(ENTRIES + 1);
  for (let j = 0, i = 0; j <= ENTRIES; j++) {
    const wanted = (j / ENTRIES) * total;
    while (i < knots - 2 && cumulative[i + 1]! < wanted) i++;
    const rise = cumulative[i + 1]! - cumulative[i]!;
    const within = rise > 0 ? (wanted - cumulative[i]!) / rise : 0;
    distance[j] = axis.fromMpc + (i + within) * axis.stepMpc;
  }
  return {
    distanceMpc(u) {
      const at = u * ENTRIES;
      const j = Math.floor(at);
      return distance[j]! + (at - j) * (distance[j + 1]! - distance[j]!);
    },
  };
}
