import { atan2 } from '../numerics/elementary/elementary.ts';
import { type Arc, arcEnd, arcStart, greatCircleArc, tangent } from './arc.ts';
import { NearPool } from './nearPool.ts';
import { cross, dot, norm, subtract, type Vec3 } from './vectors.ts';

/** Circles that touch can seem to cross twice at one point: a ring of no size (0.02 arcseconds round). */
const SHORTEST_RING_RAD = 1e-7;

/** Gaps wider than this (far above rounding) get a great-circle arc of their own, so that rings truly close. */
const GAP_RAD = 1e-14;

/** How far to turn clockwise about `up` from direction `from` to direction `to`, in (0, 2 pi]. */
function clockwise(up: Vec3, from: Vec3, to: Vec3): number {
  const turn = atan2(-dot(up, cross(from, to)), dot(from, to));
  return turn > 0 ? turn : turn + 2 * Math.PI;
}

/**
 * Joins directed boundary arcs (interior on the left) end to start into closed rings. Where several arcs meet at a
 * point, the two that bound the same wedge of the interior follow each other, so that pieces which touch at a corner
 * only are rings of their own.
 * @returns null when some arc finds no follower within the tolerance
 */
export function joinRings(arcs: readonly Arc[], tolerance: number): Arc[][] | null {
  const pool = new NearPool(tolerance);
  const startNode = arcs.map((arc) => pool.numberOf(arcStart(arc)));
  const endNode = arcs.map((arc) => pool.numberOf(arcEnd(arc)));
  const leaving = new Map<number, number[]>();
  startNode.forEach((node, i) => {
    const list = leaving.get(node);
    if (list) list.push(i);
    else leaving.set(node, [i]);
  });

  const next: number[] = [];
  for (let i = 0; i < arcs.length; i++) {
    const choices = leaving.get(endNode[i]!) ?? [];
    if (choices.length === 0) return null;
    let pick = 0;
    if (choices.length > 1) {
      const { circle, startRad, sweepRad } = arcs[i]!;
      const arrival = tangent(circle, startRad + sweepRad);
      const back: Vec3 = [-arrival[0], -arrival[1], -arrival[2]];
      const turns = choices.map((j) =>
        clockwise(arcEnd(arcs[i]!), back, tangent(arcs[j]!.circle, arcs[j]!.startRad)),
      );
      pick = turns.indexOf(Math.min(...turns));
    }
    next.push(choices[pick]!);
    choices.splice(pick, 1);
  }

  // Every arc now has one follower and one forerunner: the rings are the cycles.
  const used = new Uint8Array(arcs.length);
  const rings: Arc[][] = [];
  for (let i = 0; i < arcs.length; i++) {
    if (used[i]) continue;
    const ring: Arc[] = [];
    for (let j = i; !used[j]; j = next[j]!) {
      used[j] = 1;
      ring.push(arcs[j]!);
      const [from, to] = [arcEnd(arcs[j]!), arcStart(arcs[next[j]!]!)];
      if (norm(subtract(to, from)) > GAP_RAD) ring.push(greatCircleArc(from, to));
    }
    const length = ring.reduce((sum, { circle, sweepRad }) => sum + sweepRad * circle.r, 0);
    if (length > SHORTEST_RING_RAD) rings.push(ring);
  }
  return rings;
}
