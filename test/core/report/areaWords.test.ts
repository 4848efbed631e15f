import { describe, expect, it } from 'vitest';
import { createRandom } from '../../../shared-core/numerics/random.ts';
import { areaText, estimateWords, withError } from '../../../shared-core/report/areaWords.ts';
import { describeFootprint } from '../../../shared-core/report/notes.ts';
import { estimateFootprint } from '../../../shared-core/sky/estimate.ts';

describe('a value with its error', () => {
  it.each([
    [67.2345, 2.84, '67.2', '2.8'],
    [67.2345, 0.0284, '67.234', '0.028'],
    [1234.4, 28.4, '1234', '28'],
    [1234.4, 284.4, '1234', '284'],
    [0.5, 0.0996, '0.50', '0.10'],
    [203.1015123, 0, '203.1015', '0'],
  ])('%d and %d are %s ± %s: decimals match', (value, error, valueText, errorText) => {
    expect(withError(value, error)).toEqual({ value: valueText, error: errorText });
  });
});

describe('an estimated area in words', () => {
  const random = createRandom(3);
  const count = 4000;
  const footprint = estimateFootprint(
    Float64Array.from({ length: count }, () => 150 + 10 * random.uniform()),
    Float64Array.from({ length: count }, () => 8 * random.uniform() - 4),
  );

  it('adds up for a reader: cells inside and on the border, times the size of a cell', () => {
    const words = estimateWords(footprint.estimate!);
    const [, cells, size, inside, border, counted, whole] =
      /from (\d+) occupied equal-area cells of ([\d.]+) .*: (\d+) inside .* and (\d+) on its border count as ([\d.]+), .* makes ([\d.]+) cells$/
        .exec(words)!
        .map(Number);
    expect(inside! + border!).toBe(cells);
    // A tenth of a cell is the last digit of each.
    expect(inside! + counted!).toBeCloseTo(whole!, 6);
    expect(Math.abs(whole! * size! - Number(areaText(footprint).value))).toBeLessThan(0.2 * size!);
    expect(describeFootprint(footprint, null)).toContain(words);
  });

  it('says so where every cell counts whole, or all are on the border', () => {
    const estimate = { nside: 1, cellAreaDeg2: 3437.7, cells: 12, areaErrorDeg2: 0 };
    expect(estimateWords({ ...estimate, borderCells: 0, borderAsCells: 0 })).toMatch(/all counted whole$/);
    expect(estimateWords({ ...estimate, borderCells: 12, borderAsCells: 6 })).toMatch(/half of them, 6\.0$/);
    expect(estimateWords({ ...estimate, cells: 1, borderCells: 1, borderAsCells: 0.5 })).toMatch(
      /: it is on the border, .* counts as half a cell$/,
    );
  });
});
