import { type Arc, arcPoint, reverseArc } from './arc.ts';
import { findCuts } from './crossings.ts';
import { joinRings } from './rings.ts';
import type { CompiledShape } from './shape.ts';
import type { ShapeIndex } from './shapeIndex.ts';
import { combine, dot, unit, unitToRaDec, type Vec3 } from './vectors.ts';

/** Up to a fifth of an arcsecond, which is bridged with an error of the tolerance times this length. */
const BRIDGES_RAD = [1e-9, 1e-8, 1e-7, 1e-6];

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

/** Shapes that hold the point. */
function shapesAt(shapes: readonly CompiledShape[], index: ShapeIndex, point: Vec3): Set<number> {
  const { raDeg, decDeg } = unitToRaDec(point);
  const cell = index.cellOf(raDeg, decDeg);
  const found = new Set<number>();
  for (const s of index.shapes.subarray(index.first[cell]!, index.first[cell + 1]!)) {
    if (shapes[s]!.side(raDeg, decDeg) >= 0) found.add(s);
  }
  return found;
}

function inRegion(holders: ReadonlySet<number>, partCount: number): boolean {
  let inPart = false;
  for (const s of holders) {
    if (s >= partCount) return false;
    inPart = true;
  }
  return inPart;
}

/**
 * Boundary of (union of the first `partCount` shapes) minus (union of the rest) as closed rings of arcs, interior on
 * the left. Every shape's boundary is cut where it meets the others; a piece belongs to the boundary when just one of
 * its two sides is in the region. Both sides are asked right beside the piece's middle, so that edges which two shapes
 * share, in the same or in opposite directions, need no care. Empty for the whole sky and for nothing.
 * @param tolerance radians within which an edge lies on another one
 * @returns null when the pieces do not close, which edges that nearly but not quite coincide can cause
 */
export function regionBoundary(
  shapes: readonly CompiledShape[],
  partCount: number,
  index: ShapeIndex,
  tolerance: number,
): Arc[][] | null {
  const arcs = shapes.flatMap((shape) => shape.arcs);
  const shapeOf = shapes.flatMap((shape, s) => shape.arcs.map(() => s));
  const cuts = findCuts(arcs, shapeOf, tolerance);
  const aside = tolerance / 10;

  const kept: Arc[] = [];
  arcs.forEach((arc, i) => {
    const own = shapeOf[i]!;
    for (const piece of piecesOf(arc, cuts[i]!, tolerance)) {
      const middle = arcPoint(piece, 0.5);
      const { n } = arc.circle;
      const toLeft = unit(combine(1, n, -dot(n, middle), middle));
      const left = shapesAt(shapes, index, combine(1, middle, aside, toLeft));
      const right = shapesAt(shapes, index, combine(1, middle, -aside, toLeft));
      // Where an earlier shape has the same edge, its arc stands for both.
      if ([...left, ...right].some((s) => s < own && left.has(s) !== right.has(s))) continue;
      const inside = inRegion(left, partCount);
      if (inside !== inRegion(right, partCount)) kept.push(inside ? piece : reverseArc(piece));
    }
  });
  // Where circles touch or cross at a shallow angle, the last bit of a piece before the crossing is nearer to the other
  // edge than the tolerance and may be missing: then a longer gap must be bridged.
  for (const gap of [4 * tolerance, ...BRIDGES_RAD]) {
    const rings = joinRings(kept, gap);
    if (rings !== null) return rings;
  }
  return null;
}
