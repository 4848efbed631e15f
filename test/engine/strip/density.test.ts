import fc from 'fast-check';
import { describe, expect, it } from 'vitest';
import { binsOf, binsWanted } from '../../../renderer/strip/bins.ts';
import { heldIn } from '../../../renderer/strip/DepthAxes.tsx';
import {
  commonPower,
  densityMarks,
  densityScale,
  greatestDensity,
  proposedUpward,
} from '../../../renderer/strip/densityScale.ts';
import { densityText } from '../../../renderer/strip/densityText.ts';
import { radialPixel } from '../../../renderer/strip/layout.ts';
import { p0Texts } from '../../../renderer/strip/p0Text.ts';
import { drawnAxis, readingsOf } from '../../../renderer/strip/readings.ts';
import {
  binTexts,
  depthTexts,
  powerOfTen,
  profileSentence,
  shortNumber,
} from '../../../renderer/strip/words.ts';
import { createCosmology } from '../../../shared-core/cosmology/cosmology.ts';
import { findPublishedSet } from '../../../shared-core/cosmology/publishedSets.ts';
import { sortSample } from '../../../shared-core/shells/sample.ts';
import { RADIAL_READINGS } from '../../../shared-core/study/schema.ts';

const cosmology = createCosmology(findPublishedSet('planck2018').parameters);
const redshift = Float64Array.from({ length: 3000 }, (_, i) => 0.05 + 1.3 * ((i * 0.6180339887) % 1));
const sample = sortSample(redshift, null);

describe('bins', () => {
  it('are equal in the reading in use, at round values, and cover the window', () => {
    for (const kind of RADIAL_READINGS)
      for (const [window, factor] of [
        [[0, 1.5], 1],
        [[0.31, 0.77], 0.6766],
        [[0, 1100], 1],
        [[0.6, 0.6001], 1],
      ] as const) {
        const axis = drawnAxis(kind, cosmology);
        const scale = radialPixel(axis, window, 600);
        const bins = binsOf(scale, window, factor, sample);
        const { zEdges, shownEdges, step, first, end } = bins;
        for (let i = 0; i < zEdges.length; i++) {
          if (shownEdges[i]! < axis.at(1100) * factor)
            expect(Math.abs(shownEdges[i]! / step - Math.round(shownEdges[i]! / step))).toBeLessThan(1e-6);
          if (i > 0) expect(zEdges[i]!).toBeGreaterThan(zEdges[i - 1]!);
          expect(axis.at(zEdges[i]!) * factor).toBeCloseTo(shownEdges[i]!, 4);
        }
        expect(zEdges[first]!).toBeLessThanOrEqual(window[0] + 1e-9);
        expect(zEdges[end]!).toBeGreaterThanOrEqual(window[1] - 1e-6);
        expect(end - first).toBeLessThanOrEqual((scale.rightPx - scale.leftPx) / 4 + 2);
      }
  });
  it('stay where they are while one pans', () => {
    const axis = drawnAxis('comoving', cosmology);
    const edgesOfBins = (window: readonly [number, number]) => {
      const { shownEdges, step } = binsOf(radialPixel(axis, window, 600), window, 1, sample);
      return { shownEdges, step };
    };
    const [a, b] = [edgesOfBins([0.3, 0.8]), edgesOfBins([0.32, 0.823])];
    expect(a.step).toBe(b.step);
    const shared = [...a.shownEdges].filter((edge) => b.shownEdges.includes(edge));
    expect(shared.length).toBeGreaterThan(10);
  });
  it('follow the number of galaxies and the room', () => {
    expect(binsWanted(0, 464)).toBe(12);
    expect(binsWanted(1000, 464)).toBe(40);
    expect(binsWanted(1e7, 464)).toBe(116);
    expect(binsWanted(1e7, 1300)).toBeGreaterThan(binsWanted(1e7, 464));
    expect(binsWanted(5, 1)).toBe(1);
  });
});

const bins = (count: number[], density: number[]) => ({ count, density, first: 0, end: count.length });

