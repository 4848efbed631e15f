import fc from 'fast-check';
import { describe, expect, it } from 'vitest';
import { normaliseRaDeg, raDecToUnit, separationDeg, unitToRaDec } from '../../../shared-core/sky/vectors.ts';

const ra = fc.double({ min: 0, max: 359.999999, noNaN: true });
const dec = fc.double({ min: -89.9999, max: 89.9999, noNaN: true });

describe('directions', () => {
  it('axes', () => {
    expect(raDecToUnit(0, 0)).toEqual([1, 0, 0]);
    expect(raDecToUnit(90, 0)[1]).toBe(1);
    expect(raDecToUnit(123, 90)).toEqual([-0, 0, 1]);
    expect(raDecToUnit(123, -90)[2]).toBe(-1);
  });

  it('positions come back', () => {
    fc.assert(
      fc.property(ra, dec, (a, d) => {
        const back = unitToRaDec(raDecToUnit(a, d));
        // Twelve decimals of a degree are 4e-9 arcseconds; RA loses digits towards the pole.
        expect(back.decDeg).toBeCloseTo(d, 11);
        const off = (((back.raDeg - a + 540) % 360) - 180) * Math.cos((d * Math.PI) / 180);
        expect(off).toBeCloseTo(0, 11);
      }),
    );
  });

  it('separations: known, symmetric, exact for small angles', () => {
    expect(separationDeg(10, 0, 100, 0)).toBeCloseTo(90, 12);
    expect(separationDeg(0, 90, 77, -90)).toBeCloseTo(180, 12);
    expect(separationDeg(10, 20, 10, 20)).toBe(0);
    expect(separationDeg(10, 0, 10 + 1e-9, 0) / 1e-9).toBeCloseTo(1, 4);
    fc.assert(
      fc.property(ra, dec, ra, dec, (a, b, c, d) => {
        expect(separationDeg(a, b, c, d)).toBeCloseTo(separationDeg(c, d, a, b), 12);
      }),
    );
  });

  it('RA in [0, 360)', () => {
    expect([0, 360, -360, 720, -10, 370, -1e-20].map(normaliseRaDeg)).toEqual([0, 0, 0, 0, 350, 10, 0]);
  });
});
