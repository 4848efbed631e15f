import type { Candidates } from './boundary.ts';
import { nestToRaDec, pixelCount, raDecToNest } from './healpix.ts';
import type { CompiledShape } from './shape.ts';
import { angleRad, raDecToUnit } from './vectors.ts';

/** With fewer shapes than this, asking each is quicker than looking up. */
const WORTH_AN_INDEX = 6;
/** No point of a HEALPix pixel is farther from its centre than this over nside (healpy's max_pixrad: below 1.069). */
const PIXEL_REACH = 1.07;

/**
 * Which shapes may hold a point: the sky in cells, each with the shapes whose enclosing cap meets it. Makes a region
 * with thousands of star holes as quick to ask as one with a few.
 */
export function compileShapeIndex(shapes: readonly CompiledShape[]): Candidates {
  if (shapes.length < WORTH_AN_INDEX) {
    const all = shapes.map((_, s) => s);
    return () => all;
  }
  const nside = shapes.length < 100 ? 16 : 64;
  const reach = PIXEL_REACH / nside;
  const cells: number[][] = [];
  for (let pixel = 0; pixel < pixelCount(nside); pixel++) {
    const { raDeg, decDeg } = nestToRaDec(nside, pixel);
    const centre = raDecToUnit(raDeg, decDeg);
    const list: number[] = [];
    for (let s = 0; s < shapes.length; s++) {
      const shape = shapes[s]!;
      // Chords are shorter than arcs, so a chord beyond the reach settles the common case without atan2.
      const limit = reach + shape.radiusRad;
      const [x, y, z] = shape.centre;
      const chord2 = (x - centre[0]) ** 2 + (y - centre[1]) ** 2 + (z - centre[2]) ** 2;
      if (chord2 > limit * limit) continue;
      if (angleRad(shape.centre, centre) <= limit) list.push(s);
    }
    cells.push(list);
  }
  return (raDeg, decDeg) => cells[raDecToNest(nside, raDeg, decDeg)]!;
}
