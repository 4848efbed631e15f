/** Three numbers: x, y, z. */
export type Vec3 = readonly [number, number, number];

/** Rows of a rotation: the three axes of the new frame in the old one. */
export type Frame = readonly [Vec3, Vec3, Vec3];

const DEGREE = Math.PI / 180;

export const dot = (a: Vec3, b: Vec3): number => a[0] * b[0] + a[1] * b[1] + a[2] * b[2];

export const cross = (a: Vec3, b: Vec3): Vec3 => [
  a[1] * b[2] - a[2] * b[1],
  a[2] * b[0] - a[0] * b[2],
  a[0] * b[1] - a[1] * b[0],
];

export const scale = (a: Vec3, factor: number): Vec3 => [a[0] * factor, a[1] * factor, a[2] * factor];

export const add = (a: Vec3, b: Vec3): Vec3 => [a[0] + b[0], a[1] + b[1], a[2] + b[2]];

export const subtract = (a: Vec3, b: Vec3): Vec3 => [a[0] - b[0], a[1] - b[1], a[2] - b[2]];

export const norm = (a: Vec3): number => Math.hypot(a[0], a[1], a[2]);

/** The unit vector along a; a must not be zero. */
export const unit = (a: Vec3): Vec3 => scale(a, 1 / norm(a));

/** Unit vector of a sky position in degrees: x to RA 0, y to RA 90, z to Dec +90. */
export function direction(raDeg: number, decDeg: number): Vec3 {
  const cosDec = Math.cos(decDeg * DEGREE);
  return [cosDec * Math.cos(raDeg * DEGREE), cosDec * Math.sin(raDeg * DEGREE), Math.sin(decDeg * DEGREE)];
}

/** Components of v along the axes of the frame. */
export const intoFrame = (frame: Frame, v: Vec3): Vec3 => [
  dot(frame[0], v),
  dot(frame[1], v),
  dot(frame[2], v),
];

/** The vector with these components along the axes of the frame. */
export const outOfFrame = (frame: Frame, v: Vec3): Vec3 =>
  add(add(scale(frame[0], v[0]), scale(frame[1], v[1])), scale(frame[2], v[2]));
