import { describe, expect, it } from 'vitest';
import { createRandom } from '../../../shared-core/numerics/random.ts';
import { compensatedSum, runningSums } from '../../../shared-core/numerics/sums.ts';

describe('compensatedSum', () => {
  it('keeps what plain addition loses (Neumaier 1974, example 1 + 1e100 + 1 - 1e100 = 2)', () => {
    expect(compensatedSum([1, 1e100, 1, -1e100])).toBe(2);
  });

  it('adds a million tenths to the last bit, where plain addition is 1e-6 off', () => {
    const tenths = new Float64Array(1_000_000).fill(0.1);
    expect(compensatedSum(tenths)).toBe(100_000);
    expect(Math.abs(tenths.reduce((a, b) => a + b) - 100_000)).toBeGreaterThan(1e-7);
  });

  it('is 0 of nothing, and passes infinity and NaN on', () => {
    expect(compensatedSum([])).toBe(0);
    expect(compensatedSum([1, Number.POSITIVE_INFINITY, 2])).toBe(Number.POSITIVE_INFINITY);
    expect(compensatedSum([1, Number.NaN])).toBeNaN();
  });
});

describe('runningSums', () => {
  it('are the compensated sums of all beginnings', () => {
    const random = createRandom(3);
    const values = Float64Array.from({ length: 500 }, () => random.normal() * 10 ** random.integer(12));
    const sums = runningSums(values);
    expect(sums).toHaveLength(501);
    for (let i = 0; i <= 500; i++) expect(sums[i]).toBe(compensatedSum(values.subarray(0, i)));
  });
});
