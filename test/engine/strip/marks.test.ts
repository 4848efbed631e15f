import fc from 'fast-check';
import { describe, expect, it } from 'vitest';
import { axisMarks, markText } from '../../../renderer/strip/axisMarks.ts';
import { radialPixel } from '../../../renderer/strip/layout.ts';
import { drawnAxis, readingsOf } from '../../../renderer/strip/readings.ts';
import { multiples, roundStepAbove, roundValues, toMultiple } from '../../../renderer/strip/roundValues.ts';
import { createCosmology } from '../../../shared-core/cosmology/cosmology.ts';
import { findPublishedSet } from '../../../shared-core/cosmology/publishedSets.ts';
import { RADIAL_READINGS } from '../../../shared-core/study/schema.ts';

const cosmology = createCosmology(findPublishedSet('planck2018').parameters);
const FONT_PX = 12;

describe('round steps', () => {
  it('are 1, 2 or 5 times a power of ten, none smaller than asked', () => {
    fc.assert(
      fc.property(fc.double({ min: 1e-6, max: 1e6, noNaN: true }), (least) => {
        const step = roundStepAbove(least);
        expect(step).toBeGreaterThanOrEqual(least * (1 - 1e-9));
        expect(step).toBeLessThan(least * 2.5 * (1 + 1e-9));
        expect(['1', '2', '5']).toContain(step.toExponential(0)[0]);
        expect(Number(step.toExponential(0))).toBeCloseTo(step, 12);
      }),
    );
  });
  it('give multiples without the dust of binary fractions', () => {
    expect(multiples(0, 0.5, 0.1)).toEqual([0, 0.1, 0.2, 0.3, 0.4, 0.5]);
    expect(toMultiple(0.30000000000000004, 0.1)).toBe(0.3);
    expect(toMultiple(0.31, 0.1, Math.ceil)).toBe(0.4);
    expect(toMultiple(1234, 50)).toBe(1250);
  });
});

describe('round values along a stretched axis', () => {
  it('keep their distance, on any monotone stretch', () => {
    fc.assert(
      fc.property(
        fc.double({ min: 0, max: 50, noNaN: true }),
        fc.double({ min: 0.01, max: 500, noNaN: true }),
        fc.double({ min: 0.3, max: 3, noNaN: true }),
        fc.double({ min: 5, max: 60, noNaN: true }),
        (low, span, power, gap) => {
          const high = low + span;
          const pxOf = (v: number) => 500 * (Math.max(0, v - low) / span) ** power;
          const values = roundValues(low, high, pxOf, () => gap);
          for (const [i, v] of values.entries()) {
            expect(v).toBeGreaterThanOrEqual(low - 1e-8);
            expect(v).toBeLessThanOrEqual(high + 1e-8);
            if (i > 0) expect(pxOf(v) - pxOf(values[i - 1]!)).toBeGreaterThanOrEqual(gap - 1e-6);
          }
        },
      ),
    );
  });
  it('are evenly spaced on an even axis', () => {
    expect(
      roundValues(
        0,
        1.2,
        (v) => v * 400,
        () => 40,
      ),
    ).toEqual([0, 0.1, 0.2, 0.3, 0.4, 0.5, 0.6, 0.7, 0.8, 0.9, 1, 1.1, 1.2]);
    expect(
      roundValues(
        0,
        1.2,
        (v) => v * 400,
        () => 70,
      ),
    ).toEqual([0, 0.2, 0.4, 0.6, 0.8, 1, 1.2]);
  });
  it('grow denser where the axis is stretched', () => {
    const values = roundValues(
      0,
      10,
      (v) => 300 * Math.log1p(v),
      () => 40,
    );
    const below = values.filter((v) => v <= 1).length;
    const above = values.filter((v) => v > 9).length;
    expect(below).toBeGreaterThan(above);
    expect(values).toContain(10);
  });
  it('are none where there is nothing', () => {
    expect(
      roundValues(
        1,
        1,
        (v) => v,
        () => 10,
      ),
    ).toEqual([]);
  });
});

describe('the three axes', () => {
  it('have labels that do not touch, at their own round values', () => {
    for (const perH of [false, true])
      for (const primary of RADIAL_READINGS)
        for (const window of [
          [0, 0.12],
          [0, 1.7],
          [0.61, 0.64],
          [0, 9],
          [2, 800],
        ] as const)
          for (const widthPx of [592, 1440]) {
            const scale = radialPixel(drawnAxis(primary, cosmology), window, widthPx);
            const readings = readingsOf(cosmology, { perH, h: cosmology.h });
            for (const kind of RADIAL_READINGS) {
              const marks = axisMarks(readings[kind], scale, window, FONT_PX);
              const labels = marks.filter((m) => m.text !== null).sort((a, b) => a.px - b.px);
              expect(labels.length).toBeGreaterThan(kind === primary ? 3 : 0);
              for (const [i, label] of labels.entries()) {
                expect(label.px).toBeGreaterThan(scale.leftPx - 1e-3);
                expect(label.px).toBeLessThan(scale.rightPx + 1e-3);
                // By conversion and back: the mark stands at the redshift of its value.
                expect(scale.at(readings[kind].redshiftAt(label.value))).toBeCloseTo(label.px, 3);
                const before = labels[i - 1];
                if (before === undefined) continue;
                // Half of both texts, at 0.6 of the type's size for a digit, and a little room.
                const texts = (label.text!.length + before.text!.length) / 2;
                expect(label.px - before.px).toBeGreaterThan(texts * 0.6 * FONT_PX + 4);
              }
            }
          }
  });
  it('say Mpc/h in h-units', () => {
    const readings = readingsOf(cosmology, { perH: true, h: 0.7 });
    expect(readings.comoving.unit).toBe('Mpc/h');
    expect(readings.comoving.shownAt(1)).toBeCloseTo(cosmology.comovingMpc(1) * 0.7, 4);
    expect(readings.comoving.exactRedshiftAt(cosmology.comovingMpc(1) * 0.7)).toBeCloseTo(1, 10);
  });
  it('part thousands from 10 000 on', () => {
    expect([markText(2500), markText(12_000), markText(0.25)]).toEqual(['2500', '12\u202f000', '0.25']);
  });
});
