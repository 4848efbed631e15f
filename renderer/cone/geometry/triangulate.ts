import { ShapeUtils, Vector2 } from 'three';
import { pointOutside } from './rings.ts';
import { cross, dot, type Frame, scale, unit, type Vec3 } from './vector.ts';

/** A piece of the unit sphere as triangles, counter-clockwise seen from outside. */
export interface SphereMesh {
  /** Unit vectors, three numbers a point. */
  readonly directions: Float32Array;
  readonly triangles: Uint32Array;
}

const RADIAN = 180 / Math.PI;

/** A right-handed frame whose third axis is c. */
function frameAbout(c: Vec3): Frame {
  const helper: Vec3 = Math.abs(c[2]) < 0.9 ? [0, 0, 1] : [1, 0, 0];
  const u = unit(cross(helper, c));
  return [u, cross(c, u), c];
}

/** Stereographic plane touching the sphere at c: angles and windings are kept, the antipode of c is at infinity. */
const toPlane = (frame: Frame, p: Vec3): [number, number] => {
  const w = 2 / (1 + dot(frame[2], p));
  return [dot(frame[0], p) * w, dot(frame[1], p) * w];
};

const toSphere = (frame: Frame, x: number, y: number): Vec3 => {
  const q = (x * x + y * y) / 4;
  const k = 1 / (1 + q);
  const [u, v, c] = frame;
  const h = 1 - q;
  return [
    k * (x * u[0] + y * v[0] + h * c[0]),
    k * (x * u[1] + y * v[1] + h * c[1]),
    k * (x * u[2] + y * v[2] + h * c[2]),
  ];
};

/** A point of the outline in the plane, which knows its place on the sphere to the last digit. */
class OutlinePoint extends Vector2 {
  readonly place: Vec3;

  constructor(frame: Frame, place: Vec3) {
    super(...toPlane(frame, place));
    this.place = place;
  }
}

const signedArea = (ring: readonly Vector2[]): number => ShapeUtils.area(ring as Vector2[]);

function containsPoint(ring: readonly Vector2[], p: Vector2): boolean {
  let inside = false;
  for (let i = 0, j = ring.length - 1; i < ring.length; j = i++) {
    const a = ring[i]!;
    const b = ring[j]!;
    if (a.y > p.y !== b.y > p.y && p.x < ((b.x - a.x) * (p.y - a.y)) / (b.y - a.y) + a.x) inside = !inside;
  }
  return inside;
}

/** Outer rings, each with the holes inside it. */
function nest(rings: readonly OutlinePoint[][]): { outer: OutlinePoint[]; holes: OutlinePoint[][] }[] {
  const groups = rings
    .filter((ring) => signedArea(ring) > 0)
    .map((outer) => ({ outer, area: signedArea(outer), holes: [] as OutlinePoint[][] }));
  for (const hole of rings.filter((ring) => signedArea(ring) < 0)) {
    const owners = groups.filter((group) => containsPoint(group.outer, hole[0]!));
    owners.sort((a, b) => a.area - b.area);
    owners[0]?.holes.push(hole);
  }
  return groups;
}

/**
 * Triangles of the region inside spherical rings (unit vectors, three numbers a point; interior to the left seen from
 * outside), curved to the sphere: no edge is longer than maxEdgeDeg. No rings means the whole sphere.
 *
 * Method: stereographic projection from a point outside the region, ear cutting in the plane, then bisection of long
 * edges in the plane, which keeps the pieces from folding over each other.
 */
export function triangulateRings(rings: readonly ArrayLike<number>[], maxEdgeDeg = 3): SphereMesh {
  const usable = rings.filter((ring) => ring.length >= 9);
  if (usable.length === 0) return wholeSphere(maxEdgeDeg);
  const frame = frameAbout(scale(pointOutside(usable), -1));
  const plane = usable.map((ring) => {
    const out: OutlinePoint[] = [];
    for (let i = 0; i < ring.length; i += 3) {
      out.push(new OutlinePoint(frame, [ring[i]!, ring[i + 1]!, ring[i + 2]!]));
    }
    return out;
  });
  const points: [number, number][] = [];
  const outline: Vec3[] = [];
  const triangles: number[] = [];
  for (const { outer, holes } of nest(plane)) {
    const base = points.length;
    for (const p of [outer, ...holes].flat()) {
      points.push([p.x, p.y]);
      outline.push(p.place);
    }
    for (const face of ShapeUtils.triangulateShape(outer, holes)) {
      triangles.push(base + face[0]!, base + face[1]!, base + face[2]!);
    }
  }
  return refine(
    points,
    outline,
    triangles,
    ([x, y]) => toSphere(frame, x, y),
    (a, b): [number, number] => [(a[0] + b[0]) / 2, (a[1] + b[1]) / 2],
    maxEdgeDeg,
  );
}

