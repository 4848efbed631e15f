import type { ViewName } from '../types.ts';
import { type Pose, pixelMatrix, project, type Viewport } from './projection.ts';
import { add, cross, dot, type Frame, outOfFrame, scale, unit, type Vec3 } from './vector.ts';

/** Free room around the picture, in CSS pixels. */
export interface Margins {
  readonly left: number;
  readonly right: number;
  readonly top: number;
  readonly bottom: number;
}

/** Looking along -z with y up: display space as it is. */
export const FRONT: Frame = [
  [1, 0, 0],
  [0, 1, 0],
  [0, 0, 1],
];

/** Axes of a viewer at an angle: first turned about the upright (y), then raised. Radians. */
export function turned(yaw: number, pitch: number): Frame {
  const back: Vec3 = [Math.cos(pitch) * Math.sin(yaw), Math.sin(pitch), Math.cos(pitch) * Math.cos(yaw)];
  const right: Vec3 = [Math.cos(yaw), 0, -Math.sin(yaw)];
  return [right, cross(back, right), back];
}

/** Axes of a viewer in a direction, with the upright direction up on the screen; the two must not be parallel. */
export function lookingFrom(direction: Vec3, upright: Vec3): Frame {
  const back = unit(direction);
  const right = unit(cross(upright, back));
  return [right, cross(back, right), back];
}

/** Side-on: display x from `min` to `max` falls on the strip's axis, from its left to its right inset. */
export function sideOnPose(
  min: number,
  max: number,
  viewport: Viewport,
  insets: { readonly leftPx: number; readonly rightPx: number },
  centreY: number,
): Pose {
  const width = Math.max(1, viewport.widthPx - insets.leftPx - insets.rightPx);
  const unitsPerPixel = (max - min) / width;
  return {
    axes: FRONT,
    target: [min + (viewport.widthPx / 2 - insets.leftPx) * unitsPerPixel, centreY, 0],
    unitsPerPixel,
    perspective: 0,
  };
}

/** The window of the radial axis that a side-on pose shows: the inverse of sideOnPose. */
export function axisWindowOf(
  pose: Pose,
  viewport: Viewport,
  insets: { readonly leftPx: number; readonly rightPx: number },
): [min: number, max: number] {
  const min = pose.target[0] - (viewport.widthPx / 2 - insets.leftPx) * pose.unitsPerPixel;
  return [min, min + (viewport.widthPx - insets.leftPx - insets.rightPx) * pose.unitsPerPixel];
}

/**
 * Moves and scales a pose so that the points (three numbers each) fill the stage inside the margins.
 * Exact for orthographic views; with perspective it is repeated until it settles.
 */
export function fitPose(pose: Pose, points: ArrayLike<number>, viewport: Viewport, margins: Margins): Pose {
  let fitted = pose;
  const rounds = pose.perspective === 0 ? 2 : 6;
  for (let round = 0; round < rounds; round++) {
    const matrix = pixelMatrix(fitted, viewport);
    let left = Number.POSITIVE_INFINITY;
    let right = Number.NEGATIVE_INFINITY;
    let top = Number.POSITIVE_INFINITY;
    let bottom = Number.NEGATIVE_INFINITY;
    for (let i = 0; i + 2 < points.length; i += 3) {
      const p = project(matrix, points[i]!, points[i + 1]!, points[i + 2]!);
      if (!p) continue;
      left = Math.min(left, p[0]);
      right = Math.max(right, p[0]);
      top = Math.min(top, p[1]);
      bottom = Math.max(bottom, p[1]);
    }
    if (!(right > left) && !(bottom > top)) return fitted;
    const width = Math.max(40, viewport.widthPx - margins.left - margins.right);
    const height = Math.max(40, viewport.heightPx - margins.top - margins.bottom);
    const grow = Math.max((right - left) / width, (bottom - top) / height, 1e-6);
    const unitsPerPixel = fitted.unitsPerPixel * grow;
    const dx = (left + right) / 2 - viewport.widthPx / 2;
    const dy = (top + bottom) / 2 - viewport.heightPx / 2;
    const shiftX = dx * fitted.unitsPerPixel - ((margins.left - margins.right) / 2) * unitsPerPixel;
    const shiftY = dy * fitted.unitsPerPixel - ((margins.top - margins.bottom) / 2) * unitsPerPixel;
    fitted = {
      ...fitted,
      unitsPerPixel,
      target: add(fitted.target, add(scale(fitted.axes[0], shiftX), scale(fitted.axes[1], -shiftY))),
    };
  }
  return fitted;
}

