import {
  checkPixel,
  compressBits,
  FACE_LON,
  FACE_RING,
  faceToNest,
  nestToRaDec,
  raDecToNest,
} from './healpix.ts';

/** The RING numbering of HEALPix, along parallels from north to south, which other programs' maps often use. */

/** RING number of pixel (x, y) of a face. */
function faceToRing(nside: number, face: number, x: number, y: number): number {
  const ring = FACE_RING[face]! * nside - x - y - 1;
  let length = nside;
  let shift = 0;
  let before: number;
  if (ring < nside) {
    length = ring;
    before = 2 * length * (length - 1);
  } else if (ring > 3 * nside) {
    length = 4 * nside - ring;
    before = 12 * nside * nside - 2 * (length + 1) * length;
  } else {
    before = 2 * nside * (nside - 1) + (ring - nside) * 4 * nside;
    shift = (ring - nside) & 1;
  }
  // Pixels of the ring are counted from RA 0; (1 + shift) is that of the first pixel's centre, in half steps.
  let place = (FACE_LON[face]! * length + x - y + 1 + shift) >> 1;
  if (place > 4 * length) place -= 4 * length;
  else if (place < 1) place += 4 * length;
  return before + place - 1;
}

/** RING number of a NESTED pixel. */
export function nestToRing(nside: number, pixel: number): number {
  checkPixel(nside, pixel);
  const area = nside * nside;
  const face = Math.floor(pixel / area);
  const inFace = pixel - face * area;
  return faceToRing(nside, face, compressBits(inFace), compressBits(inFace >>> 1));
}

/** Whole part of the square root of a number below 2^52. */
function isqrt(v: number): number {
  let root = Math.floor(Math.sqrt(v));
  if (root * root > v) root--;
  else if ((root + 1) * (root + 1) <= v) root++;
  return root;
}

/** NESTED number of a RING pixel. */
export function ringToNest(nside: number, pixel: number): number {
  checkPixel(nside, pixel);
  const total = 12 * nside * nside;
  const cap = 2 * nside * (nside - 1);
  let ring: number;
  let place: number;
  let length: number;
  let shift = 0;
  let face: number;
  if (pixel < cap) {
    ring = (1 + isqrt(1 + 2 * pixel)) >> 1;
    place = pixel + 1 - 2 * ring * (ring - 1);
    length = ring;
    face = Math.floor((place - 1) / length);
  } else if (pixel < total - cap) {
    const inBelt = pixel - cap;
    const row = Math.floor(inBelt / (4 * nside));
    ring = row + nside;
    place = inBelt - row * 4 * nside + 1;
    shift = row & 1;
    length = nside;
    // How far the place lies along the falling and the rising diagonals, in faces.
    const rise = ring - nside + 1;
    const fall = 2 * nside + 2 - rise;
    const falling = Math.floor((place - (rise >> 1) + nside - 1) / nside);
    const rising = Math.floor((place - (fall >> 1) + nside - 1) / nside);
    if (rising === falling) face = (rising & 3) + 4;
    else face = rising < falling ? rising & 3 : (falling & 3) + 8;
  } else {
    const fromEnd = total - pixel;
    length = (1 + isqrt(2 * fromEnd - 1)) >> 1;
    ring = 4 * nside - length;
    place = 4 * length + 1 - (fromEnd - 2 * length * (length - 1));
    face = 8 + Math.floor((place - 1) / length);
  }
  // The face's own rows (x + y) and columns (x - y).
  const row = ring - FACE_RING[face]! * nside + 1;
  let column = 2 * place - FACE_LON[face]! * length - shift - 1;
  if (column >= 2 * nside) column -= 8 * nside;
  return faceToNest(nside, face, (column - row) >> 1, (-column - row) >> 1);
}

/** RING pixel that holds a sky position; any finite RA, Dec in [-90, 90]. */
export function raDecToRing(nside: number, raDeg: number, decDeg: number): number {
  return nestToRing(nside, raDecToNest(nside, raDeg, decDeg));
}

/** Centre of a RING pixel in degrees. */
export function ringToRaDec(nside: number, pixel: number): { raDeg: number; decDeg: number } {
  return nestToRaDec(nside, ringToNest(nside, pixel));
}
