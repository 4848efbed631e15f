import { describe, expect, it } from 'vitest';
import { Refusal } from '../../../shared-core/base/refusal.ts';
import { compileRegion } from '../../../shared-core/sky/compileRegion.ts';
import { estimateFootprint } from '../../../shared-core/sky/estimate.ts';
import { raDecToNest } from '../../../shared-core/sky/healpix.ts';
import type { Footprint } from '../../../shared-core/sky/region.ts';
import { DEG_PER_RAD, RAD_PER_DEG, separationDeg } from '../../../shared-core/sky/vectors.ts';
import { region, seeded, WHOLE_DEG2 } from './sample.ts';

interface Sky {
  readonly raDeg: Float64Array;
  readonly decDeg: Float64Array;
}

/** Uniform random positions of a region, drawn in a box around it. */
function uniform(
  inside: Footprint,
  box: readonly [number, number, number, number],
  count: number,
  seed: number,
): Sky {
  const random = seeded(seed);
  const [ra1, ra2, dec1, dec2] = box;
  const [z1, z2] = [Math.sin(dec1 * RAD_PER_DEG), Math.sin(dec2 * RAD_PER_DEG)];
  const raDeg = new Float64Array(count);
  const decDeg = new Float64Array(count);
  for (let i = 0; i < count; ) {
    const ra = ra1 + (ra2 - ra1) * random();
    const dec = Math.asin(z1 + (z2 - z1) * random()) * DEG_PER_RAD;
    if (!inside.contains(ra, dec)) continue;
    raDeg[i] = ra;
    decDeg[i] = dec;
    i++;
  }
  return { raDeg, decDeg };
}

const FIELDS = [
  { name: 'a box', parts: ['box:10,30,0,10'], holes: [], box: [10, 30, 0, 10] },
  { name: 'a cap', parts: ['cap:10,30,2'], holes: [], box: [7, 13, 28, 32] },
  { name: 'a strip', parts: ['box:0,60,-1,1'], holes: [], box: [0, 60, -1, 1] },
  {
    name: 'a box around RA 0 with a large hole',
    parts: ['box:-15,15,-40,-20'],
    holes: ['cap:0,-30,5'],
    box: [-15, 15, -40, -20],
  },
  { name: 'a polar cap', parts: ['cap:0,90,15'], holes: [], box: [0, 360, 74, 90] },
  { name: 'two fields', parts: ['cap:10,30,2', 'box:50,60,25,35'], holes: [], box: [5, 60, 25, 35] },
] as const;

describe('area estimated from uniform random positions', () => {
  it.each(FIELDS)('of $name lies within its stated error of the true one', ({ parts, holes, box }) => {
    const truth = compileRegion(region(parts, holes));
    for (const count of [1000, 10_000]) {
      const pulls: number[] = [];
      for (let seed = 1; seed <= 40; seed++) {
        const { raDeg, decDeg } = uniform(truth, box, count, seed);
        const { areaDeg2, estimate } = estimateFootprint(raDeg, decDeg);
        pulls.push((areaDeg2 - truth.areaDeg2) / estimate!.areaErrorDeg2);
      }
      // 40 normal numbers: the mean within 4 sigma of 0, none beyond 4 sigma (chance 0.25% each).
      const mean = pulls.reduce((a, b) => a + b, 0) / pulls.length;
      expect(Math.abs(mean)).toBeLessThan(4 / Math.sqrt(40));
      expect(Math.max(...pulls.map(Math.abs))).toBeLessThan(4);
    }
  });

  it('gets better with more galaxies: 1% for ten thousand in a box', () => {
    const truth = compileRegion(region(['box:10,30,0,10']));
    const { raDeg, decDeg } = uniform(truth, [10, 30, 0, 10], 10_000, 77);
    const { areaDeg2, estimate } = estimateFootprint(raDeg, decDeg);
    expect(estimate!.areaErrorDeg2 / areaDeg2).toBeLessThan(0.01);
    expect(Math.abs(areaDeg2 / truth.areaDeg2 - 1)).toBeLessThan(0.02);
  });

  it('is exactly the whole sky when no cell of it is empty', () => {
    const sky = compileRegion(region(['sky']));
    const { raDeg, decDeg } = uniform(sky, [0, 360, -90, 90], 20_000, 5);
    const footprint = estimateFootprint(raDeg, decDeg);
    expect(footprint.areaDeg2).toBeCloseTo(WHOLE_DEG2, 6);
    expect(footprint.outline()).toEqual([]);
  });

  it('stays an estimate: half of the cells, give or take half, when no cell is surrounded', () => {
    const { areaDeg2, estimate } = estimateFootprint([10, 11, 12, 40, 41], [0, 1, 0, 20, 21]);
    expect(areaDeg2).toBeCloseTo((estimate!.cells * estimate!.cellAreaDeg2) / 2, 10);
    expect(estimate!.areaErrorDeg2).toBeCloseTo(areaDeg2, 10);
  });
});

