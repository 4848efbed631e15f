import type { Frame, Vec3 } from './vector.ts';
import { dot } from './vector.ts';

/**
 * Where the viewer stands. `axes` are right, up and back (toward the viewer) in display space. `perspective` is one
 * over the distance from the eye to the target: 0 is an orthographic view, so that the two are one family and a
 * view can move from one to the other.
 */
export interface Pose {
  readonly axes: Frame;
  readonly target: Vec3;
  /** Display units for one CSS pixel in the plane of the target. */
  readonly unitsPerPixel: number;
  readonly perspective: number;
}

export interface Viewport {
  readonly widthPx: number;
  readonly heightPx: number;
  /** How much larger rulers are, and the room that they need; 1 if not given. */
  readonly enlarged?: number;
}

/**
 * Three rows of four numbers: for a point p, X = row0 . (p, 1), Y and W likewise, and its pixel is (X/W, Y/W),
 * y downward. W is 1 in the plane of the target, grows away from the viewer, and is 1 throughout when orthographic.
 */
export type PixelMatrix = Float64Array;

/** W below this is beside or behind the eye: not drawn. */
export const NEAREST_W = 0.02;

/** The matrix from display space to pixels of the stage. */
export function pixelMatrix(pose: Pose, viewport: Viewport): PixelMatrix {
  const [right, up, back] = pose.axes;
  const s = 1 / pose.unitsPerPixel;
  const p = pose.perspective;
  const t = pose.target;
  const halfWidth = viewport.widthPx / 2;
  const halfHeight = viewport.heightPx / 2;
  const w = [-p * back[0], -p * back[1], -p * back[2], 1 + p * dot(back, t)] as const;
  const matrix = new Float64Array(12);
  for (let i = 0; i < 3; i++) {
    matrix[i] = s * right[i]! + halfWidth * w[i]!;
    matrix[4 + i] = -s * up[i]! + halfHeight * w[i]!;
    matrix[8 + i] = w[i]!;
  }
  matrix[3] = -s * dot(right, t) + halfWidth * w[3];
  matrix[7] = s * dot(up, t) + halfHeight * w[3];
  matrix[11] = w[3];
  return matrix;
}

/**
 * Display space of one field: rotate a sky direction into the field's frame, stretch it sideways, lift it to its lane.
 * The answer is three rows of four numbers, acting on (x, y, z, 1) in sky coordinates.
 */
export function modelMatrix(frame: Frame, sidewaysFactor: number, liftUp: number): Float64Array {
  const m = new Float64Array(12);
  for (let i = 0; i < 3; i++) {
    m[i] = frame[0][i]!;
    m[4 + i] = frame[1][i]! * sidewaysFactor;
    m[8 + i] = frame[2][i]! * sidewaysFactor;
  }
  m[7] = liftUp;
  return m;
}

/** Product of two matrices of three rows of four: first `model`, then `pixel`. */
export function compose(pixel: ArrayLike<number>, model: ArrayLike<number>): Float64Array {
  const out = new Float64Array(12);
  for (let row = 0; row < 3; row++) {
    for (let column = 0; column < 4; column++) {
      let sum = column === 3 ? pixel[row * 4 + 3]! : 0;
      for (let k = 0; k < 3; k++) sum += pixel[row * 4 + k]! * model[k * 4 + column]!;
      out[row * 4 + column] = sum;
    }
  }
  return out;
}

/** Pixel of a point given as a direction and a radius; null when it lies beside or behind the eye. */
export function project(
  matrix: ArrayLike<number>,
  x: number,
  y: number,
  z: number,
  radius = 1,
): [xPx: number, yPx: number] | null {
  const w = radius * (matrix[8]! * x + matrix[9]! * y + matrix[10]! * z) + matrix[11]!;
  if (!(w > NEAREST_W)) return null;
  const px = radius * (matrix[0]! * x + matrix[1]! * y + matrix[2]! * z) + matrix[3]!;
  const py = radius * (matrix[4]! * x + matrix[5]! * y + matrix[6]! * z) + matrix[7]!;
  return [px / w, py / w];
}

/** The same matrix as columns of a 4x4 clip matrix for WebGL, without depth (every z is 0). */
export function clipMatrix(pixel: ArrayLike<number>, viewport: Viewport): Float32Array {
  const out = new Float32Array(16);
  const sx = 2 / viewport.widthPx;
  const sy = 2 / viewport.heightPx;
  for (let column = 0; column < 4; column++) {
    const w = pixel[8 + column]!;
    out[column * 4] = pixel[column]! * sx - w;
    out[column * 4 + 1] = w - pixel[4 + column]! * sy;
    out[column * 4 + 2] = 0;
    out[column * 4 + 3] = w;
  }
  return out;
}
