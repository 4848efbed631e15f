import { cos, sin } from '../numerics/elementary/elementary.ts';
import type { CompiledShape } from './shape.ts';
import type { ShapeIndex } from './shapeIndex.ts';
import { combine, cross, perpendicular, raDecToUnit, unit, unitToRaDec } from './vectors.ts';

/** Points tried around a point that lies on several edges, at 2e-4 arcseconds from it. */
const PROBES = 24;
const PROBE_RAD = 1e-9;

/** Inside some part and not inside any hole; edges of holes do not count as hole. */
export function isInRegion(
  shapes: readonly CompiledShape[],
  partCount: number,
  index: ShapeIndex,
  raDeg: number,
  decDeg: number,
): boolean {
  let inPart = false;
  const cell = index.cellOf(raDeg, decDeg);
  const last = index.first[cell + 1]!;
  for (let k = index.first[cell]!; k < last; k++) {
    const s = index.shapes[k]!;
    const side = shapes[s]!.side(raDeg, decDeg);
    if (s < partCount) inPart ||= side >= 0;
    else if (side > 0) return false;
  }
  return inPart;
}

/**
 * The region's point test. Its boundary belongs to it, so a point on the edge of a hole is in. Where a hole's edge
 * runs along another edge the point is in only if some of the sky right around it is: two holes side by side leave no
 * line between them.
 */
export function compileRegionSide(
  shapes: readonly CompiledShape[],
  partCount: number,
  index: ShapeIndex,
): (raDeg: number, decDeg: number) => boolean {
  if (shapes.length === 1) {
    const shape = shapes[0]!;
    return (raDeg, decDeg) => shape.side(raDeg, decDeg) >= 0;
  }
  return (raDeg, decDeg) => {
    let inPart = false;
    let edges = 0;
    let onHole = false;
    const cell = index.cellOf(raDeg, decDeg);
    const last = index.first[cell + 1]!;
    for (let k = index.first[cell]!; k < last; k++) {
      const s = index.shapes[k]!;
      const side = shapes[s]!.side(raDeg, decDeg);
      if (side === 0) edges++;
      if (s < partCount) {
        if (side >= 0) inPart = true;
      } else if (side > 0) {
        return false;
      } else if (side === 0) {
        onHole = true;
      }
    }
    if (!inPart || !onHole || edges < 2) return inPart;
    return someSkyAround(shapes, partCount, index, raDeg, decDeg);
  };
}

function someSkyAround(
  shapes: readonly CompiledShape[],
  partCount: number,
  index: ShapeIndex,
  raDeg: number,
  decDeg: number,
): boolean {
  const centre = raDecToUnit(raDeg, decDeg);
  const u = perpendicular(centre);
  const v = cross(centre, u);
  for (let k = 0; k < PROBES; k++) {
    const turn = (2 * Math.PI * (k + 0.137)) / PROBES;
    const offset = combine(PROBE_RAD * cos(turn), u, PROBE_RAD * sin(turn), v);
    const probe = unitToRaDec(unit(combine(1, centre, 1, offset)));
    if (isInRegion(shapes, partCount, index, probe.raDeg, probe.decDeg)) return true;
  }
  return false;
}