describe('the estimated footprint', () => {
  const truth = compileRegion(region(['box:-15,15,-40,-20'], ['cap:0,-30,5']));
  const { raDeg, decDeg } = uniform(truth, [-15, 15, -40, -20], 20_000, 9);
  const footprint = estimateFootprint(raDeg, decDeg);
  const { nside, cells, cellAreaDeg2 } = footprint.estimate!;

  it('says so', () => {
    expect(footprint.origin).toBe('estimated');
    expect(cellAreaDeg2).toBeCloseTo(WHOLE_DEG2 / (12 * nside * nside), 10);
  });

  it('holds every galaxy that it was made from, and keeps the hole', () => {
    expect(raDeg.every((ra, i) => footprint.contains(ra, decDeg[i]!))).toBe(true);
    expect(footprint.contains(0, -30)).toBe(false);
    expect(footprint.contains(180, 30)).toBe(false);
    expect(new Set(Array.from(raDeg, (ra, i) => raDecToNest(nside, ra, decDeg[i]!))).size).toBe(cells);
  });

  it('does not depend on the order of the rows', () => {
    const backward = estimateFootprint(raDeg.slice().reverse(), decDeg.slice().reverse());
    expect(backward.areaDeg2).toBe(footprint.areaDeg2);
    expect(backward.estimate).toEqual(footprint.estimate);
    expect(backward.outline()).toEqual(footprint.outline());
  });

  it('has an outline of cell edges: two rings, points close together, occupied cells on the left', () => {
    const rings = footprint.outline();
    expect(rings.length).toBe(2);
    for (const ring of rings) {
      const count = ring.raDeg.length;
      for (let i = 0; i < count; i++) {
        const k = (i + 1) % count;
        const [ra1, ra2, dec1, dec2] = [ring.raDeg[i]!, ring.raDeg[k]!, ring.decDeg[i]!, ring.decDeg[k]!];
        const step = separationDeg(ra1, dec1, ra2, dec2);
        expect(step).toBeGreaterThan(0);
        expect(step).toBeLessThanOrEqual(0.5);
        // A twentieth of the step to the left and to the right of its middle, on the tangent plane.
        const narrow = Math.cos(dec1 * RAD_PER_DEG);
        const east = (((ra2 - ra1 + 540) % 360) - 180) * narrow;
        const north = dec2 - dec1;
        const [ra, dec] = [ra1 + east / narrow / 2, dec1 + north / 2];
        expect(footprint.contains(ra - (0.05 * north) / narrow, dec + 0.05 * east)).toBe(true);
        expect(footprint.contains(ra + (0.05 * north) / narrow, dec - 0.05 * east)).toBe(false);
      }
    }
  });
});

describe('few and odd positions', () => {
  it.each([
    ['one galaxy', [10], [20]],
    ['a thousand in one place', new Array(1000).fill(10), new Array(1000).fill(20)],
    ['one on the pole', [123], [90]],
  ])('%s: one cell, of which nothing is known', (_, ra, dec) => {
    const footprint = estimateFootprint(ra, dec);
    expect(footprint.estimate!.cells).toBe(1);
    expect(footprint.estimate!.areaErrorDeg2).toBe(footprint.areaDeg2);
    expect(footprint.contains(ra[0]!, dec[0]!)).toBe(true);
    expect(footprint.contains(ra[0]! + 90, 0)).toBe(false);
    const [ring, ...more] = footprint.outline();
    expect(more).toEqual([]);
    expect(ring!.raDeg.length).toBeGreaterThanOrEqual(4);
  });

  it('twelve galaxies of a survey are told from a needle', () => {
    const truth = compileRegion(region(['box:10,30,0,10']));
    for (let seed = 1; seed <= 20; seed++) {
      const { raDeg, decDeg } = uniform(truth, [10, 30, 0, 10], 12, seed);
      const { areaDeg2 } = estimateFootprint(raDeg, decDeg);
      expect(areaDeg2).toBeGreaterThan(truth.areaDeg2 / 6);
      expect(areaDeg2).toBeLessThan(truth.areaDeg2 * 6);
    }
  });

  it('no galaxy is refused', () => {
    expect(() => estimateFootprint([], [])).toThrow(Refusal);
  });
});
