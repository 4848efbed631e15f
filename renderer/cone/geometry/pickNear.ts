import type { PickIndex } from '../points/pickIndex.ts';
import type { PointArrays } from '../points/pointArrays.ts';
import type { PointHit } from './pickPoint.ts';

/**
 * What `pickPoint` finds, from an index of the galaxies: radii rise with comoving distance, as every scale has them.
 *
 * Method: along a direction the offset from the pixel and the depth w are both linear in the radius, so the radii at
 * which a cell of the sky can come within reach of the pixel are an interval; only those galaxies are looked at.
 *
 * @param matrix sky direction times radius to pixels, three rows of four
 * @param best a hit of an earlier call: only something nearer replaces it
 */
export function pickNear(
  arrays: PointArrays,
  { slots, starts, caps }: PickIndex,
  matrix: ArrayLike<number>,
  xPx: number,
  yPx: number,
  reachPx: number,
  best: PointHit | null = null,
): PointHit | null {
  const { x, y, z, radius } = arrays;
  const m = Float64Array.from(matrix);
  // Rows of the offsets times w, and of w.
  const row = (first: number, times: number) => [0, 1, 2, 3].map((k) => m[first + k]! - times * m[8 + k]!);
  const across = row(0, xPx);
  const down = row(4, yPx);
  const w = row(8, 0);
  const lengths = [across, down, w].map(([a, b, c]) => Math.hypot(a!, b!, c!)) as [number, number, number];
  const along = ([a, b, c]: number[], dx: number, dy: number, dz: number) => a! * dx + b! * dy + c! * dz;
  let found = best;
  for (let cell = 0; cell + 1 < starts.length; cell++) {
    const [cx, cy, cz] = [caps[4 * cell]!, caps[4 * cell + 1]!, caps[4 * cell + 2]!];
    const spread = caps[4 * cell + 3]!;
    const reach = found ? Math.sqrt(found.distance2) : reachPx;
    const slack = reach * (along(w, cx, cy, cz) + spread * lengths[2]);
    const span: [number, number] = [0, Number.POSITIVE_INFINITY];
    for (const [i, offset] of [across, down].entries()) {
      const slope = along(offset, cx, cy, cz);
      const wide = slack + spread * lengths[i as 0 | 1];
      // -(s + t r) <= p + q r <= s + t r
      narrow(span, reach * w[3]! + offset[3]!, wide + slope);
      narrow(span, reach * w[3]! - offset[3]!, wide - slope);
    }
    if (!(span[0] <= span[1])) continue;
    const end = starts[cell + 1]!;
    for (let k = firstFrom(slots, radius, starts[cell]!, end, span[0]); k < end; k++) {
      const s = slots[k]!;
      const r = radius[s]!;
      if (r > span[1]) break;
      const [dx, dy, dz] = [x[s]!, y[s]!, z[s]!];
      const depth = r * along(w, dx, dy, dz) + w[3]!;
      if (!(depth > 0.02)) continue;
      const ex = (r * along(across, dx, dy, dz) + across[3]!) / depth;
      const ey = (r * along(down, dx, dy, dz) + down[3]!) / depth;
      const distance2 = ex * ex + ey * ey;
      if (distance2 < (found ? found.distance2 : reachPx * reachPx))
        found = { slot: s, distance2, xPx: xPx + ex, yPx: yPx + ey };
    }
  }
  return found;
}

/** Keeps the radii r at which s + t r >= 0; a little is given way for 32-bit positions. */
function narrow(span: [number, number], s: number, t: number): void {
  const margin = 1e-6 * (Math.abs(s) + Math.abs(t));
  const at = -(s + margin) / t;
  if (t > 0) span[0] = Math.max(span[0], at);
  else if (t < 0) span[1] = Math.min(span[1], at);
  else if (s + margin < 0) span[1] = -1;
}

/** The first place whose radius is no less than a value. */
function firstFrom(
  slots: Uint32Array,
  radius: Float32Array,
  from: number,
  end: number,
  value: number,
): number {
  let [low, high] = [from, end];
  while (low < high) {
    const middle = (low + high) >> 1;
    if (radius[slots[middle]!]! < value) low = middle + 1;
    else high = middle;
  }
  return low;
}
