import { readFileSync } from 'node:fs';
import { describe, expect, it } from 'vitest';
import { compileRegion } from '../../shared-core/sky/compileRegion.ts';
import { estimateFootprint } from '../../shared-core/sky/estimate.ts';
import { parsePolygonText } from '../../shared-core/sky/polygonText.ts';

// The real catalogue of test/data (see README.md there). Counts were computed in R from the data set itself.
const data = (name: string): string => readFileSync(new URL(`../data/${name}`, import.meta.url), 'utf8');
const [header, ...lines] = data('shapley.csv').trim().split('\n');
const rows = lines.map((line) => line.split(',').map(Number) as [number, number, number, number, number]);
const window = compileRegion({ parts: parsePolygonText(data('shapley-window.txt')), holes: [] });

/** Drinkwater et al. 2004 (astro-ph/0402362, abstract): "182 deg2". */
const PUBLISHED_DEG2 = 182;
/** The window is a dilated hull of the galaxies, a little larger than the fields that were observed. */
const WITHIN = 0.05;

describe('the shapley catalogue', () => {
  it('has the counts of the data set', () => {
    expect(header).toBe('RA,Dec,Mag,V,SigV');
    expect(rows.length).toBe(4215);
    expect(new Set(rows.map(([ra, dec]) => `${ra} ${dec}`)).size).toBe(4189);
    expect(rows.filter(([, , magnitude]) => magnitude === 0).length).toBe(357);
    expect(rows.filter(([, , , v]) => v <= 0).length).toBe(3);
    const velocities = rows.map(([, , , v]) => v).sort((a, b) => a - b);
    expect([velocities[0], velocities.at(-1)]).toEqual([-75, 76746]);
  });

  it('has its main plane at about 14 500 km/s (Drinkwater et al. 2004, abstract)', () => {
    const main = rows
      .map(([, , , v]) => v)
      .filter((v) => v > 8000 && v < 18000)
      .sort((a, b) => a - b);
    expect(main.length).toBe(2642);
    expect((main[1320]! + main[1321]!) / 2).toBe(14467);
    const bins = new Map<number, number>();
    for (const v of main) bins.set(500 * Math.floor(v / 500), (bins.get(500 * Math.floor(v / 500)) ?? 0) + 1);
    const [fullest] = [...bins].sort((a, b) => b[1] - a[1]);
    expect(fullest).toEqual([14500, 322]);
  });
});

describe('the window of the shapley catalogue', () => {
  it('has its area on the sphere, within 5% of the published one', () => {
    // 186.4: spherical area computed outside the project, to its last digit given.
    expect(Math.abs(window.areaDeg2 / 186.4 - 1)).toBeLessThan(WITHIN);
    expect(Math.abs(window.areaDeg2 / PUBLISHED_DEG2 - 1)).toBeLessThan(WITHIN);
  });

  it('would fail that bound if RA and Dec were taken for a flat map', () => {
    const [polygon] = parsePolygonText(data('shapley-window.txt'));
    let flat = 0;
    polygon!.verticesDeg.forEach(([ra, dec], i, all) => {
      const [nextRa, nextDec] = all[(i + 1) % all.length]!;
      flat += (ra * nextDec - nextRa * dec) / 2;
    });
    expect(Math.abs(flat)).toBeCloseTo(221, 0);
    expect(Math.abs(Math.abs(flat) / PUBLISHED_DEG2 - 1)).toBeGreaterThan(WITHIN);
  });

  it('holds the galaxies, but for those between a great-circle edge and a straight one in RA and Dec', () => {
    const outside = rows.filter(([ra, dec]) => !window.contains(ra, dec));
    expect(outside.length).toBeLessThan(0.01 * rows.length);
    // The window was drawn around the galaxies on a flat map; its long northern edge bows south on the sphere.
    for (const [, dec] of outside) expect(dec).toBeGreaterThan(-27.8);
  });

  it('is found again from the galaxies alone, within the stated error', () => {
    const estimate = estimateFootprint(
      rows.map((row) => row[0]),
      rows.map((row) => row[1]),
    );
    const { areaErrorDeg2, nside } = estimate.estimate!;
    expect(nside).toBe(64);
    expect(Math.abs(estimate.areaDeg2 - PUBLISHED_DEG2)).toBeLessThan(2 * areaErrorDeg2);
    expect(areaErrorDeg2).toBeLessThan(0.1 * PUBLISHED_DEG2);
  });
});