describe('the scale of density', () => {
  it('is not set by a few galaxies in a sliver of volume', () => {
    expect(greatestDensity(bins([1, 50, 60, 40], [90, 5, 6, 4]))).toBe(6);
    expect(greatestDensity(bins([1, 50, 60, 40], [9, 5, 6, 4]))).toBe(9);
    expect(greatestDensity(bins([0, 1, 0], [0, 3, 0]))).toBe(3);
    expect(greatestDensity(bins([], []))).toBe(0);
  });
  it('reaches to n P0 = 1 where that costs little', () => {
    expect(densityScale(bins([50], [6]), 'linear', 10).high).toBeGreaterThan(10);
    expect(densityScale(bins([50], [6]), 'linear', 1000).high).toBeLessThan(7);
    const log = densityScale(bins([50, 50], [6, 2]), 'log', 60);
    expect(log.share(60)).toBeLessThanOrEqual(1);
    expect(log.share(2)).toBeGreaterThan(0);
    // Four powers of ten below the peak, as in a dense nearby sample.
    expect(densityScale(bins([50, 50], [0.35, 1e-4]), 'log', 3.1e-5).share(3.1e-5)).toBeGreaterThan(0);
    // Seven powers of ten away the line would cost the whole scale.
    expect(densityScale(bins([50, 50], [0.35, 1e-2]), 'log', 3e-8).share(3e-8)).toBeLessThan(0);
  });
  it('reads evenly, or by powers of ten', () => {
    const even = densityScale(bins([50], [10]), 'linear', null);
    expect(even.share(5)! / even.share(10)!).toBeCloseTo(0.5, 12);
    expect(even.share(0)).toBe(0);
    const log = densityScale(bins([50, 50], [10, 0.1]), 'log', null);
    expect(log.share(10)! - log.share(1)!).toBeCloseTo(log.share(1)! - log.share(0.1)!, 12);
    expect(log.share(0)).toBeNull();
  });
  it('proposes powers of ten for a density that falls far', () => {
    const density = Array.from({ length: 20 }, (_, i) => 10 ** (-i / 4));
    expect(
      proposedUpward(
        bins(
          density.map(() => 30),
          density,
        ),
      ),
    ).toBe('log');
    expect(
      proposedUpward(
        bins(
          Array(20).fill(30),
          Array.from({ length: 20 }, (_, i) => 5 + (i % 3)),
        ),
      ),
    ).toBe('linear');
    expect(proposedUpward(bins([1], [1]))).toBe('linear');
  });
  it('marks both sides at round values that lie on it', () => {
    fc.assert(
      fc.property(
        fc.double({ min: 1e-7, max: 1e3, noNaN: true }),
        fc.double({ min: 1, max: 1e5, noNaN: true }),
        fc.constantFrom('linear' as const, 'log' as const),
        (peak, times, upward) => {
          const scale = densityScale(bins([50, 50], [peak, peak / 30]), upward, null);
          const marks = densityMarks(scale, times, 4);
          expect(marks.length).toBeGreaterThan(0);
          for (const value of marks) {
            const share = scale.share(value / times);
            expect(share).not.toBeNull();
            expect(share!).toBeGreaterThan(-1e-6);
            expect(share!).toBeLessThan(1 + 1e-6);
          }
        },
      ),
    );
  });
  it('takes out a power of ten only where numbers would be long', () => {
    expect([commonPower(0.6), commonPower(43), commonPower(3e-4), commonPower(2e5)]).toEqual([0, 0, -4, 5]);
  });
});

describe('words of the strip', () => {
  it('write powers of ten out', () => {
    expect([shortNumber(3.1e-4), shortNumber(0.123456), powerOfTen(-4)]).toEqual([
      '3.10×10⁻⁴',
      '0.123',
      '10⁻⁴',
    ]);
  });
  it('read one depth three ways', () => {
    const readings = readingsOf(cosmology, { perH: false, h: cosmology.h });
    const [z, gyr, mpc] = depthTexts(0.5, readings);
    expect(z).toBe('z 0.5000');
    expect(gyr).toBe(`${cosmology.lookbackGyr(0.5).toFixed(3)} Gyr`);
    expect(mpc).toBe(`${cosmology.comovingMpc(0.5).toFixed(1)} Mpc`);
    expect(depthTexts(0.0012, readings)[0]).toBe('z 0.001200');
  });
  it('tell a bin', () => {
    expect(binTexts(0.6, 0.62, 'z', { count: 12_345, density: 3.1e-4, power: 3.1 }, '(h/Mpc)³')).toEqual([
      'z 0.6 – 0.62',
      '12\u202f345 galaxies',
      'n = 3.10×10⁻⁴ (h/Mpc)³',
      'nP₀ = 3.10, smoothed',
    ]);
    expect(binTexts(10, 20, 'Mpc', { count: 1, density: null, power: null }, '')).toEqual([
      '10 – 20 Mpc',
      '1 galaxy',
    ]);
  });
  it('tell the histogram', () => {
    const reading = { words: 'redshift', unit: 'z' };
    expect(profileSentence({ galaxies: 0, peak: null, above: null }, reading, '')).toBe(
      'No galaxy is in view.',
    );
    expect(
      profileSentence(
        { galaxies: 120, peak: { at: 0.61, density: 3e-4 }, above: [0.4, 0.9] },
        reading,
        'Mpc⁻³',
      ),
    ).toBe(
      '120 galaxies are in view. The smoothed density is highest near redshift 0.61, 3.00×10⁻⁴ Mpc⁻³. nP₀ is above 1 between 0.4 and 0.9.',
    );
  });
});

describe('numbers beside the plot', () => {
  it('are short, however great or small the density is', () => {
    expect(densityText(0.5, 'linear', 0)).toBe('0.5');
    expect(densityText(2e-4, 'linear', -4)).toBe('2');
    expect(densityText(2_500_000, 'linear', 0)).toBe('2.5×10⁶');
    expect(densityText(4e-9, 'linear', 0)).toBe('4×10⁻⁹');
    expect(densityText(1e-6, 'log', 0)).toBe('10⁻⁶');
    expect(densityText(0.01, 'log', 0)).toBe('0.01');
  });
  it('end before the tools behind the plot', () => {
    expect(heldIn(500, '1000', 528, 12)).toBe(500);
    // Half of four digits of 0.62 em: 14.88 px before 528 + 9.
    expect(heldIn(528, '1000', 528, 12)).toBeCloseTo(522.12, 9);
  });
  it('say P0 in both units: 10 000 (Mpc/h)³ is 10 000 / h³ Mpc³', () => {
    expect(p0Texts(10_000, { h: 0.5 })).toEqual(['10\u202f000 (Mpc/h)³', '80\u202f000 Mpc³']);
    expect(p0Texts(0.125, { h: 0.5 })).toEqual(['0.125 (Mpc/h)³', '1 Mpc³']);
  });
});
