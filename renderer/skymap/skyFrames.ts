import type { OutlineRing } from '../../shared-core/sky/region.ts';
import { HAMMER_HALF_HEIGHT, HAMMER_HALF_WIDTH, pointProjection, type SkyFrame } from './skyProjection.ts';

const DEGREE = Math.PI / 180;

/** The box that the map is drawn in, in pixels. */
export interface MapBox {
  readonly left: number;
  readonly top: number;
  readonly right: number;
  readonly bottom: number;
}

/** What a close look is fitted to. */
export interface SkyTarget {
  readonly centreRaDeg: number;
  readonly centreDecDeg: number;
  readonly radiusDeg: number;
  readonly rings: readonly OutlineRing[];
}

/** Targets wider than this are looked at on the map of the whole sky. */
export const WIDEST_CLOSE_LOOK_DEG = 70;
/** Room around a fitted target, as a share of its extent. */
const ROOM = 0.16;
/** The smallest half-extent that is fitted, so that a single point has a map: 0.3 arcminutes. */
const SMALLEST_RAD = 1e-4;
const CENTRE_STEP_DEG = 60;

/**
 * The whole sky in a box.
 * @param middleRaDeg right ascension that should not lie at the rim, where the map is cut; null for 180
 */
export function wholeSkyFrame(box: MapBox, middleRaDeg: number | null): SkyFrame {
  const [width, height] = [box.right - box.left, box.bottom - box.top];
  const middle = middleRaDeg === null ? 180 : Math.round(middleRaDeg / CENTRE_STEP_DEG) * CENTRE_STEP_DEG;
  return {
    kind: 'hammer',
    centreRaDeg: middle % 360,
    centreDecDeg: 0,
    scalePx: Math.min(width / (2 * HAMMER_HALF_WIDTH), height / (2 * HAMMER_HALF_HEIGHT)),
    xPx: (box.left + box.right) / 2,
    yPx: (box.top + box.bottom) / 2,
  };
}

/** A field as large as the box allows, its outline in the middle. */
export function closeFrame(box: MapBox, target: SkyTarget): SkyFrame {
  const { centreRaDeg, centreDecDeg } = target;
  const unit: SkyFrame = { kind: 'lambert', centreRaDeg, centreDecDeg, scalePx: 1, xPx: 0, yPx: 0 };
  const [xMin, yMin, xMax, yMax] = extent(unit, target);
  const halfWidth = Math.max(SMALLEST_RAD, (xMax - xMin) / 2) * (1 + ROOM);
  const halfHeight = Math.max(SMALLEST_RAD, (yMax - yMin) / 2) * (1 + ROOM);
  const scalePx = Math.min(
    (box.right - box.left) / (2 * halfWidth),
    (box.bottom - box.top) / (2 * halfHeight),
  );
  return {
    ...unit,
    scalePx,
    xPx: (box.left + box.right) / 2 - (scalePx * (xMin + xMax)) / 2,
    yPx: (box.top + box.bottom) / 2 - (scalePx * (yMin + yMax)) / 2,
  };
}

function extent(frame: SkyFrame, { rings, radiusDeg }: SkyTarget): [number, number, number, number] {
  if (rings.length === 0) {
    const reach = 2 * Math.sin((radiusDeg * DEGREE) / 2);
    return [-reach, -reach, reach, reach];
  }
  const project = pointProjection(frame);
  const at = { x: 0, y: 0 };
  let [xMin, yMin, xMax, yMax] = [Infinity, Infinity, -Infinity, -Infinity];
  for (const { raDeg, decDeg } of rings)
    for (let i = 0; i < raDeg.length; i++) {
      project(...unitVector(raDeg[i]!, decDeg[i]!), at);
      xMin = Math.min(xMin, at.x);
      xMax = Math.max(xMax, at.x);
      yMin = Math.min(yMin, at.y);
      yMax = Math.max(yMax, at.y);
    }
  return [xMin, yMin, xMax, yMax];
}

/** Unit vector to a place: x to RA 0 Dec 0, y to RA 90 Dec 0, z to the north pole. */
export function unitVector(raDeg: number, decDeg: number): [x: number, y: number, z: number] {
  const [ra, dec] = [raDeg * DEGREE, decDeg * DEGREE];
  return [Math.cos(dec) * Math.cos(ra), Math.cos(dec) * Math.sin(ra), Math.sin(dec)];
}

/** Directions of galaxies: unit vectors, arrays of one length. */
export interface Directions {
  readonly x: ArrayLike<number>;
  readonly y: ArrayLike<number>;
  readonly z: ArrayLike<number>;
}

/** The galaxies' own middle and reach, for a catalogue without region or estimate; null without galaxies. */
export function targetOfPoints({ x, y, z }: Directions): SkyTarget | null {
  const count = x.length;
  if (count === 0) return null;
  const step = Math.max(1, Math.floor(count / 20_000));
  let [sx, sy, sz] = [0, 0, 0];
  for (let i = 0; i < count; i += step) {
    sx += x[i]!;
    sy += y[i]!;
    sz += z[i]!;
  }
  const length = Math.hypot(sx, sy, sz);
  const middle = length > 0 ? [sx / length, sy / length, sz / length] : [1, 0, 0];
  let least = 1;
  for (let i = 0; i < count; i += step)
    least = Math.min(least, x[i]! * middle[0]! + y[i]! * middle[1]! + z[i]! * middle[2]!);
  return {
    centreRaDeg: (Math.atan2(middle[1]!, middle[0]!) / DEGREE + 360) % 360,
    centreDecDeg: Math.asin(Math.max(-1, Math.min(1, middle[2]!))) / DEGREE,
    radiusDeg: Math.acos(Math.max(-1, least)) / DEGREE,
    rings: [],
  };
}

/** Right ascension around which most of some directions lie; null when they lie all around. */
export function middleRaDeg(raDeg: ArrayLike<number>): number | null {
  let [x, y] = [0, 0];
  const step = Math.max(1, Math.floor(raDeg.length / 20_000));
  let used = 0;
  for (let i = 0; i < raDeg.length; i += step, used++) {
    x += Math.cos(raDeg[i]! * DEGREE);
    y += Math.sin(raDeg[i]! * DEGREE);
  }
  return used === 0 || Math.hypot(x, y) < 0.15 * used ? null : (Math.atan2(y, x) / DEGREE + 360) % 360;
}
