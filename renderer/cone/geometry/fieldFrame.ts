import { add, cross, direction, type Frame, scale, type Vec3 } from './vector.ts';

const DEGREE = Math.PI / 180;

/** The frame of the whole sky, seen from the north: x to RA 0, y to RA 90, z to the viewer at Dec +90. */
export const SKY_FRAME: Frame = [
  [1, 0, 0],
  [0, 1, 0],
  [0, 0, 1],
];

/**
 * The axes of a field's cone: first the line of sight to the centre, then the long axis across the sky
 * (up on the screen in the side-on view), then the third, toward the viewer; right-handed.
 *
 * @param positionAngleDeg from north through east to the long axis
 */
export function fieldFrame(centreRaDeg: number, centreDecDeg: number, positionAngleDeg: number): Frame {
  const radial = direction(centreRaDeg, centreDecDeg);
  const ra = centreRaDeg * DEGREE;
  const east: Vec3 = [-Math.sin(ra), Math.cos(ra), 0];
  const north = cross(radial, east);
  const angle = positionAngleDeg * DEGREE;
  const along = add(scale(north, Math.cos(angle)), scale(east, Math.sin(angle)));
  return [radial, along, cross(radial, along)];
}

/** How far the outline reaches from the line of sight, as sines: along the second and third axis, both ways. */
export interface LateralExtent {
  readonly alongMin: number;
  readonly alongMax: number;
  readonly acrossMin: number;
  readonly acrossMax: number;
}

/** Extent of directions (unit vectors, three numbers each) in a field's frame. */
export function lateralExtent(frame: Frame, directions: ArrayLike<number>): LateralExtent {
  let alongMin = 0;
  let alongMax = 0;
  let acrossMin = 0;
  let acrossMax = 0;
  for (let i = 0; i + 2 < directions.length; i += 3) {
    const x = directions[i]!;
    const y = directions[i + 1]!;
    const z = directions[i + 2]!;
    const along = frame[1][0] * x + frame[1][1] * y + frame[1][2] * z;
    const across = frame[2][0] * x + frame[2][1] * y + frame[2][2] * z;
    alongMin = Math.min(alongMin, along);
    alongMax = Math.max(alongMax, along);
    acrossMin = Math.min(acrossMin, across);
    acrossMax = Math.max(acrossMax, across);
  }
  return { alongMin, alongMax, acrossMin, acrossMax };
}
