import fc from 'fast-check';
import { describe, expect, it } from 'vitest';
import {
  linearInterpolant,
  lowerBound,
  monotoneInterpolant,
} from '../../../shared-core/numerics/interpolation.ts';

const X = Float64Array.of(0, 1, 1.5, 3, 4, 6);
const Y = Float64Array.of(0, 1, 0.5, 0.5, 2, 10);

describe('monotoneInterpolant', () => {
  it('agrees with scipy 1.10 PchipInterpolator (computed)', () => {
    const f = monotoneInterpolant(X, Y);
    for (const [at, expected] of [
      [0.1, 0.21700000000000003],
      [0.7, 0.931],
      [1.2, 0.8240000000000001],
      [2, 0.5],
      [3.4, 0.8286153846153845],
      [4.9, 4.705192307692309],
      [5.9, 9.440448717948719],
    ] as const) {
      expect(f(at)).toBeCloseTo(expected, 14);
    }
  });

  it('goes through its knots and never beyond its neighbours', () => {
    const knots = fc.array(fc.tuple(fc.double({ min: 0.1, max: 5 }), fc.double({ min: -9, max: 9 })), {
      minLength: 2,
      maxLength: 12,
    });
    fc.assert(
      fc.property(knots, fc.double({ min: 0, max: 1, noNaN: true }), (steps, t) => {
        fc.pre(steps.every(([w, v]) => Number.isFinite(w) && Number.isFinite(v)));
        let at = 0;
        const x = Float64Array.from(steps, ([width]) => (at += width));
        const y = Float64Array.from(steps, ([, value]) => value);
        const f = monotoneInterpolant(x, y);
        for (let i = 0; i + 1 < x.length; i++) {
          expect(f(x[i]!)).toBeCloseTo(y[i]!, 12);
          const between = f(x[i]! + t * (x[i + 1]! - x[i]!));
          expect(between).toBeGreaterThanOrEqual(Math.min(y[i]!, y[i + 1]!) - 1e-12);
          expect(between).toBeLessThanOrEqual(Math.max(y[i]!, y[i + 1]!) + 1e-12);
        }
      }),
    );
  });

  it('is a straight line between two knots', () => {
    expect(monotoneInterpolant(Float64Array.of(0, 2), Float64Array.of(1, 5))(0.5)).toBeCloseTo(2, 15);
  });
});

describe('linearInterpolant', () => {
  it('joins the knots by lines', () => {
    const f = linearInterpolant(X, Y);
    expect(f(0)).toBe(0);
    expect(f(1.25)).toBeCloseTo(0.75, 15);
    expect(f(6)).toBe(10);
  });
});

describe('what cannot be interpolated', () => {
  it.each([linearInterpolant, monotoneInterpolant])('%o refuses it with a sentence', (make) => {
    expect(() => make(Float64Array.of(1), Float64Array.of(1))).toThrow(
      'Cannot interpolate 1 x with 1 y; give two or more of both.',
    );
    expect(() => make(Float64Array.of(1, 2), Float64Array.of(1))).toThrow(/2 x with 1 y/);
    expect(() => make(Float64Array.of(1, 1), Float64Array.of(1, 2))).toThrow(
      'Knot 2 is (1, 2); give finite knots with x rising.',
    );
    expect(() => make(Float64Array.of(0, 1), Float64Array.of(Number.NaN, 2))).toThrow(
      /^Knot 1 is \(0, NaN\)/,
    );
    expect(() => make(X, Y)(6.1)).toThrow('6.1 is outside the knots; give a value from 0 to 6.');
    expect(() => make(X, Y)(Number.NaN)).toThrow(/^NaN is outside/);
  });
});

describe('lowerBound', () => {
  it('is the first index not below the value', () => {
    const rising = [1, 2, 2, 5];
    expect([0, 1, 1.5, 2, 3, 5, 6].map((value) => lowerBound(rising, value))).toEqual([0, 0, 1, 1, 3, 3, 4]);
    expect(lowerBound([], 1)).toBe(0);
  });
});