/** The starting pose of a view other than side-on and parallel, before it is fitted to what is drawn. */
export function viewPose(view: ViewName, centre: Vec3): Pose {
  const base = { target: centre, unitsPerPixel: 0.002 };
  switch (view) {
    case 'downTheCone':
      // A little behind the observer's seat, so that near and far outlines stand apart.
      return { ...base, axes: turned(-Math.PI / 2, 0), target: [0.65, 0, 0], perspective: 1 / 1.15 };
    case 'fromBehind':
      return { ...base, axes: turned(Math.PI / 2 - 0.42, 0.3), perspective: 1 / 2.6 };
    case 'whole':
      return { ...base, axes: turned(-0.62, 0.38), perspective: 1 / 3.4 };
    default:
      return { ...base, axes: FRONT, perspective: 0 };
  }
}

/** The pose turned about its target by angles (radians): about the upright axis of display space, then the screen's right. */
export function orbited(pose: Pose, yaw: number, pitch: number, upright: Vec3): Pose {
  const turnedBack = pose.axes.map((axis) => rotated(axis, upright, yaw)) as unknown as Frame;
  const right = turnedBack[0];
  const axes = turnedBack.map((axis) => rotated(axis, right, pitch)) as unknown as Frame;
  const back = unit(axes[2]);
  const straight = unit(cross(axes[1], back));
  return { ...pose, axes: [straight, cross(back, straight), back] };
}

/** v turned about a unit axis, right-handed (Rodrigues' formula). */
export function rotated(v: Vec3, axis: Vec3, angle: number): Vec3 {
  const c = Math.cos(angle);
  return add(add(scale(v, c), scale(cross(axis, v), Math.sin(angle))), scale(axis, dot(axis, v) * (1 - c)));
}

/** The pose moved so that what was at one pixel comes to another (in the plane of the target). */
export function panned(pose: Pose, dxPx: number, dyPx: number): Pose {
  const move = outOfFrame(pose.axes, [-dxPx * pose.unitsPerPixel, dyPx * pose.unitsPerPixel, 0]);
  return { ...pose, target: add(pose.target, move) };
}

/** The pose zoomed by a factor (above 1: nearer) with the pixel (x, y) held still in the plane of the target. */
export function zoomed(pose: Pose, factor: number, xPx: number, yPx: number, viewport: Viewport): Pose {
  const unitsPerPixel = pose.unitsPerPixel / factor;
  const change = pose.unitsPerPixel - unitsPerPixel;
  const dx = (xPx - viewport.widthPx / 2) * change;
  const dy = (yPx - viewport.heightPx / 2) * change;
  return { ...pose, unitsPerPixel, target: add(pose.target, outOfFrame(pose.axes, [dx, -dy, 0])) };
}

/** Between two poses, 0..1: the axes turn along the shortest way, the scale changes by equal ratios. */
export function mixPoses(a: Pose, b: Pose, t: number): Pose {
  if (t <= 0) return a;
  if (t >= 1) return b;
  const mixVec = (u: Vec3, v: Vec3): Vec3 => add(scale(u, 1 - t), scale(v, t));
  return {
    axes: mixFrames(a.axes, b.axes, t),
    target: mixVec(a.target, b.target),
    unitsPerPixel: a.unitsPerPixel ** (1 - t) * b.unitsPerPixel ** t,
    perspective: (1 - t) * a.perspective + t * b.perspective,
  };
}

/** The rotation from one frame to the other, done in part: about its own axis. */
function mixFrames(a: Frame, b: Frame, t: number): Frame {
  // The rotation that takes a's axes to b's: R = sum over i of b_i a_i^T; its axis and angle from trace and skew part.
  const r = (i: number, j: number): number => {
    let sum = 0;
    for (let k = 0; k < 3; k++) sum += b[k]![i]! * a[k]![j]!;
    return sum;
  };
  const cosine = Math.min(1, Math.max(-1, (r(0, 0) + r(1, 1) + r(2, 2) - 1) / 2));
  const angle = Math.acos(cosine);
  if (angle < 1e-9) return b;
  let axis: Vec3 = [r(2, 1) - r(1, 2), r(0, 2) - r(2, 0), r(1, 0) - r(0, 1)];
  if (Math.hypot(...axis) < 1e-6) {
    // Half a turn: the axis is the direction that the rotation keeps, (R + 1) times any vector not lost by it.
    const columns = [0, 1, 2].map(
      (j): Vec3 => [r(0, j) + (j === 0 ? 1 : 0), r(1, j) + (j === 1 ? 1 : 0), r(2, j) + (j === 2 ? 1 : 0)],
    );
    columns.sort((u, v) => Math.hypot(...v) - Math.hypot(...u));
    axis = columns[0]!;
  }
  const about = unit(axis);
  return a.map((v) => rotated(v, about, t * angle)) as unknown as Frame;
}
