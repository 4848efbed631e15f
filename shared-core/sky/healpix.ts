import { asin, cos, sin } from '../numerics/elementary/elementary.ts';
import { RAD_PER_DEG } from './vectors.ts';

/**
 * HEALPix (Gorski et al. 2005, ApJ 622, 759): the sphere in 12 nside^2 pixels of equal area. Integers only inside,
 * no allocation: made for loops over ten million galaxies. nside is a power of two up to 8192, so that every number
 * fits in 31 bits. RA and Dec stand for the scheme's longitude and latitude, in degrees.
 *
 * A pixel is known as a face (0-11) and x (north-east), y (north-west) in it, counted from the face's south corner.
 */

export const MAX_NSIDE = 8192;

const HALF_PI = Math.PI / 2;
/** Ring of each face's north corner in units of nside, and longitude of its middle in units of 45 degrees. */
export const FACE_RING = [2, 2, 2, 2, 3, 3, 3, 3, 4, 4, 4, 4] as const;
export const FACE_LON = [1, 3, 5, 7, 0, 2, 4, 6, 1, 3, 5, 7] as const;

export function isNside(nside: number): boolean {
  return Number.isInteger(nside) && nside >= 1 && nside <= MAX_NSIDE && (nside & (nside - 1)) === 0;
}

/** @throws Error: a fault of the caller, not of a user */
function checkNside(nside: number): void {
  if (!isNside(nside)) {
    throw new Error(`nside is ${nside} but must be a power of two from 1 to ${MAX_NSIDE}`);
  }
}

export function checkPixel(nside: number, pixel: number): void {
  checkNside(nside);
  if (!(Number.isInteger(pixel) && pixel >= 0 && pixel < 12 * nside * nside)) {
    throw new Error(`pixel is ${pixel} but must be from 0 to ${12 * nside * nside - 1} for nside ${nside}`);
  }
}

export function pixelCount(nside: number): number {
  checkNside(nside);
  return 12 * nside * nside;
}

/** Area of a pixel in square degrees, the same for all. */
export function pixelAreaDeg2(nside: number): number {
  return (4 * Math.PI) / pixelCount(nside) / (RAD_PER_DEG * RAD_PER_DEG);
}

/** Square root of a pixel's area in degrees. */
export function pixelSizeDeg(nside: number): number {
  return Math.sqrt(pixelAreaDeg2(nside));
}

/** The 13 low bits of x on the even places: x = abc gives 0a0b0c. */
function spread(x: number): number {
  let v = x;
  v = (v | (v << 8)) & 0x00ff00ff;
  v = (v | (v << 4)) & 0x0f0f0f0f;
  v = (v | (v << 2)) & 0x33333333;
  return (v | (v << 1)) & 0x55555555;
}

/** The even places of v moved together: the inverse of spread. */
export function compressBits(v: number): number {
  let x = v & 0x55555555;
  x = (x | (x >>> 1)) & 0x33333333;
  x = (x | (x >>> 2)) & 0x0f0f0f0f;
  x = (x | (x >>> 4)) & 0x00ff00ff;
  return (x | (x >>> 8)) & 0x0000ffff;
}

/** NESTED number of pixel (x, y) of a face. */
export function faceToNest(nside: number, face: number, x: number, y: number): number {
  return face * nside * nside + (spread(x) | (spread(y) << 1));
}

/** What locate() found: read at once, before the next call. One object, so that no call allocates. */
const found = { face: 0, x: 0, y: 0 };

function locate(nside: number, raDeg: number, decDeg: number): void {
  const dec = decDeg * RAD_PER_DEG;
  const z = sin(dec);
  const height = Math.abs(z);
  let quarter = raDeg / 90;
  quarter -= 4 * Math.floor(quarter / 4);
  // Rounding can turn a tiny negative RA into a full circle.
  if (quarter >= 4) quarter = 0;
  if (height <= 2 / 3) {
    // Lines of constant x and of constant y are straight in (RA, z): count those passed.
    const across = nside * (0.5 + quarter);
    const up = nside * z * 0.75;
    const falling = Math.floor(across - up);
    const rising = Math.floor(across + up);
    const fallingFace = Math.floor(falling / nside);
    const risingFace = Math.floor(rising / nside);
    if (fallingFace === risingFace) found.face = (fallingFace & 3) + 4;
    else found.face = fallingFace < risingFace ? fallingFace & 3 : (risingFace & 3) + 8;
    found.x = rising & (nside - 1);
    found.y = nside - (falling & (nside - 1)) - 1;
    return;
  }
  const sector = Math.floor(quarter);
  const part = quarter - sector;
  // nside sqrt(3 (1 - |z|)), with 1 - |z| = cos^2/(1 + |z|) that keeps its digits at the pole.
  const fromPole = nside * cos(dec) * Math.sqrt(3 / (1 + height));
  const east = Math.min(nside - 1, Math.floor(part * fromPole));
  const west = Math.min(nside - 1, Math.floor((1 - part) * fromPole));
  if (z >= 0) {
    found.face = sector;
    found.x = nside - west - 1;
    found.y = nside - east - 1;
  } else {
    found.face = sector + 8;
    found.x = east;
    found.y = west;
  }
}

/** NESTED pixel (what this program uses throughout) that holds a sky position; any finite RA, Dec in [-90, 90]. */
export function raDecToNest(nside: number, raDeg: number, decDeg: number): number {
  checkNside(nside);
  locate(nside, raDeg, decDeg);
  return faceToNest(nside, found.face, found.x, found.y);
}

/** Where pointOnFace() arrived: read at once, before the next call. */
export const facePoint = { raDeg: 0, decDeg: 0 };

/**
 * Sky position of the point (x, y) of a face in units of pixels, 0 to nside, whole numbers being pixel corners;
 * the answer is put into facePoint. Gorski et al. 2005, eqs. 4-9, for real x and y.
 */
export function pointOnFace(nside: number, face: number, x: number, y: number): void {
  const ring = FACE_RING[face]! * nside - x - y;
  let length = nside;
  if (ring < nside || ring > 3 * nside) {
    length = ring < nside ? ring : 4 * nside - ring;
    // 1 - |z| = length^2 / (3 nside^2) = 2 sin^2(half the distance from the pole).
    const fromPole = 2 * asin(length / (nside * Math.sqrt(6)));
    facePoint.decDeg = ((ring < nside ? HALF_PI - fromPole : fromPole - HALF_PI) * 180) / Math.PI;
  } else {
    facePoint.decDeg = (asin(((2 * nside - ring) * 2) / (3 * nside)) * 180) / Math.PI;
  }
  const turn = length > 0 ? FACE_LON[face]! + (x - y) / length : 0;
  facePoint.raDeg = 45 * (turn < 0 ? turn + 8 : turn >= 8 ? turn - 8 : turn);
}

/** Centre of a NESTED pixel in degrees. */
export function nestToRaDec(nside: number, pixel: number): { raDeg: number; decDeg: number } {
  checkPixel(nside, pixel);
  const area = nside * nside;
  const face = Math.floor(pixel / area);
  const inFace = pixel - face * area;
  pointOnFace(nside, face, compressBits(inFace) + 0.5, compressBits(inFace >>> 1) + 0.5);
  return { raDeg: facePoint.raDeg, decDeg: facePoint.decDeg };
}
