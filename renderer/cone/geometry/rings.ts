import type { OutlineRing } from '../../../shared-core/sky/region.ts';
import { cross, direction, dot, norm, type Vec3 } from './vector.ts';

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

/**
 * The same ring with fewer points: those that lie within the tolerance of the great circle between their neighbours
 * are left out, as long as no step gets longer than the limit.
 *
 * @param toleranceDeg,longestDeg angles on the sky
 */
export function simplerRing(ring: Float64Array, toleranceDeg: number, longestDeg: number): Float64Array {
  const n = ring.length / 3;
  if (n <= 8) return ring;
  const tolerance = Math.sin((toleranceDeg * Math.PI) / 180);
  const longest = Math.cos((longestDeg * Math.PI) / 180);
  const at = (i: number): Vec3 => {
    const k = 3 * (i % n);
    return [ring[k]!, ring[k + 1]!, ring[k + 2]!];
  };
  const out: number[] = [];
  let from = 0;
  while (from < n) {
    const a = at(from);
    out.push(...a);
    let to = from + 1;
    // As far ahead as one step can reach: everything between must lie on it.
    while (to < n) {
      const b = at(to + 1);
      if (dot(a, b) < longest) break;
      const normal = cross(a, b);
      const length = norm(normal);
      let fits = length > 0;
      for (let i = from + 1; fits && i <= to; i++) fits = Math.abs(dot(normal, at(i))) <= tolerance * length;
      if (!fits) break;
      to++;
    }
    from = to;
  }
  return out.length >= 9 ? Float64Array.from(out) : ring;
}

/** Chord from a point to the great-circle segment a-b, and on which side of it the point lies (left is positive). */
interface Side {
  distance: number;
  side: number;
}

/** Nearest segment of a ring so far, with the side on which it sees (x, y, z). Written out: it runs over every edge. */
function nearestSegment(ring: ArrayLike<number>, x: number, y: number, z: number, best: Side): void {
  const n = ring.length / 3;
  for (let i = 0; i < n; i++) {
    const k = 3 * i;
    const j = i === n - 1 ? 0 : k + 3;
    const [ax, ay, az] = [ring[k]!, ring[k + 1]!, ring[k + 2]!];
    const [bx, by, bz] = [ring[j]!, ring[j + 1]!, ring[j + 2]!];
    let nx = ay * bz - az * by;
    let ny = az * bx - ax * bz;
    let nz = ax * by - ay * bx;
    const length = Math.sqrt(nx * nx + ny * ny + nz * nz);
    if (length === 0) continue;
    nx /= length;
    ny /= length;
    nz /= length;
    const side = nx * x + ny * y + nz * z;
    // Between the ends: to the left of n x a and to the right of n x b.
    const pastA = (ny * az - nz * ay) * x + (nz * ax - nx * az) * y + (nx * ay - ny * ax) * z;
    const beforeB = (by * nz - bz * ny) * x + (bz * nx - bx * nz) * y + (bx * ny - by * nx) * z;
    let squared: number;
    if (pastA >= 0 && beforeB >= 0) squared = 2 - 2 * Math.sqrt(Math.max(0, 1 - side * side));
    else {
      const toA = (x - ax) ** 2 + (y - ay) ** 2 + (z - az) ** 2;
      const toB = (x - bx) ** 2 + (y - by) ** 2 + (z - bz) ** 2;
      squared = Math.min(toA, toB);
    }
    // At a corner two edges are equally near: the one that sees the point at the steeper angle decides.
    const nearer = squared < best.distance - 1e-12;
    const equal = Math.abs(squared - best.distance) <= 1e-12 && Math.abs(side) > Math.abs(best.side);
    if (nearer || equal) {
      best.distance = Math.min(best.distance, squared);
      best.side = side;
    }
  }
}

/**
 * How far p lies inside the region that the rings bound (interior to the left of each edge, seen from outside the
 * sphere): the chord to the nearest edge, negative outside. Rings as unit vectors, three numbers a point.
 */
export function depthInside(rings: readonly ArrayLike<number>[], p: Vec3): number {
  const best: Side = { distance: Number.POSITIVE_INFINITY, side: 0 };
  for (const ring of rings) nearestSegment(ring, p[0], p[1], p[2], best);
  const chord = Math.sqrt(best.distance);
  return best.side >= 0 ? chord : -chord;
}

/** Points spread evenly over the sphere (golden-angle spiral). */
function spiralPoint(i: number, count: number): Vec3 {
  const z = 1 - (2 * i + 1) / count;
  const r = Math.sqrt(1 - z * z);
  const angle = i * Math.PI * (3 - Math.sqrt(5));
  return [r * Math.cos(angle), r * Math.sin(angle), z];
}

/** Edges that a search over the sphere looks at; more would say little about what is far away. */
const SEARCH_EDGES = 400;
const SEARCH_POINTS = 300;

/** A point outside the region, about as far from its outline as there is. */
export function pointOutside(rings: readonly ArrayLike<number>[]): Vec3 {
  let mean: Vec3 = [0, 0, 0];
  for (const ring of rings) {
    for (let i = 0; i < ring.length; i += 3) {
      mean = [mean[0] + ring[i]!, mean[1] + ring[i + 1]!, mean[2] + ring[i + 2]!];
    }
  }
  const length = norm(mean);
  const found: { p: Vec3; depth: number }[] = [];
  if (length > 1e-6) {
    const antipode: Vec3 = [-mean[0] / length, -mean[1] / length, -mean[2] / length];
    // An ordinary field: the antipode of its centre is far outside, and no search is needed.
    if (depthInside(rings, antipode) < -1) return antipode;
  }
  const total = rings.reduce((sum, ring) => sum + ring.length / 3, 0);
  const coarse = rings.map((ring) => everyNth(ring, Math.ceil(total / SEARCH_EDGES)));
  const candidates = Array.from({ length: SEARCH_POINTS }, (_, i) => spiralPoint(i, SEARCH_POINTS));
  if (length > 1e-6) candidates.push([mean[0] / length, mean[1] / length, mean[2] / length]);
  for (const p of candidates) found.push({ p, depth: depthInside(coarse, p) });
  found.sort((a, b) => a.depth - b.depth);
  // The coarse outline may err near the true one: the first that is outside of that too.
  return (found.find(({ p }) => depthInside(rings, p) < 0) ?? found[0]!).p;
}

function everyNth(ring: ArrayLike<number>, n: number): Float64Array {
  const points = ring.length / 3;
  const step = Math.max(1, Math.min(n, Math.floor(points / 8)));
  const out: number[] = [];
  for (let i = 0; i < points; i += step) out.push(ring[3 * i]!, ring[3 * i + 1]!, ring[3 * i + 2]!);
  return Float64Array.from(out);
}
