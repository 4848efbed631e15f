import { readFileSync } from 'node:fs';
import { describe, expect, it } from 'vitest';
import { compileRegion } from '../../shared-core/sky/compileRegion.ts';
import { nestToRaDec, raDecToNest } from '../../shared-core/sky/healpix.ts';
import { cellCorners } from '../../shared-core/sky/healpixCells.ts';
import { nestToRing, raDecToRing, ringToNest, ringToRaDec } from '../../shared-core/sky/healpixRing.ts';
import { BORDER, classifyCells } from '../../shared-core/sky/occupiedCells.ts';
import { parseRegionShape } from '../../shared-core/sky/regionText.ts';
import { raDecToUnit, separationDeg } from '../../shared-core/sky/vectors.ts';

// Computed by healpy with sky-healpy.py
type Row<N extends number> = number[] & { length: N };
interface Table {
  healpy: string;
  /** nside, RA, Dec, NESTED, RING, RA and Dec of the centre. */
  pixels: Row<7>[];
  /** nside, NESTED, then the unit vectors of the south, east, north and west corner. */
  corners: Row<14>[];
  interiors: { nside: number; cells: number[]; interior: number[] }[];
  areas: { name: string; parts: string[]; holes: string[]; areaDeg2: number; toleranceDeg2: number }[];
}
const table = JSON.parse(readFileSync(new URL('sky-healpy.json', import.meta.url), 'utf8')) as Table;

/** Pixel centres and corners agree to this: a ten-millionth of the smallest pixel. */
const SAME_DEG = 1e-9;

describe('HEALPix numbers of healpy', () => {
  it('position to pixel, both numberings, nside 1 to 8192', () => {
    for (const [nside, ra, dec, nest, ring] of table.pixels) {
      expect([raDecToNest(nside!, ra!, dec!), raDecToRing(nside!, ra!, dec!)]).toEqual([nest, ring]);
    }
    expect(table.pixels.length).toBe(14 * 25);
  });

  it('NESTED to RING and back', () => {
    for (const [nside, , , nest, ring] of table.pixels) {
      expect(nestToRing(nside!, nest!)).toBe(ring);
      expect(ringToNest(nside!, ring!)).toBe(nest);
    }
  });

  it('pixel centres', () => {
    for (const [nside, , , nest, ring, ra, dec] of table.pixels) {
      const centre = nestToRaDec(nside!, nest!);
      expect(separationDeg(centre.raDeg, centre.decDeg, ra!, dec!)).toBeLessThan(SAME_DEG);
      expect(ringToRaDec(nside!, ring!)).toEqual(centre);
    }
  });

  it('pixel corners', () => {
    for (const [nside, nest, ...vectors] of table.corners) {
      cellCorners(nside!, nest!).forEach(({ raDeg, decDeg }, k) => {
        const ours = raDecToUnit(raDeg, decDeg);
        for (let i = 0; i < 3; i++) expect(ours[i]).toBeCloseTo(vectors[3 * k + i]!, 12);
      });
    }
  });

  it('cells with all neighbours in the set (healpy get_all_neighbours)', () => {
    for (const { nside, cells, interior } of table.interiors) {
      const set = { nside, cells: Uint32Array.from(cells), counts: new Uint32Array(cells.length).fill(1) };
      const ours = Array.from(classifyCells(set), (kind) => (kind === BORDER ? 0 : 1));
      expect(ours).toEqual(interior);
    }
  });
});

describe('areas counted in turned pixels of healpy, nside 1024', () => {
  // The tolerance is that of the count: three times the root of the number of pixels on the border.
  it.each(table.areas)('$name', ({ parts, holes, areaDeg2, toleranceDeg2 }) => {
    const region = { parts: parts.map(parseRegionShape), holes: holes.map(parseRegionShape) };
    expect(Math.abs(compileRegion(region).areaDeg2 - areaDeg2)).toBeLessThan(toleranceDeg2);
  });
});
