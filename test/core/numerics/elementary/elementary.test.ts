import { describe, expect, it } from 'vitest';
import * as elementary from '../../../../shared-core/numerics/elementary/elementary.ts';
import { createRandom } from '../../../../shared-core/numerics/random.ts';
import { powerOfTwoFrom } from '../../../../shared-core/numerics/tableSize.ts';
import { CASES, checksum, evaluations } from './evaluations.ts';
import pinned from './pinned.json' with { type: 'json' };

const { exp, expm1, log, log1p, log10, log2, sin, cos, tan, sinh, cosh, asinh } = elementary;
const { asin, acos, atan2, cbrt, hypot, pow, powerOf, square, cube } = elementary;

describe('elementary functions', () => {
  it.each(Object.keys(CASES))('%s agrees with the engine within 1e-15 of the value', (name) => {
    const { of, native, draw } = CASES[name]!;
    const random = createRandom(31);
    let worst = 0;
    for (let i = 0; i < 20_000; i++) {
      const [x, y] = draw(random);
      const [mine, theirs] = [of(x, y), native(x, y)];
      worst = Math.max(worst, mine === theirs ? 0 : Math.abs(mine / theirs - 1));
    }
    // Four to nine units in the last place: both sides may be wrong by one or two, tan and asinh by three.
    expect(worst).toBeLessThan(1e-15);
  });

  it.each(Object.keys(CASES))('%s gives the bits it always gave', (name) => {
    expect(checksum(evaluations(name, 200_000))).toBe((pinned as Record<string, string>)[name]);
  });

  it('is exact where the value is exact', () => {
    expect([exp(0), cosh(0), cos(0), pow(7, 0), pow(2, -3), pow(10, 22), pow(-2, 3)]).toEqual([
      1, 1, 1, 1, 0.125, 1e22, -8,
    ]);
    for (let n = -300; n <= 300; n += 7) {
      expect(log10(Number(`1e${n}`))).toBe(n);
      expect(log2(powerOf(2, n))).toBe(n);
      expect(pow(2, n)).toBe(powerOf(2, n));
      expect(cbrt(cube(n))).toBe(n);
    }
    const huge = powerOf(2, 700);
    expect([hypot(3, 4), hypot(2, 3, 6), hypot(3 * huge, 4 * huge), hypot(3 / huge, 4 / huge)]).toEqual([
      5,
      7,
      5 * huge,
      5 / huge,
    ]);
    expect([atan2(1, 1), atan2(1, -1), asin(1), acos(-1), acos(0)]).toEqual(
      [1 / 4, 3 / 4, 1 / 2, 1, 1 / 2].map((turn) => turn * Math.PI),
    );
    expect([square(3), cube(-3), powerOf(3, 4), powerOf(2, -2), powerOf(5, 0)]).toEqual([
      9, -27, 81, 0.25, 1,
    ]);
    expect([0, 1, 2, 3, 8192, 8193].map(powerOfTwoFrom)).toEqual([1, 1, 2, 4, 8192, 16384]);
  });

  it('keeps the sign of zero and the small', () => {
    for (const of of [expm1, log1p, sin, tan, sinh, asinh, asin, cbrt]) {
      expect(of(0)).toBe(0);
      expect(of(-0)).toBe(-0);
    }
    for (const of of [expm1, log1p, sin, tan, sinh, asinh, asin])
      for (const x of [5e-324, -3e-310, 1e-200, -1e-20]) expect(of(x)).toBe(x);
    // Double(5e-324) is 2^-1074, whose cube root is 2^-358.
    expect(cbrt(5e-324)).toBe(powerOf(2, -358));
    expect(log2(5e-324)).toBe(-1074);
    expect([atan2(0, 1), atan2(-0, 1), atan2(0, -1), atan2(-0, -1), atan2(0, -0)]).toEqual([
      0,
      -0,
      Math.PI,
      -Math.PI,
      Math.PI,
    ]);
  });

  it('has the limits of ECMAScript at infinity, at NaN and out of range', () => {
    const edges = [0, -0, 1, -1, Infinity, -Infinity, Number.NaN, 2, -2, 0.5, -0.5, 3, -3, 1e308, -1e308];
    for (const [name, { of, native }] of Object.entries(CASES))
      for (const x of edges)
        for (const y of ['atan2', 'hypot', 'pow'].includes(name) ? edges : [0]) {
          const [mine, theirs] = [of(x, y), native(x, y)];
          const isPlain = Number.isFinite(theirs) && theirs !== 0;
          if (isPlain) expect(Math.abs(mine / theirs - 1), `${name}(${x}, ${y})`).toBeLessThan(1e-15);
          else expect(mine, `${name}(${x}, ${y})`).toBe(theirs);
        }
    expect([exp(710), exp(-746), exp(-745.2), log(-1), log1p(-2), asin(1.1), acos(-1.1)]).toEqual([
      Infinity,
      0,
      0,
      Number.NaN,
      Number.NaN,
      Number.NaN,
      Number.NaN,
    ]);
  });
});
