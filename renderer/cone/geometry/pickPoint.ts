import type { PointArrays } from '../points/pointArrays.ts';

/** A galaxy near the pointer. */
export interface PointHit {
  readonly slot: number;
  /** Squared distance in pixels. */
  readonly distance2: number;
  readonly xPx: number;
  readonly yPx: number;
}

/**
 * The galaxy drawn nearest to a pixel, within `reachPx`; null when there is none. Slots from..to (end excluded).
 *
 * @param matrix sky direction times radius to pixels, three rows of four
 * @param best a hit of an earlier call: only something nearer replaces it
 */
export function pickPoint(
  arrays: PointArrays,
  matrix: ArrayLike<number>,
  from: number,
  to: number,
  xPx: number,
  yPx: number,
  reachPx: number,
  best: PointHit | null = null,
): PointHit | null {
  const { x, y, z, radius } = arrays;
  const m = Float64Array.from(matrix);
  const [a0, a1, a2, a3] = [m[0]!, m[1]!, m[2]!, m[3]!];
  const [b0, b1, b2, b3] = [m[4]!, m[5]!, m[6]!, m[7]!];
  const [c0, c1, c2, c3] = [m[8]!, m[9]!, m[10]!, m[11]!];
  let least = best ? best.distance2 : reachPx * reachPx;
  let slot = -1;
  for (let s = from; s < to; s++) {
    const r = radius[s]!;
    const dx = x[s]!;
    const dy = y[s]!;
    const dz = z[s]!;
    const w = r * (c0 * dx + c1 * dy + c2 * dz) + c3;
    // Distances are compared times w, which spares a division for all but the near ones.
    const ex = r * (a0 * dx + a1 * dy + a2 * dz) + a3 - xPx * w;
    const ey = r * (b0 * dx + b1 * dy + b2 * dz) + b3 - yPx * w;
    if (ex * ex + ey * ey < least * w * w && w > 0.02) {
      least = (ex * ex + ey * ey) / (w * w);
      slot = s;
    }
  }
  if (slot < 0) return best;
  const r = radius[slot]!;
  const w = r * (c0 * x[slot]! + c1 * y[slot]! + c2 * z[slot]!) + c3;
  return {
    slot,
    distance2: least,
    xPx: (r * (a0 * x[slot]! + a1 * y[slot]! + a2 * z[slot]!) + a3) / w,
    yPx: (r * (b0 * x[slot]! + b1 * y[slot]! + b2 * z[slot]!) + b3) / w,
  };
}
