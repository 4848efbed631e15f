import { cos, sin, square } from '../numerics/elementary/elementary.ts';
import { triangleArea } from './area.ts';
import { smallestCap } from './enclosingCap.ts';
import type { OutlineRing } from './region.ts';
import { combine, dot, norm, raDecToUnit, unit, type Vec3 } from './vectors.ts';

/** One ring of an outline as points, with the cap that holds it. */
export interface Piece {
  readonly ring: OutlineRing;
  readonly points: readonly Vec3[];
  readonly centre: Vec3;
  readonly radiusRad: number;
  /** Steradians inside the ring; negative for a ring around a hole. */
  readonly areaSr: number;
}

/** cos 85 deg: rings that reach farther than this from their middle are not held by any useful cap. */
const FARTHEST_COS = cos((85 * Math.PI) / 180);

/** The ring made ready; null when it reaches around the sky, more than 85 degrees from its middle. */
export function pieceOf(ring: OutlineRing): Piece | null {
  const points = Array.from(ring.raDeg, (raDeg, i) => raDecToUnit(raDeg, ring.decDeg[i]!));
  let sum: Vec3 = [0, 0, 0];
  for (const p of points) sum = combine(1, sum, 1, p);
  if (norm(sum) < 1e-9 * points.length) return null;
  const middle = unit(sum);
  if (points.some((p) => dot(middle, p) < FARTHEST_COS)) return null;
  const { centre, radiusRad } = smallestCap(points);
  let areaSr = 0;
  points.forEach((p, i) => {
    areaSr += triangleArea(middle, p, points[(i + 1) % points.length]!);
  });
  return { ring, points, centre, radiusRad, areaSr };
}

/** Whether some point of one lies within `limitRad` of some point of the other. */
export function piecesNear(a: Piece, b: Piece, limitRad: number): boolean {
  // Chords are shorter than arcs, so these reject safely without any trigonometry.
  if (chord2(a.centre, b.centre) > square(a.radiusRad + b.radiusRad + limitRad)) return false;
  const limit2 = square(2 * sin(limitRad / 2));
  for (const p of a.points) {
    if (chord2(p, b.centre) > square(b.radiusRad + limitRad)) continue;
    for (const q of b.points) if (chord2(p, q) <= limit2) return true;
  }
  return false;
}

/** Whether the cap that holds `outer` holds all of `inner` too. */
export function pieceHolds(outer: Piece, inner: Piece): boolean {
  const least = cos(Math.min(Math.PI, outer.radiusRad + 1e-9));
  return inner.points.every((p) => dot(outer.centre, p) >= least - 1e-12);
}

function chord2(a: Vec3, b: Vec3): number {
  const x = a[0] - b[0];
  const y = a[1] - b[1];
  const z = a[2] - b[2];
  return x * x + y * y + z * z;
}
