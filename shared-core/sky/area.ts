import { atan2, cos, sin } from '../numerics/elementary/elementary.ts';
import { type Arc, arcEnd, arcExtent, arcPoint, arcStart, pointOnCircle } from './arc.ts';
import { cross, dot, norm, SPREAD_DIRECTIONS, subtract, unit, type Vec3 } from './vectors.ts';

/** Arcs are cut no longer than this, so that no piece is near half a turn. */
const MAX_PIECE_RAD = Math.PI / 6;

/**
 * Signed area in steradians of the great-circle triangle a, b, c: positive when counter-clockwise seen from outside.
 * tan(E/2) = a.(b x c) / (1 + a.b + b.c + c.a) (Eriksson 1990, Math. Mag. 63, 184), the triple product taken of
 * differences so that small triangles keep their digits.
 */
export function triangleArea(a: Vec3, b: Vec3, c: Vec3): number {
  const triple = dot(a, cross(subtract(b, a), subtract(c, a)));
  return 2 * atan2(triple, 1 + dot(a, b) + dot(b, c) + dot(c, a));
}

/**
 * Area in steradians between an arc of a circle and its great-circle chord, positive when the arc bulges to its right.
 * The sector about the circle's nearer pole, t (1 - cos r), less the triangle of that pole and the two ends,
 * tan(E/2) = q sin t / (1 + q cos t) with q = tan^2(r/2) (two sides and the angle between them; Todhunter 1886, art. 103).
 */
function segmentArea(d: number, r: number, sweep: number): number {
  if (d === 0) return 0;
  // 1 - |d| without cancellation for small circles.
  const versine = (r * r) / (1 + Math.abs(d));
  const q = versine / (1 + Math.abs(d));
  const triangle = 2 * atan2(q * sin(sweep), 1 + q * cos(sweep));
  // About the far pole the arc runs clockwise, and bulges to its left.
  return Math.sign(d) * (sweep * versine - triangle);
}

/** Signed area swept by the great circle from `apex` to a point that travels along the arc. */
function fanArea(apex: Vec3, arc: Arc): number {
  const { circle, startRad, sweepRad } = arc;
  const pieces = Math.ceil(sweepRad / MAX_PIECE_RAD);
  const sweep = sweepRad / pieces;
  let area = pieces * segmentArea(circle.d, circle.r, sweep);
  let from = arcStart(arc);
  for (let i = 1; i <= pieces; i++) {
    const to = i === pieces ? arcEnd(arc) : pointOnCircle(circle, startRad + i * sweep);
    area += triangleArea(apex, from, to);
    from = to;
  }
  return area;
}

/** Sine of the distance that the antipode of the fan's apex must keep from the boundary. */
const CLEARANCE = 0.02;

function clearanceOfAntipode(apex: Vec3, arcs: readonly Arc[]): number {
  let least = 2;
  for (const arc of arcs) least = Math.min(least, 1 + arcExtent(arc, apex).min);
  // 1 - cos(distance) of the nearest boundary point.
  return least;
}

/** A point well placed for a fan over the ring: near it if that will do, so that small rings keep their digits. */
function chooseApex(arcs: readonly Arc[]): Vec3 {
  let sum: Vec3 = [0, 0, 0];
  for (const arc of arcs) {
    for (const part of [0.25, 0.75]) {
      const p = arcPoint(arc, part);
      const w = arc.sweepRad * arc.circle.r;
      sum = [sum[0] + w * p[0], sum[1] + w * p[1], sum[2] + w * p[2]];
    }
  }
  const near = norm(sum) > 0 ? unit(sum) : SPREAD_DIRECTIONS[0]!;
  const enough = (CLEARANCE * CLEARANCE) / 2;
  if (clearanceOfAntipode(near, arcs) > enough) return near;
  let best = near;
  let most = 0;
  for (const direction of SPREAD_DIRECTIONS) {
    const clear = clearanceOfAntipode(direction, arcs);
    if (clear > most) {
      most = clear;
      best = direction;
    }
  }
  return best;
}

/**
 * Area in steradians on the left of one closed ring of arcs, up to a multiple of 4 pi: a ring that runs clockwise
 * about a small patch gives minus the patch's area. Exact for great- and small-circle arcs (closed forms throughout).
 */
export function ringArea(arcs: readonly Arc[]): number {
  const apex = chooseApex(arcs);
  let area = 0;
  for (const arc of arcs) area += fanArea(apex, arc);
  return area;
}

/** Areas in [0, 4 pi] on the left and on the right of rings whose ringArea add up to `sum`; the smaller keeps its digits. */
export function bothSides(sum: number): { leftSr: number; rightSr: number } {
  const whole = 4 * Math.PI;
  const signed = sum % whole;
  return signed >= 0
    ? { leftSr: signed, rightSr: whole - signed }
    : { leftSr: whole + signed, rightSr: -signed };
}
