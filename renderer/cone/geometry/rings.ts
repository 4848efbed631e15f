import type { OutlineRing } from '../../../shared-core/sky/region.ts';
import { cross, direction, dot, norm, subtract, type Vec3 } from './vector.ts';

/** Unit vectors of a ring's points, three numbers each; a last point that repeats the first is dropped. */
export function ringDirections(ring: OutlineRing): Float64Array {
  const out: number[] = [];
  for (let i = 0; i < ring.raDeg.length; i++) {
    const d = direction(ring.raDeg[i]!, ring.decDeg[i]!);
    const n = out.length;
    // A repeated point has no direction of its own and would make an edge without length.
    if (n >= 3 && Math.hypot(d[0] - out[n - 3]!, d[1] - out[n - 2]!, d[2] - out[n - 1]!) < 1e-12) continue;
    out.push(...d);
  }
  const n = out.length;
  if (n > 3 && Math.hypot(out[0]! - out[n - 3]!, out[1]! - out[n - 2]!, out[2]! - out[n - 1]!) < 1e-12) {
    out.length = n - 3;
  }
  return Float64Array.from(out);
}

const at = (points: ArrayLike<number>, i: number): Vec3 => [
  points[3 * i]!,
  points[3 * i + 1]!,
  points[3 * i + 2]!,
];

/** Distance (chord) from p to the great-circle segment a-b, and on which side of it p lies (left is positive). */
function segmentSide(p: Vec3, a: Vec3, b: Vec3): { distance: number; side: number } {
  const n = cross(a, b);
  const length = norm(n);
  const side = length > 0 ? dot(p, n) / length : 0;
  const between = length > 0 && dot(cross(n, a), p) >= 0 && dot(cross(b, n), p) >= 0;
  const distance = between
    ? 2 * Math.sin(Math.asin(Math.min(1, Math.abs(side))) / 2)
    : Math.min(norm(subtract(p, a)), norm(subtract(p, b)));
  return { distance, side };
}

/**
 * How far p lies inside the region that the rings bound (interior to the left of each edge, seen from outside the
 * sphere): the chord to the nearest edge, negative outside. Rings as unit vectors, three numbers a point.
 */
export function depthInside(rings: readonly ArrayLike<number>[], p: Vec3): number {
  let best = Number.POSITIVE_INFINITY;
  let bestSide = 0;
  for (const ring of rings) {
    const n = ring.length / 3;
    for (let i = 0; i < n; i++) {
      const { distance, side } = segmentSide(p, at(ring, i), at(ring, (i + 1) % n));
      // At a corner two edges are equally near: the one that sees p at the steeper angle decides.
      const nearer = distance < best - 1e-12;
      const equal = Math.abs(distance - best) <= 1e-12 && Math.abs(side) > Math.abs(bestSide);
      if (nearer || equal) {
        best = Math.min(best, distance);
        bestSide = side;
      }
    }
  }
  return bestSide >= 0 ? best : -best;
}

/** Points spread evenly over the sphere (golden-angle spiral). */
function spiralPoint(i: number, count: number): Vec3 {
  const z = 1 - (2 * i + 1) / count;
  const r = Math.sqrt(1 - z * z);
  const angle = i * Math.PI * (3 - Math.sqrt(5));
  return [r * Math.cos(angle), r * Math.sin(angle), z];
}

/** A point outside the region, as far from its outline as a search over the sphere finds. */
export function pointOutside(rings: readonly ArrayLike<number>[]): Vec3 {
  let mean: Vec3 = [0, 0, 0];
  for (const ring of rings) {
    for (let i = 0; i < ring.length; i += 3) {
      mean = [mean[0] + ring[i]!, mean[1] + ring[i + 1]!, mean[2] + ring[i + 2]!];
    }
  }
  const length = norm(mean);
  let best: Vec3 = [0, 0, 1];
  let bestDepth = Number.POSITIVE_INFINITY;
  const consider = (p: Vec3): void => {
    const depth = depthInside(rings, p);
    if (depth < bestDepth) {
      best = p;
      bestDepth = depth;
    }
  };
  if (length > 1e-6) {
    consider([-mean[0] / length, -mean[1] / length, -mean[2] / length]);
    // An ordinary field: the antipode of its centre is far outside, and no search is needed.
    if (bestDepth < -1) return best;
    consider([mean[0] / length, mean[1] / length, mean[2] / length]);
  }
  const total = rings.reduce((sum, ring) => sum + ring.length / 3, 0);
  const samples = Math.max(100, Math.min(800, Math.floor(2e6 / Math.max(1, total))));
  for (let i = 0; i < samples; i++) consider(spiralPoint(i, samples));
  return best;
}
