import { Refusal } from '../base/refusal.ts';
import type { Arc } from './arc.ts';
import { bothSides, ringArea } from './area.ts';
import { regionBoundary } from './boundary.ts';
import { compileShape } from './compileShape.ts';
import { outlineRings } from './outline.ts';
import type { Footprint, OutlineRing, Region } from './region.ts';
import { compileRegionSide, isInRegion } from './regionSide.ts';
import { type CompiledShape, SMALLEST_AREA_SR } from './shape.ts';
import { compileShapeIndex, type ShapeIndex } from './shapeIndex.ts';
import { DEG2_PER_SR, isPosition, normaliseRaDeg, SPREAD_DIRECTIONS, unitToRaDec } from './vectors.ts';

/**
 * Points nearer than this are taken for the same when shapes are cut by each other (radians; the first is 2e-6
 * arcseconds). The greater ones are tried only where edges nearly coincide and the first leaves a gap. Areas err by
 * less than the tolerance times the length of such edges.
 */
const TOLERANCES_RAD = [1e-11, 1e-10, 1e-9, 1e-8];

interface Boundary {
  readonly rings: readonly (readonly Arc[])[];
  readonly areaSr: number;
}

function combine(shapes: readonly CompiledShape[], partCount: number, index: ShapeIndex): Boundary {
  for (const tolerance of TOLERANCES_RAD) {
    const rings = regionBoundary(shapes, partCount, index, tolerance);
    if (rings === null) continue;
    if (rings.length === 0) return { rings, areaSr: allOrNothing(shapes, partCount, index) };
    let sum = 0;
    for (const ring of rings) sum += ringArea(ring);
    return { rings, areaSr: Math.abs(sum) < SMALLEST_AREA_SR ? 0 : bothSides(sum).leftSr };
  }
  throw new Refusal(
    'Two shapes of the region have edges that lie within a thousandth of an arcsecond of each other without being the same, so their outline cannot be joined: give both the same edge, or move one.',
    'use',
  );
}

/** Area of a region without boundary: one point that lies on no shape's edge speaks for all. */
function allOrNothing(shapes: readonly CompiledShape[], partCount: number, index: ShapeIndex): number {
  for (const direction of SPREAD_DIRECTIONS) {
    const { raDeg, decDeg } = unitToRaDec(direction);
    if (shapes.some((shape) => shape.side(raDeg, decDeg) === 0)) continue;
    return isInRegion(shapes, partCount, index, raDeg, decDeg) ? 4 * Math.PI : 0;
  }
  return 0;
}

/**
 * Makes a region ready: exact area (square degrees), point test (the boundary belongs to the region) and outline.
 * The area is a sum of closed forms over the boundary's arcs, also where parts overlap and holes cut through.
 * RA may be given from -360 to 360 degrees and is taken modulo 360.
 * @throws Refusal (kind 'use') for a region without parts, a shape that is none (a coordinate out of range or not
 * finite, an empty box, a radius not in (0, 180], a polygon that crosses itself ...), and holes that leave nothing
 */
export function compileRegion(region: Region): Footprint {
  if (region.parts.length === 0) {
    throw new Refusal(
      'The region has no part, but needs at least one shape: add a box, a cap, a polygon or the whole sky.',
      'use',
    );
  }
  const shapes = [...region.parts, ...region.holes].map(compileShape);
  const partCount = region.parts.length;
  const index = compileShapeIndex(shapes);
  const only = shapes.length === 1 ? shapes[0]! : null;
  const boundary = only
    ? { rings: ringsOfShape(only), areaSr: only.areaSr }
    : combine(shapes, partCount, index);
  if (boundary.areaSr < SMALLEST_AREA_SR) {
    throw new Refusal(
      "The region's holes cover all of its parts and leave nothing: remove a hole or make it smaller.",
      'use',
    );
  }
  const inRegion = compileRegionSide(shapes, partCount, index);
  let outline: readonly OutlineRing[] | null = null;
  return {
    origin: 'given',
    areaDeg2: boundary.areaSr * DEG2_PER_SR,
    estimate: null,
    contains: (raDeg, decDeg) => isPosition(raDeg, decDeg) && inRegion(normaliseRaDeg(raDeg), decDeg),
    outline() {
      outline ??= outlineRings(boundary.rings);
      return outline;
    },
  };
}

/** A full-circle box has two rings of one arc each; every other shape has one ring. */
function ringsOfShape(shape: CompiledShape): readonly (readonly Arc[])[] {
  if (shape.arcs.length === 0) return [];
  const closed = shape.arcs.every((arc) => arc.sweepRad >= 2 * Math.PI);
  return closed ? shape.arcs.map((arc) => [arc]) : [shape.arcs];
}
