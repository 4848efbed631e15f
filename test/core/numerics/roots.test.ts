import { describe, expect, it } from 'vitest';
import { findRisingRoot, findRoot } from '../../../shared-core/numerics/roots.ts';

describe('findRoot (Brent)', () => {
  it.each([
    ['cos x = x', (x: number) => Math.cos(x) - x, 0, 1, 0.7390851332151607],
    ['a triple root', (x: number) => (x - 1) ** 3, -2, 5, 1],
    ['a wall', (x: number) => Math.atan(1e6 * (x - 0.123)), 0, 1, 0.123],
    ['at the start', (x: number) => x, 0, 1, 0],
    ['at the end', (x: number) => x - 1, 0, 1, 1],
    ['falling', (x: number) => 2 - x * x, 0, 2, Math.SQRT2],
  ] as const)('%s', (_, f, a, b, root) => {
    // 1e-5 for the triple root: f is below the least double long before the root is reached
    const tolerance = _ === 'a triple root' ? 1e-5 : 1e-14;
    expect(Math.abs(findRoot(f, a, b) - root)).toBeLessThan(tolerance);
  });

  it('needs far fewer evaluations than bisection', () => {
    let calls = 0;
    findRoot(
      (x) => {
        calls++;
        return Math.exp(x) - 5;
      },
      0,
      10,
    );
    expect(calls).toBeLessThan(20);
  });

  it('stops at the tolerance asked for', () => {
    const root = findRoot((x) => x * x - 2, 0, 2, 1e-3);
    expect(Math.abs(root - Math.SQRT2)).toBeLessThan(1e-3);
  });

  it('refuses a bracket without a change of sign, and NaN', () => {
    expect(() => findRoot((x) => x * x + 1, -1, 1)).toThrow(
      'No root between -1 and 1: the function is 2 and 2 there; expected two signs.',
    );
    expect(() => findRoot(() => Number.NaN, 0, 1)).toThrow(/^No root between 0 and 1/);
    expect(() => findRoot((x) => (x === 0 ? -1 : x === 1 ? 1 : Number.NaN), 0, 1)).toThrow(
      /^A function is not finite/,
    );
  });
});

describe('findRisingRoot (Newton within a bracket)', () => {
  it('finds a root from a bad guess', () => {
    const root = findRisingRoot(
      (x) => ({ value: Math.atan(x - 3), slope: 1 / (1 + (x - 3) ** 2) }),
      -100,
      100,
      90,
    );
    expect(root).toBeCloseTo(3, 14);
  });

  it('keeps to the bracket and survives a slope of 0', () => {
    const root = findRisingRoot((x) => ({ value: x ** 3 - 8, slope: 3 * x * x }), 0, 10, 0);
    expect(root).toBeCloseTo(2, 14);
    expect(findRisingRoot((x) => ({ value: x, slope: 1 }), 0, 10, 5)).toBe(0);
  });
});
