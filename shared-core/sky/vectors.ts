import { atan2, cos, hypot, sin } from '../numerics/elementary/elementary.ts';

/** A direction as a unit vector: x to RA 0, y to RA 90, z to the north celestial pole. */
export type Vec3 = readonly [x: number, y: number, z: number];

export const RAD_PER_DEG = Math.PI / 180;
export const DEG_PER_RAD = 180 / Math.PI;
/** Square degrees in a steradian. */
export const DEG2_PER_SR = DEG_PER_RAD * DEG_PER_RAD;
export const WHOLE_SKY_DEG2 = 4 * Math.PI * DEG2_PER_SR;

/** The same angle in [0, 360). */
export function normaliseRaDeg(raDeg: number): number {
  if (raDeg >= 0 && raDeg < 360) return raDeg;
  const turned = raDeg - 360 * Math.floor(raDeg / 360);
  // A tiny negative angle rounds up to 360 itself.
  return turned >= 360 ? 0 : turned;
}

/** Whether RA is finite and Dec lies in [-90, 90] degrees. */
export function isPosition(raDeg: number, decDeg: number): boolean {
  return Number.isFinite(raDeg) && decDeg >= -90 && decDeg <= 90;
}

/** Unit vector of a sky position in degrees; any finite RA, Dec in [-90, 90]. */
export function raDecToUnit(raDeg: number, decDeg: number): Vec3 {
  const ra = raDeg * RAD_PER_DEG;
  const dec = decDeg * RAD_PER_DEG;
  // cos(90 deg) is 6e-17 in floating point; a pole is a pole, whatever its RA.
  const cosDec = Math.abs(decDeg) === 90 ? 0 : cos(dec);
  return [cosDec * cos(ra), cosDec * sin(ra), sin(dec)];
}

/** RA in [0, 360) and Dec in [-90, 90] degrees of a vector of any length above 0. */
export function unitToRaDec(v: Vec3): { raDeg: number; decDeg: number } {
  return {
    raDeg: normaliseRaDeg(atan2(v[1], v[0]) * DEG_PER_RAD),
    decDeg: atan2(v[2], hypot(v[0], v[1])) * DEG_PER_RAD,
  };
}

export function dot(a: Vec3, b: Vec3): number {
  return a[0] * b[0] + a[1] * b[1] + a[2] * b[2];
}

export function cross(a: Vec3, b: Vec3): Vec3 {
  return [a[1] * b[2] - a[2] * b[1], a[2] * b[0] - a[0] * b[2], a[0] * b[1] - a[1] * b[0]];
}

export function subtract(a: Vec3, b: Vec3): Vec3 {
  return [a[0] - b[0], a[1] - b[1], a[2] - b[2]];
}

/** s a + t b. */
export function combine(s: number, a: Vec3, t: number, b: Vec3): Vec3 {
  return [s * a[0] + t * b[0], s * a[1] + t * b[1], s * a[2] + t * b[2]];
}

export function norm(a: Vec3): number {
  return hypot(a[0], a[1], a[2]);
}

/** The vector scaled to length 1; its length must be above 0. */
export function unit(a: Vec3): Vec3 {
  const length = norm(a);
  return [a[0] / length, a[1] / length, a[2] / length];
}

/** A unit vector at right angles to `a`. */
export function perpendicular(a: Vec3): Vec3 {
  // Crossed with the axis that is farthest from it, so that the product is never short.
  const [x, y, z] = [Math.abs(a[0]), Math.abs(a[1]), Math.abs(a[2])];
  const axis: Vec3 = x <= y && x <= z ? [1, 0, 0] : y <= z ? [0, 1, 0] : [0, 0, 1];
  return unit(cross(a, axis));
}

/** Angle between two unit vectors in radians: atan2(|a x b|, a.b), exact for small and for large angles. */
export function angleRad(a: Vec3, b: Vec3): number {
  return atan2(norm(cross(a, b)), dot(a, b));
}

/** Angle on the sky between two positions, all in degrees. */
export function separationDeg(ra1Deg: number, dec1Deg: number, ra2Deg: number, dec2Deg: number): number {
  return angleRad(raDecToUnit(ra1Deg, dec1Deg), raDecToUnit(ra2Deg, dec2Deg)) * DEG_PER_RAD;
}

/** Some directions spread over the sphere, in no special relation to the axes: a spiral with the golden angle. */
export const SPREAD_DIRECTIONS: readonly Vec3[] = Array.from({ length: 60 }, (_, i): Vec3 => {
  const z = 1 - (2 * i + 1) / 60;
  const turn = i * Math.PI * (3 - Math.sqrt(5)) + 0.4321;
  const r = Math.sqrt(1 - z * z);
  return [r * cos(turn), r * sin(turn), z];
});