const GOLDEN = (1 + Math.sqrt(5)) / 2;

/** An icosahedron, bisected until its edges are short enough. */
function wholeSphere(maxEdgeDeg: number): SphereMesh {
  const corners: Vec3[] = [];
  for (const a of [-1, 1]) {
    for (const b of [-GOLDEN, GOLDEN]) corners.push(unit([0, a, b]), unit([a, b, 0]), unit([b, 0, a]));
  }
  const edge = 2 / Math.sqrt(1 + GOLDEN * GOLDEN);
  const near = (i: number, j: number): boolean =>
    Math.abs(Math.hypot(...corners[i]!.map((v, k) => v - corners[j]![k]!)) - edge) < 1e-6;
  const triangles: number[] = [];
  for (let i = 0; i < 12; i++) {
    for (let j = i + 1; j < 12; j++) {
      for (let k = j + 1; k < 12; k++) {
        if (!(near(i, j) && near(j, k) && near(k, i))) continue;
        const outward = dot(cross(corners[i]!, corners[j]!), corners[k]!) > 0;
        triangles.push(i, outward ? j : k, outward ? k : j);
      }
    }
  }
  return refine(
    corners,
    corners,
    triangles,
    (p) => p,
    (a, b) => unit([a[0] + b[0], a[1] + b[1], a[2] + b[2]]),
    maxEdgeDeg,
  );
}

/** Split every edge longer than the limit in its middle, until there is none. Neighbours split alike: no gaps. */
function refine<P>(
  points: readonly P[],
  places: readonly Vec3[],
  triangles: readonly number[],
  place: (p: P) => Vec3,
  middle: (a: P, b: P) => P,
  maxEdgeDeg: number,
): SphereMesh {
  const list = [...points];
  const sphere = [...places];
  const limit = Math.cos(maxEdgeDeg / RADIAN);
  let faces = triangles;
  for (let round = 0; round < 24; round++) {
    const midpoints = new Map<number, number>();
    const split = (i: number, j: number): number => {
      if (dot(sphere[i]!, sphere[j]!) >= limit) return -1;
      const key = Math.min(i, j) * 2 ** 26 + Math.max(i, j);
      const known = midpoints.get(key);
      if (known !== undefined) return known;
      const p = middle(list[i]!, list[j]!);
      midpoints.set(key, list.length);
      list.push(p);
      sphere.push(place(p));
      return list.length - 1;
    };
    const next: number[] = [];
    for (let f = 0; f < faces.length; f += 3) {
      const a = faces[f]!;
      const b = faces[f + 1]!;
      const c = faces[f + 2]!;
      splitFace(next, a, b, c, split(a, b), split(b, c), split(c, a));
    }
    faces = next;
    if (midpoints.size === 0) break;
  }
  const directions = new Float32Array(sphere.length * 3);
  for (const [i, p] of sphere.entries()) directions.set(p, 3 * i);
  return { directions, triangles: Uint32Array.from(faces) };
}

/** Triangles of abc with the given middles of ab, bc and ca; -1 where an edge stays whole. */
function splitFace(out: number[], a: number, b: number, c: number, ab: number, bc: number, ca: number): void {
  const halves = (ab >= 0 ? 1 : 0) + (bc >= 0 ? 1 : 0) + (ca >= 0 ? 1 : 0);
  if (halves === 0) out.push(a, b, c);
  else if (halves === 3) out.push(a, ab, ca, ab, b, bc, ca, bc, c, ab, bc, ca);
  else if (halves === 1) {
    if (ab >= 0) out.push(a, ab, c, ab, b, c);
    else if (bc >= 0) out.push(b, bc, a, bc, c, a);
    else out.push(c, ca, b, ca, a, b);
  } else if (ab < 0) out.push(c, ca, bc, ca, a, bc, a, b, bc);
  else if (bc < 0) out.push(a, ab, ca, ab, b, ca, b, c, ca);
  else out.push(b, bc, ab, bc, c, ab, c, a, ab);
}
