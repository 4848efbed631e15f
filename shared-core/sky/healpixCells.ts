import { compressBits, facePoint, pointOnFace } from './healpix.ts';

/**
 * Corners of HEALPix cells (NESTED numbers) as whole numbers, so that cells know their neighbours by the corners
 * they share, without rounding and without tables. Corners lie on rings 0 (north pole) to 4 nside, and on a ring at
 * whole steps of 45 degrees over its length.
 */

/** Corners of a cell in order south, east, north, west: counter-clockwise seen from outside. */
export const CORNER_X = [0, 1, 1, 0] as const;
export const CORNER_Y = [0, 0, 1, 1] as const;

export interface CellPlace {
  readonly face: number;
  readonly x: number;
  readonly y: number;
}

export function cellPlace(nside: number, pixel: number): CellPlace {
  const area = nside * nside;
  const face = Math.floor(pixel / area);
  const inFace = pixel - face * area;
  return { face, x: compressBits(inFace), y: compressBits(inFace >>> 1) };
}

/** A number that all cells meeting at the corner (x, y), whole from 0 to nside, of a face agree on. */
export function cornerKey(nside: number, face: number, x: number, y: number): number {
  const band = Math.floor(face / 4);
  const ring = (2 + band) * nside - x - y;
  const length = Math.min(ring, 4 * nside - ring, nside);
  // Longitude of the face's middle in steps of 45 degrees: 1 3 5 7 in the north and south, 0 2 4 6 between.
  const middle = 2 * (face % 4) + (band === 1 ? 0 : 1);
  const around = 8 * length;
  const step = length === 0 ? 0 : (middle * length + x - y + around) % around;
  return ring * 8 * nside + step;
}

/** How many cells meet at a corner: three at the eight corners where an equatorial face ends, else four. */
export function cellsAtCorner(nside: number, key: number): number {
  const ring = Math.floor(key / (8 * nside));
  if (ring !== nside && ring !== 3 * nside) return 4;
  return (key - ring * 8 * nside) % (2 * nside) === 0 ? 3 : 4;
}

/** Corners of a cell, south, east, north, west, in degrees. */
export function cellCorners(nside: number, pixel: number): { raDeg: number; decDeg: number }[] {
  const { face, x, y } = cellPlace(nside, pixel);
  return CORNER_X.map((dx, k) => {
    pointOnFace(nside, face, x + dx, y + CORNER_Y[k]!);
    return { raDeg: facePoint.raDeg, decDeg: facePoint.decDeg };
  });
}
