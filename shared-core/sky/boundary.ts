import { type Arc, advance, arcPoint, parameterOf, reverseArc, reverseCircle } from './arc.ts';
import { findCuts } from './crossings.ts';
import { NearPool } from './nearPool.ts';
import { joinRings } from './rings.ts';
import type { CompiledShape } from './shape.ts';
import type { ShapeIndex } from './shapeIndex.ts';
import { unitToRaDec, type Vec3 } from './vectors.ts';

interface NumberedCircles {
  /** Circles that are the same set of points share a number. */
  readonly circleOf: readonly number[];
  /** 1 or -1: the direction in which the arc runs along it. */
  readonly sense: readonly (1 | -1)[];
}

function numberCircles(arcs: readonly Arc[], tolerance: number): NumberedCircles {
  const pool = new NearPool(tolerance);
  const circleOf: number[] = [];
  const sense: (1 | -1)[] = [];
  for (const { circle } of arcs) {
    const key = [...circle.n, circle.d, circle.r];
    const against = reverseCircle(circle);
    const backward = pool.find([...against.n, against.d, against.r]);
    circleOf.push(backward >= 0 ? backward : pool.findOrAdd(key));
    sense.push(backward >= 0 ? -1 : 1);
  }
  return { circleOf, sense };
}

function piecesOf(arc: Arc, cuts: readonly number[], tolerance: number): Arc[] {
  const slack = tolerance / arc.circle.r;
  const places = [0];
  for (const place of [...cuts].sort((a, b) => a - b)) {
    if (place > places.at(-1)! + slack && place < arc.sweepRad - slack) places.push(place);
  }
  places.push(arc.sweepRad);
  return places.slice(1).map((to, k) => ({
    circle: arc.circle,
    startRad: arc.startRad + places[k]!,
    sweepRad: to - places[k]!,
  }));
}

function covers(arc: Arc, point: Vec3): boolean {
  return advance(arc, parameterOf(arc.circle, point)) <= arc.sweepRad;
}

/**
 * Boundary of (union of the first `partCount` shapes) minus (union of the rest) as closed rings of arcs, interior on
 * the left. Every shape's boundary is cut where it meets the others; a piece belongs to the boundary when just one of
 * its two sides is in the region. Empty for the whole sky and for nothing.
 * @param tolerance radians within which points, and circles, are the same
 * @returns null when the pieces do not close, which edges that nearly but not quite coincide can cause
 */
export function regionBoundary(
  shapes: readonly CompiledShape[],
  partCount: number,
  index: ShapeIndex,
  tolerance: number,
): Arc[][] | null {
  const arcs: Arc[] = [];
  const shapeOf: number[] = [];
  shapes.forEach((shape, s) => {
    for (const arc of shape.arcs) {
      arcs.push(arc);
      shapeOf.push(s);
    }
  });
  const { circleOf, sense } = numberCircles(arcs, tolerance / 10);
  const cuts = findCuts(arcs, shapeOf, circleOf, tolerance);
  const onCircle = new Map<number, number[]>();
  circleOf.forEach((circle, i) => {
    const list = onCircle.get(circle);
    if (list) list.push(i);
    else onCircle.set(circle, [i]);
  });

  const kept: Arc[] = [];
  for (let i = 0; i < arcs.length; i++) {
    for (const piece of piecesOf(arcs[i]!, cuts[i]!, tolerance)) {
      const middle = arcPoint(piece, 0.5);
      // Overlapping arcs are one boundary: the first of them stands for all.
      const overlapping = onCircle.get(circleOf[i]!)!.filter((j) => j === i || covers(arcs[j]!, middle));
      if (overlapping[0] !== i) continue;
      const leftIn = new Set<number>();
      const rightIn = new Set<number>();
      const decided = new Set<number>();
      for (const j of overlapping) {
        decided.add(shapeOf[j]!);
        (sense[j] === sense[i] ? leftIn : rightIn).add(shapeOf[j]!);
      }
      const { raDeg, decDeg } = unitToRaDec(middle);
      const cell = index.cellOf(raDeg, decDeg);
      for (const s of index.shapes.subarray(index.first[cell]!, index.first[cell + 1]!)) {
        if (decided.has(s) || shapes[s]!.side(raDeg, decDeg) < 0) continue;
        leftIn.add(s);
        rightIn.add(s);
      }
      const left = inRegion(leftIn, partCount);
      if (left !== inRegion(rightIn, partCount)) kept.push(left ? piece : reverseArc(piece));
    }
  }
  return joinRings(kept, 4 * tolerance);
}

function inRegion(shapesIn: ReadonlySet<number>, partCount: number): boolean {
  let inPart = false;
  for (const s of shapesIn) {
    if (s >= partCount) return false;
    inPart = true;
  }
  return inPart;
}
