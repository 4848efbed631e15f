import type { Pose } from './projection.ts';
import { dot, type Vec3 } from './vector.ts';

/** Light by depth: row . (p, 1), kept between `least` and 1, for p a sky direction times a radius. */
export interface DepthCue {
  readonly row: readonly [number, number, number, number];
  readonly least: number;
}

/** Where things begin and end along the line of sight, from the middle of the display on, in its units. */
export interface DepthRange {
  readonly near: number;
  readonly far: number;
}

const away = ({ axes: [, , back] }: Pose): Vec3 => [-back[0], -back[1], -back[2]];

/** @param corners points in display space, three numbers each */
export function depthRange(pose: Pose, corners: ArrayLike<number>): DepthRange {
  const direction = away(pose);
  let near = Number.POSITIVE_INFINITY;
  let far = Number.NEGATIVE_INFINITY;
  for (let i = 0; i + 2 < corners.length; i += 3) {
    const depth = dot(direction, [corners[i]!, corners[i + 1]!, corners[i + 2]!]);
    near = Math.min(near, depth);
    far = Math.max(far, depth);
  }
  return { near, far };
}

/**
 * Full light at the near end of the range, `cue` of it less at the far end, evenly between.
 *
 * @param model three rows of four from sky coordinates to display space
 * @param cue 0..1; null is answered for 0, and for a range without depth
 */
export function depthCue(
  pose: Pose,
  model: ArrayLike<number>,
  { near, far }: DepthRange,
  cue: number,
): DepthCue | null {
  if (cue === 0 || !(far > near)) return null;
  const direction = away(pose);
  const slope = cue / (far - near);
  const column = (k: number): number =>
    direction[0] * model[k]! + direction[1] * model[4 + k]! + direction[2] * model[8 + k]!;
  return {
    row: [-slope * column(0), -slope * column(1), -slope * column(2), 1 - slope * (column(3) - near)],
    least: 1 - cue,
  };
}

/** The part of its light that a place keeps. */
export function lightAt({ row, least }: DepthCue, x: number, y: number, z: number): number {
  return Math.min(1, Math.max(least, row[0] * x + row[1] * y + row[2] * z + row[3]));
}
