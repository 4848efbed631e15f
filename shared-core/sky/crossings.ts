import { type Arc, advance, arcEnd, arcExtent, arcStart, type Circle, parameterOf, TWO_PI } from './arc.ts';
import { cross, dot, norm, subtract, unit, type Vec3 } from './vectors.ts';

/**
 * The points where two circles cross: two, one where they touch (within `tolerance`), or none; none also for circles
 * that are the same.
 * With e1 = n1, e2 at right angles to it towards n2 and e3 = e1 x e2, a crossing is d1 e1 + y e2 +- z e3 with
 * y = (d2 - d1 cos a)/sin a, z^2 = r1^2 - y^2, a the angle between n1 and n2. All differences are taken of
 * 1 - cos, and the smaller circle is taken first, so that small circles keep their digits.
 */
export function circleCrossings(one: Circle, other: Circle, tolerance: number): Vec3[] {
  const [first, second] = one.r <= other.r ? [one, other] : [other, one];
  // A circle is the same set seen from either pole; the nearer pole is the one with small 1 - d.
  const [n1, d1] = nearerPole(first);
  const [n2, d2] = nearerPole(second);
  const step = subtract(n2, n1);
  const w = cross(n1, step);
  const sine = norm(w);
  if (sine < 1e-14) return [];
  const versine1 = (first.r * first.r) / (1 + d1);
  const versine2 = (second.r * second.r) / (1 + d2);
  const versineAngle = dot(step, step) / 2;
  const y = (versine1 - versine2 + versineAngle - versineAngle * versine1) / sine;
  const e3: Vec3 = [w[0] / sine, w[1] / sine, w[2] / sine];
  const e2 = cross(e3, n1);
  const at = (z: number): Vec3 => [
    d1 * n1[0] + y * e2[0] + z * e3[0],
    d1 * n1[1] + y * e2[1] + z * e3[1],
    d1 * n1[2] + y * e2[2] + z * e3[2],
  ];
  // How far the smaller circle reaches beyond the other one: where it is next to nothing the crossings, if there are
  // any, are made of rounding errors, and the point between them stands for both.
  const reach = first.r - Math.abs(y);
  if (Math.abs(reach) <= tolerance / 10) return [unit(at(0))];
  if (reach < 0) return [];
  const z = Math.sqrt(reach * (first.r + Math.abs(y)));
  return [at(z), at(-z)];
}

function nearerPole({ n, d }: Circle): [Vec3, number] {
  return d >= 0 ? [n, d] : [[-n[0], -n[1], -n[2]], -d];
}

/**
 * How far along the arc (radians of its parameter, 0 to sweep) a point of its circle lies; null when it lies beyond
 * the ends by more than the tolerance.
 */
export function placeOnArc(arc: Arc, point: Vec3, tolerance: number): number | null {
  const slack = tolerance / arc.circle.r;
  const along = advance(arc, parameterOf(arc.circle, point));
  if (along <= arc.sweepRad) return along;
  if (along <= arc.sweepRad + slack) return arc.sweepRad;
  return along >= TWO_PI - slack ? 0 : null;
}

/** By chords from the nearer pole, which keep their digits for small circles. */
function liesOnCircle(circle: Circle, point: Vec3, tolerance: number): boolean {
  const [n, d] = nearerPole(circle);
  const versine = (circle.r * circle.r) / (1 + d);
  return Math.abs(norm(subtract(point, n)) - Math.sqrt(2 * versine)) <= tolerance;
}

/**
 * For each arc the places (as in placeOnArc) where it must be cut so that no piece crosses another arc of a
 * different shape, runs past its end, or overlaps it in part.
 */
export function findCuts(arcs: readonly Arc[], shapeOf: readonly number[], tolerance: number): number[][] {
  const cuts: number[][] = arcs.map(() => []);
  const cut = (i: number, point: Vec3): void => {
    const place = placeOnArc(arcs[i]!, point, tolerance);
    if (place !== null) cuts[i]!.push(place);
  };
  const cutAtEnds = (i: number, j: number): void => {
    for (const point of [arcStart(arcs[j]!), arcEnd(arcs[j]!)]) {
      if (liesOnCircle(arcs[i]!.circle, point, tolerance)) cut(i, point);
    }
  };
  const spans = (axis: Vec3) => arcs.map((arc) => arcExtent(arc, axis));
  const [xs, ys, zs] = [spans([1, 0, 0]), spans([0, 1, 0]), spans([0, 0, 1])];
  const apart = (s: readonly { min: number; max: number }[], i: number, j: number): boolean =>
    s[i]!.min > s[j]!.max + tolerance || s[j]!.min > s[i]!.max + tolerance;

  // A sweep upward in z: only arcs whose spans overlap can meet.
  const order = arcs.map((_, i) => i).sort((i, j) => zs[i]!.min - zs[j]!.min);
  for (let a = 0; a < order.length; a++) {
    const i = order[a]!;
    const top = zs[i]!.max + tolerance;
    for (let b = a + 1; b < order.length; b++) {
      const j = order[b]!;
      if (zs[j]!.min > top) break;
      if (shapeOf[i] === shapeOf[j] || apart(xs, i, j) || apart(ys, i, j)) continue;
      cutAtEnds(i, j);
      cutAtEnds(j, i);
      for (const point of circleCrossings(arcs[i]!.circle, arcs[j]!.circle, tolerance)) {
        if (
          placeOnArc(arcs[i]!, point, tolerance) === null ||
          placeOnArc(arcs[j]!, point, tolerance) === null
        )
          continue;
        cut(i, point);
        cut(j, point);
      }
    }
  }
  return cuts;
}
