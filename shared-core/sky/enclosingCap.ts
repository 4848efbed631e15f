import { angleRad, combine, cross, dot, norm, subtract, unit, type Vec3 } from './vectors.ts';

export interface EnclosingCap {
  readonly centre: Vec3;
  readonly radiusRad: number;
}

/** Sine-sized slack, so that rounding never makes a point on the rim count as outside. */
const SLACK = 1e-12;

function around(centre: Vec3, rim: Vec3): EnclosingCap {
  return { centre, radiusRad: angleRad(centre, rim) };
}

function holds(cap: EnclosingCap, p: Vec3): boolean {
  return angleRad(cap.centre, p) <= cap.radiusRad + SLACK;
}

function throughTwo(a: Vec3, b: Vec3): EnclosingCap {
  return around(unit(combine(0.5, a, 0.5, b)), a);
}

function throughThree(a: Vec3, b: Vec3, c: Vec3): EnclosingCap {
  const n = cross(subtract(b, a), subtract(c, a));
  // Three points in a row: two of them decide.
  if (norm(n) < 1e-15) return throughTwo(a, c);
  const centre = unit(dot(n, a) < 0 ? ([-n[0], -n[1], -n[2]] as const) : n);
  return around(centre, a);
}

/**
 * The smallest cap that holds all points, which must lie within a hemisphere: Welzl's incremental construction (1991)
 * with circles on the sphere in place of circles in the plane. At least one point.
 */
export function smallestCap(points: readonly Vec3[]): EnclosingCap {
  // Neighbours of an outline come in order, the worst case; a stride coprime to the count shuffles repeatably.
  const count = points.length;
  let stride = Math.max(1, Math.floor(count * 0.618034));
  while (gcd(stride, count) !== 1) stride++;
  const order = points.map((_, i) => points[(i * stride) % count]!);

  let cap = around(order[0]!, order[0]!);
  for (let i = 1; i < count; i++) {
    const p = order[i]!;
    if (holds(cap, p)) continue;
    cap = around(p, p);
    for (let j = 0; j < i; j++) {
      const q = order[j]!;
      if (holds(cap, q)) continue;
      cap = throughTwo(p, q);
      for (let k = 0; k < j; k++) {
        if (!holds(cap, order[k]!)) cap = throughThree(p, q, order[k]!);
      }
    }
  }
  return cap;
}

function gcd(a: number, b: number): number {
  return b === 0 ? a : gcd(b, a % b);
}
