import { describe, expect, it } from 'vitest';
import { integrate } from '../../../shared-core/numerics/quadrature.ts';

describe('integrate', () => {
  it('is exact for polynomials up to degree 31 in one panel (the degree of the 21-point rule)', () => {
    for (let degree = 0; degree <= 31; degree++) {
      let calls = 0;
      const f = (x: number) => {
        calls++;
        return (degree + 1) * x ** degree;
      };
      // Degrees to 19 are exact by both rules, so that no halving happens
      expect(integrate(f, 0, 1)).toBeCloseTo(1, 14);
      if (degree <= 19) expect(calls).toBe(21);
    }
  });

  it.each([
    ['exp', Math.exp, 0, 1, Math.E - 1],
    ['a narrow peak', (x: number) => 1e-3 / (x * x + 1e-6), -1, 1, 2 * Math.atan(1000)],
    ['a kink', (x: number) => Math.abs(x - 0.3), 0, 1, (0.3 ** 2 + 0.7 ** 2) / 2],
    ['a root at the end', Math.sqrt, 0, 1, 2 / 3],
    ['an oscillation', (x: number) => Math.sin(50 * x), 0, 1, (1 - Math.cos(50)) / 50],
    ['six decades', (x: number) => x ** -2, 1e-3, 1e3, 1e3 - 1e-3],
  ] as const)('%s to 1e-12', (_, f, a, b, exact) => {
    expect(Math.abs(integrate(f, a, b) / exact - 1)).toBeLessThan(1e-12);
  });

  it('turns its sign with its ends and is 0 over nothing', () => {
    expect(integrate(Math.exp, 1, 0)).toBeCloseTo(1 - Math.E, 14);
    expect(integrate(Math.exp, 2, 2)).toBe(0);
  });

  it('may be nested', () => {
    // integral of x y over the triangle y < x of the unit square is 1/8
    expect(integrate((x) => integrate((y) => x * y, 0, x), 0, 1)).toBeCloseTo(1 / 8, 14);
  });

  it('refuses what is not finite or does not converge', () => {
    expect(() => integrate(() => Number.NaN, 0, 1)).toThrow(
      'A function to integrate is not finite between 0 and 1; expected finite values.',
    );
    expect(() => integrate((x) => 1 / x, 0, 1)).toThrow(/does not converge/);
  });
});
