import { Refusal } from '../base/refusal.ts';
import { cos, sin } from '../numerics/elementary/elementary.ts';
import { type Arc, circleAround } from './arc.ts';
import type { SkyShape } from './region.ts';
import { boundingRadius, type CompiledShape } from './shape.ts';
import { checkDec, checkRa } from './shapeChecks.ts';
import { normaliseRaDeg, RAD_PER_DEG, raDecToUnit, type Vec3 } from './vectors.ts';

const NORTH: Vec3 = [0, 0, 1];
const SOUTH: Vec3 = [0, 0, -1];
const RA_ZERO: Vec3 = [1, 0, 0];

type Box = Extract<SkyShape, { kind: 'box' }>;

function boxWidthDeg(box: Box): number {
  const { raMinDeg, raMaxDeg, decMinDeg, decMaxDeg } = box;
  checkRa('box', 'first RA', raMinDeg);
  checkRa('box', 'second RA', raMaxDeg);
  checkDec('box', 'lower Dec', decMinDeg);
  checkDec('box', 'upper Dec', decMaxDeg);
  if (decMinDeg >= decMaxDeg) {
    throw new Refusal(
      `The box runs in Dec from ${decMinDeg} to ${decMaxDeg}, which leaves no area: give the lower Dec first, then a greater one.`,
      'use',
    );
  }
  const span = raMaxDeg - raMinDeg;
  if (span > 360) {
    throw new Refusal(
      `The box runs in RA from ${raMinDeg} to ${raMaxDeg}, over more than the full circle: give 0 and 360 for all RA.`,
      'use',
    );
  }
  if (span === 360) return 360;
  const width = normaliseRaDeg(normaliseRaDeg(raMaxDeg) - normaliseRaDeg(raMinDeg));
  if (width === 0) {
    throw new Refusal(
      `The box runs in RA from ${raMinDeg} to ${raMaxDeg}, the same RA, which leaves no area: give two RA, or 0 and 360 for the full circle.`,
      'use',
    );
  }
  return width;
}

/** The boundary with the interior on the left: south edge eastward, then north along the east edge, and back. */
function boxArcs(box: Box, widthDeg: number): Arc[] {
  const { decMinDeg, decMaxDeg } = box;
  const ra0 = normaliseRaDeg(box.raMinDeg) * RAD_PER_DEG;
  const width = widthDeg * RAD_PER_DEG;
  const arcs: Arc[] = [];
  if (decMinDeg > -90) {
    arcs.push({
      circle: circleAround(NORTH, 90 - decMinDeg, RA_ZERO),
      startRad: ra0,
      sweepRad: width,
    });
  }
  const height = (decMaxDeg - decMinDeg) * RAD_PER_DEG;
  if (widthDeg < 360) {
    const east = raDecToUnit(normaliseRaDeg(box.raMaxDeg), 0);
    arcs.push({
      circle: { n: [east[1], -east[0], 0], d: 0, r: 1, u: east, v: NORTH },
      startRad: decMinDeg * RAD_PER_DEG,
      sweepRad: height,
    });
  }
  if (decMaxDeg < 90) {
    // Westward: counter-clockwise about the south pole, where the parameter is minus the RA.
    arcs.push({
      circle: circleAround(SOUTH, 90 + decMaxDeg, RA_ZERO),
      startRad: -(ra0 + width),
      sweepRad: width,
    });
  }
  if (widthDeg < 360) {
    const west = raDecToUnit(normaliseRaDeg(box.raMinDeg), 0);
    arcs.push({
      circle: { n: [-west[1], west[0], 0], d: 0, r: 1, u: west, v: SOUTH },
      startRad: -decMaxDeg * RAD_PER_DEG,
      sweepRad: height,
    });
  }
  return arcs;
}

/**
 * A box between two RA (from the first eastward to the second) and two Dec.
 * Area: dRA (sin Dec2 - sin Dec1), the difference written as a product so that thin boxes keep their digits.
 * @throws Refusal for coordinates outside their range and for a box without area.
 */
export function compileBox(box: Box): CompiledShape {
  const widthDeg = boxWidthDeg(box);
  const { decMinDeg, decMaxDeg } = box;
  const raMin = normaliseRaDeg(box.raMinDeg);
  const full = widthDeg === 360;
  const arcs = boxArcs(box, widthDeg);
  const middle = ((decMaxDeg + decMinDeg) / 2) * RAD_PER_DEG;
  const halfHeight = ((decMaxDeg - decMinDeg) / 2) * RAD_PER_DEG;
  // A ring is best held by a cap about a pole.
  const centre = full
    ? middle < 0
      ? SOUTH
      : NORTH
    : raDecToUnit(raMin + widthDeg / 2, middle / RAD_PER_DEG);

  const side: CompiledShape['side'] = (ra, dec) => {
    if (dec < decMinDeg || dec > decMaxDeg) return -1;
    if (full) {
      const onEdge = (dec === decMinDeg && dec > -90) || (dec === decMaxDeg && dec < 90);
      return onEdge ? 0 : 1;
    }
    // At a pole every RA is the same point.
    if (dec === 90 || dec === -90) return 0;
    const offset = normaliseRaDeg(ra - raMin);
    if (offset > widthDeg) return -1;
    return dec === decMinDeg || dec === decMaxDeg || offset === 0 || offset === widthDeg ? 0 : 1;
  };
  const antipodeRa = normaliseRaDeg(raMin + widthDeg / 2 + 180);
  const antipodeDec = full ? (middle < 0 ? 90 : -90) : -middle / RAD_PER_DEG;
  return {
    arcs,
    areaSr: widthDeg * RAD_PER_DEG * 2 * cos(middle) * sin(halfHeight),
    centre,
    radiusRad: boundingRadius(centre, arcs, side(antipodeRa, antipodeDec) >= 0),
    side,
  };
}
