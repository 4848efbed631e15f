import { describe, expect, it } from 'vitest';
import {
  isNside,
  nestToRaDec,
  pixelAreaDeg2,
  pixelCount,
  raDecToNest,
} from '../../../shared-core/sky/healpix.ts';
import { cellCorners } from '../../../shared-core/sky/healpixCells.ts';
import { nestToRing, raDecToRing, ringToNest, ringToRaDec } from '../../../shared-core/sky/healpixRing.ts';
import { RAD_PER_DEG, separationDeg } from '../../../shared-core/sky/vectors.ts';
import { evenPositions, seeded } from './sample.ts';

describe('values computed with healpy', () => {
  it('pixel area, nside 64', () => expect(pixelAreaDeg2(64)).toBeCloseTo(0.8392936452, 10));

  it.each([
    [10, 20, 16007, 19863, 1033273, 1271256],
    [150.1, 2.2, 23530, 27258, 1513302, 1744528],
    [123.456, -67.89, 47333, 37453, 3029414, 2397035],
  ])('(%d, %d) to pixel', (ra, dec, ring64, nest64, ring512, nest512) => {
    expect([
      raDecToRing(64, ra, dec),
      raDecToNest(64, ra, dec),
      raDecToRing(512, ra, dec),
      raDecToNest(512, ra, dec),
    ]).toEqual([ring64, nest64, ring512, nest512]);
  });

  it.each([
    [4, 0, 0.979166667, 45],
    [4, 50, 0.5, 225],
    [8, 300, 0.25, 315],
  ])('centre of RING pixel nside %d, %d', (nside, pixel, z, phi) => {
    const { raDeg, decDeg } = ringToRaDec(nside, pixel);
    expect(Math.sin(decDeg * RAD_PER_DEG)).toBeCloseTo(z, 9);
    expect(raDeg).toBeCloseTo(phi, 9);
  });

  it('RING to NESTED', () => {
    expect([ringToNest(4, 100), ringToNest(8, 300)]).toEqual([118, 195]);
  });
});

describe('invariants', () => {
  it('numberings are permutations of each other, and every centre lies in its pixel', () => {
    for (const nside of [1, 2, 4, 16, 32]) {
      const seen = new Set<number>();
      for (let pixel = 0; pixel < pixelCount(nside); pixel++) {
        const ring = nestToRing(nside, pixel);
        seen.add(ring);
        const { raDeg, decDeg } = nestToRaDec(nside, pixel);
        if (ringToNest(nside, ring) !== pixel || raDecToNest(nside, raDeg, decDeg) !== pixel) {
          throw new Error(`pixel ${pixel} of nside ${nside} does not come back`);
        }
      }
      expect(seen.size).toBe(pixelCount(nside));
    }
  });

  it('centres of the finest pixels come back', () => {
    const random = seeded(64);
    for (let i = 0; i < 2000; i++) {
      const pixel = Math.floor(random() * pixelCount(8192));
      const { raDeg, decDeg } = nestToRaDec(8192, pixel);
      expect(raDecToNest(8192, raDeg, decDeg)).toBe(pixel);
      expect(ringToNest(8192, nestToRing(8192, pixel))).toBe(pixel);
    }
  });

  it('RING numbers rise from north to south', () => {
    for (const nside of [4, 32]) {
      let last = 90;
      for (let pixel = 0; pixel < pixelCount(nside); pixel++) {
        const { decDeg } = ringToRaDec(nside, pixel);
        expect(decDeg).toBeLessThanOrEqual(last + 1e-12);
        last = decDeg;
      }
    }
  });

  it('four NESTED neighbours make the coarser pixel', () => {
    for (const [ra, dec] of evenPositions(2000)) {
      expect(raDecToNest(1024, ra, dec)).toBe(raDecToNest(8192, ra, dec) >>> 6);
    }
  });

  it('positions on the edge of the map: poles, RA 0 and 360, negative RA', () => {
    for (const nside of [1, 8, 8192]) {
      for (const ra of [0, 90, 180, 270, 360, -1e-20, -360, 720]) {
        for (const dec of [90, -90, 0, 41.8103149, -41.8103149]) {
          const pixel = raDecToNest(nside, ra, dec);
          expect(pixel).toBeGreaterThanOrEqual(0);
          expect(pixel).toBeLessThan(pixelCount(nside));
          expect(raDecToNest(nside, ra + 360, dec)).toBe(pixel);
        }
      }
    }
  });

  it('corners stand around the centre, and neighbours share them', () => {
    for (const pixel of [0, 15, 16, 100, 191]) {
      const { raDeg, decDeg } = nestToRaDec(4, pixel);
      for (const corner of cellCorners(4, pixel)) {
        const away = separationDeg(raDeg, decDeg, corner.raDeg, corner.decDeg);
        expect(away).toBeGreaterThan(5);
        expect(away).toBeLessThan(16);
      }
    }
  });

  it('an nside or pixel that is none is a fault of the caller', () => {
    expect([1, 2, 8192].every(isNside)).toBe(true);
    expect([0, 3, -4, 1.5, 16384, Number.NaN].some(isNside)).toBe(false);
    expect(() => raDecToNest(3, 0, 0)).toThrow(/nside is 3/);
    expect(() => nestToRing(4, 192)).toThrow(/pixel is 192/);
    expect(() => ringToNest(4, -1)).toThrow(/pixel is -1/);
    expect(() => nestToRaDec(4, 0.5)).toThrow(/pixel is 0.5/);
  });
});
