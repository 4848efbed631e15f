import { atan2, cos, hypot, sin } from '../numerics/elementary/elementary.ts';
import { combine, cross, dot, perpendicular, RAD_PER_DEG, unit, type Vec3 } from './vectors.ts';

/**
 * A circle on the sphere with a direction: the points x with n.x = d, run counter-clockwise about n as seen
 * from outside, so that the side on its left is the cap n.x > d. d = 0 is a great circle.
 * A point at parameter t is d n + r (u cos t + v sin t), with u, v, n right-handed.
 */
export interface Circle {
  readonly n: Vec3;
  readonly d: number;
  /** Radius in its own plane: sqrt(1 - d^2), kept apart because that loses digits for small circles. */
  readonly r: number;
  readonly u: Vec3;
  readonly v: Vec3;
}

/** Part of a circle, from startRad counter-clockwise over sweepRad, 0 < sweepRad <= 2 pi. */
export interface Arc {
  readonly circle: Circle;
  readonly startRad: number;
  readonly sweepRad: number;
}

export const TWO_PI = 2 * Math.PI;

/** The circle at `radiusDeg` (0 to 180, ends not taken) around `n`; u may be given, at right angles to n. */
export function circleAround(n: Vec3, radiusDeg: number, u: Vec3 = perpendicular(n)): Circle {
  const radius = radiusDeg * RAD_PER_DEG;
  const d = radiusDeg === 90 ? 0 : cos(radius);
  return { n, d, r: sin(radius), u, v: cross(n, u) };
}

/** The same circle run the other way; the point at parameter t is then at -t. */
export function reverseCircle(circle: Circle): Circle {
  const { n, v } = circle;
  return {
    n: [-n[0], -n[1], -n[2]],
    d: -circle.d,
    r: circle.r,
    u: circle.u,
    v: [-v[0], -v[1], -v[2]],
  };
}

export function reverseArc(arc: Arc): Arc {
  return {
    circle: reverseCircle(arc.circle),
    startRad: -(arc.startRad + arc.sweepRad),
    sweepRad: arc.sweepRad,
  };
}

/** The shorter great-circle arc from unit vector a to unit vector b, which are neither equal nor opposite. */
export function greatCircleArc(a: Vec3, b: Vec3): Arc {
  // (b - a) x (b + a) = 2 a x b: no digits are lost when a and b are close (Kahan).
  const n = unit(cross([a[0] - b[0], a[1] - b[1], a[2] - b[2]], [a[0] + b[0], a[1] + b[1], a[2] + b[2]]));
  const v = cross(n, a);
  return {
    circle: { n, d: 0, r: 1, u: a, v },
    startRad: 0,
    sweepRad: atan2(dot(v, b), dot(a, b)),
  };
}

export function pointOnCircle(circle: Circle, t: number): Vec3 {
  const c = circle.r * cos(t);
  const s = circle.r * sin(t);
  const { n, d, u, v } = circle;
  return [d * n[0] + c * u[0] + s * v[0], d * n[1] + c * u[1] + s * v[1], d * n[2] + c * u[2] + s * v[2]];
}

export function arcStart(arc: Arc): Vec3 {
  return pointOnCircle(arc.circle, arc.startRad);
}

export function arcEnd(arc: Arc): Vec3 {
  return pointOnCircle(arc.circle, arc.startRad + arc.sweepRad);
}

export function arcPoint(arc: Arc, fraction: number): Vec3 {
  return pointOnCircle(arc.circle, arc.startRad + fraction * arc.sweepRad);
}

/** Unit tangent in the direction of travel. */
export function tangent(circle: Circle, t: number): Vec3 {
  return combine(-sin(t), circle.u, cos(t), circle.v);
}

/** Parameter in (-pi, pi] of a point on (or near) the circle. */
export function parameterOf(circle: Circle, point: Vec3): number {
  return atan2(dot(circle.v, point), dot(circle.u, point));
}

/** How far beyond the arc's start parameter t lies, in [0, 2 pi). */
export function advance(arc: Arc, t: number): number {
  const step = (t - arc.startRad) % TWO_PI;
  return step < 0 ? step + TWO_PI : step;
}

/** Least and greatest of axis.x along the arc: the ends, and the circle's two extremes when they lie within. */
export function arcExtent(arc: Arc, axis: Vec3): { min: number; max: number } {
  const { circle } = arc;
  const first = dot(axis, arcStart(arc));
  const last = dot(axis, arcEnd(arc));
  const middle = circle.d * dot(axis, circle.n);
  const swing = circle.r * hypot(dot(axis, circle.u), dot(axis, circle.v));
  const top = atan2(dot(axis, circle.v), dot(axis, circle.u));
  return {
    max: advance(arc, top) <= arc.sweepRad ? middle + swing : Math.max(first, last),
    min: advance(arc, top + Math.PI) <= arc.sweepRad ? middle - swing : Math.min(first, last),
  };
}
