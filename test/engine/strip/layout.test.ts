import { readFileSync } from 'node:fs';
import fc from 'fast-check';
import { describe, expect, it } from 'vitest';
import {
  radialPixel,
  STRIP_LEFT_PX,
  STRIP_RIGHT_PX,
  shownWindow,
  wholeWindow,
} from '../../../renderer/strip/layout.ts';
import { drawnAxis } from '../../../renderer/strip/readings.ts';
import { panBy, windowOfShells, zoomAround } from '../../../renderer/strip/zoom.ts';
import { createCosmology } from '../../../shared-core/cosmology/cosmology.ts';
import type { CosmologyParameters } from '../../../shared-core/cosmology/parameters.ts';
import { findPublishedSet } from '../../../shared-core/cosmology/publishedSets.ts';
import { RADIAL_READINGS } from '../../../shared-core/study/schema.ts';

const WIDTH = 620;
const cosmology = createCosmology(findPublishedSet('planck2018').parameters);
const axes = RADIAL_READINGS.map((kind) => drawnAxis(kind, cosmology));

/** astropy's numbers, made by test/reference/cosmology-astropy.py. */
const astropy = JSON.parse(
  readFileSync(new URL('../../reference/cosmology-astropy.json', import.meta.url), 'utf8'),
) as {
  readonly columns: readonly string[];
  readonly rows: readonly {
    readonly parameters: CosmologyParameters;
    readonly values: readonly number[][];
  }[];
};

describe('radialPixel', () => {
  it('puts the window between the insets and is linear in the reading', () => {
    for (const axis of axes) {
      const scale = radialPixel(axis, [0.2, 1.4], WIDTH);
      expect(scale.at(0.2)).toBeCloseTo(STRIP_LEFT_PX, 9);
      expect(scale.at(1.4)).toBeCloseTo(WIDTH - STRIP_RIGHT_PX, 9);
      const middle = (axis.at(0.2) + axis.at(1.4)) / 2;
      expect(scale.atReading(middle)).toBeCloseTo(WIDTH / 2, 9);
    }
  });
  it('reads a pixel back', () => {
    fc.assert(
      fc.property(fc.constantFrom(...axes), fc.double({ min: 0.01, max: 3, noNaN: true }), (axis, z) => {
        const scale = radialPixel(axis, [0, 3], WIDTH);
        // The table of the cosmology is held to 1e-9.
        expect(scale.redshiftAt(scale.at(z))).toBeCloseTo(z, 7);
      }),
    );
  });
  it('puts redshifts where astropy has their comoving distances and lookback times', () => {
    const [d, t] = [astropy.columns.indexOf('comovingMpc'), astropy.columns.indexOf('lookbackGyr')];
    let checked = 0;
    for (const { parameters, values } of astropy.rows.slice(0, 6)) {
      const own = createCosmology(parameters);
      const [near, far] = [values.find((v) => v[0]! > 0.05)!, values.findLast((v) => v[0]! <= 3)!];
      for (const [kind, column] of [
        ['comoving', d],
        ['lookback', t],
      ] as const) {
        const scale = radialPixel(drawnAxis(kind, own), [near[0]!, far[0]!], WIDTH);
        for (const row of values) {
          if (row[0]! < near[0]! || row[0]! > far[0]!) continue;
          const share = (row[column]! - near[column]!) / (far[column]! - near[column]!);
          expect(scale.at(row[0]!)).toBeCloseTo(
            STRIP_LEFT_PX + share * (WIDTH - STRIP_LEFT_PX - STRIP_RIGHT_PX),
            4,
          );
          checked++;
        }
      }
    }
    expect(checked).toBeGreaterThan(20);
  });
  it('never leaves the redshifts that the program knows', () => {
    for (const axis of axes) {
      const scale = radialPixel(axis, [0, 900], WIDTH);
      expect(scale.redshiftAt(-1e5)).toBe(0);
      expect(scale.redshiftAt(1e7)).toBe(1100);
    }
  });
  it('survives a strip narrower than its insets', () => {
    const scale = radialPixel(axes[0]!, [0, 1], 20);
    expect(Number.isFinite(scale.at(0.5))).toBe(true);
  });
});

describe('windows', () => {
  it('shows everything with a little room behind', () => {
    for (const axis of axes) {
      const [low, high] = wholeWindow(axis, 1.5);
      expect(low).toBe(0);
      expect(axis.at(high) / axis.at(1.5)).toBeCloseTo(1.04, 6);
      expect(wholeWindow(axis, 1100)).toEqual([0, 1100]);
    }
  });
  it('prefers the chosen window, unless it is empty', () => {
    const axis = axes[1]!;
    expect(shownWindow([0.5, 0.7], axis, 2)).toEqual([0.5, 0.7]);
    expect(shownWindow([0.7, 0.7], axis, 2)).toEqual(wholeWindow(axis, 2));
    expect(shownWindow(null, axis, 2)).toEqual(wholeWindow(axis, 2));
  });
});

describe('zoom', () => {
  it('keeps the redshift under the pointer', () => {
    fc.assert(
      fc.property(
        fc.constantFrom(...axes),
        fc.double({ min: 200, max: 450, noNaN: true }),
        fc.double({ min: 0.3, max: 0.95, noNaN: true }),
        (axis, px, factor) => {
          const scale = radialPixel(axis, wholeWindow(axis, 1.5), WIDTH);
          const window = zoomAround(scale, px, factor, 1.5)!;
          expect(radialPixel(axis, window, WIDTH).at(scale.redshiftAt(px))).toBeCloseTo(px, 3);
        },
      ),
    );
  });
  it('comes back to the whole, and can step behind it only so far', () => {
    for (const axis of axes) {
      const whole = radialPixel(axis, wholeWindow(axis, 1.5), WIDTH);
      const closer = radialPixel(axis, zoomAround(whole, 300, 0.5, 1.5)!, WIDTH);
      expect(zoomAround(closer, 300, 2, 1.5)).toBeNull();
      let scale = whole;
      for (let i = 0; i < 30; i++) scale = radialPixel(axis, zoomAround(scale, 300, 1.5, 1.5)!, WIDTH);
      expect(scale.low).toBe(0);
      expect(scale.high).toBeLessThanOrEqual(Math.min(axis.at(1100), 4.2 * axis.at(1.5)) * (1 + 1e-6));
    }
  });
  it('stops at the observer when one pans', () => {
    for (const axis of axes) {
      const scale = radialPixel(axis, [0.3, 0.9], WIDTH);
      const window = panBy(scale, 1e4, 1.5)!;
      expect(window[0]).toBe(0);
      expect(axis.at(window[1])).toBeCloseTo(axis.at(0.9) - axis.at(0.3), 6);
      const byTen = radialPixel(axis, panBy(scale, 10, 1.5)!, WIDTH);
      expect(byTen.at(0.5)).toBeCloseTo(scale.at(0.5) + 10, 3);
    }
  });
  it('frames the shells', () => {
    const scale = radialPixel(axes[1]!, [0, 2], WIDTH);
    const [low, high] = windowOfShells(scale, [0.4, 0.5, 0.8])!;
    expect(low).toBeCloseTo(0.38, 9);
    expect(high).toBeCloseTo(0.82, 9);
    expect(windowOfShells(scale, [0.4])).toBeNull();
  });
});
