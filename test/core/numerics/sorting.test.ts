import fc from 'fast-check';
import { describe, expect, it } from 'vitest';
import { createRandom } from '../../../shared-core/numerics/random.ts';
import { argsort } from '../../../shared-core/numerics/sorting.ts';

/** What a stable comparison sort says. */
function byDefinition(values: Float64Array): number[] {
  return Array.from(values, (_, i) => i).sort((i, j) => {
    const [a, b] = [values[i]!, values[j]!];
    return a < b ? -1 : a > b ? 1 : i - j;
  });
}

function check(values: Float64Array): void {
  const before = values.slice();
  expect(Array.from(argsort(values))).toEqual(byDefinition(values));
  expect(values).toEqual(before);
}

const random = createRandom(42);
const many = (make: (i: number) => number) => Float64Array.from({ length: 20_000 }, (_, i) => make(i));

describe('argsort', () => {
  it.each([
    ['even', () => random.uniform()],
    ['few different values', () => random.integer(5)],
    ['all equal', () => 3],
    ['rising', (i: number) => i],
    ['falling', (i: number) => -i],
    ['a far outlier', (i: number) => (i === 77 ? 1e300 : random.uniform())],
    ['outliers at every level', (i: number) => 10 ** -(i % 300) * random.uniform()],
    ['both signs and zeros of both signs', (i: number) => [0, -0, 1, -1][i % 4]! * random.integer(3)],
    ['infinities', (i: number) => (i % 50 === 0 ? [1 / 0, -1 / 0][(i / 50) % 2]! : random.normal())],
    ['the widest range', () => (random.uniform() - 0.5) * Number.MAX_VALUE * 1.9],
    ['denormals', () => random.integer(1000) * Number.MIN_VALUE],
    ['a clump in its last bits', () => 1 + random.integer(4) * Number.EPSILON],
    ['normal', () => random.normal()],
  ])('agrees with a stable comparison sort: %s', (_, make) => {
    check(many(make));
  });

  it('agrees for any short array', () => {
    fc.assert(fc.property(fc.float64Array({ noNaN: true }), check));
  });

  it('sorts a view that does not begin its buffer', () => {
    const view = many(() => random.uniform()).subarray(101, 9001);
    check(view);
    const wide = view.slice();
    wide[0] = Number.POSITIVE_INFINITY;
    wide[1] = Number.NEGATIVE_INFINITY;
    check(wide.subarray(0));
  });

  it('gives nothing for nothing', () => {
    expect(argsort(new Float64Array(0))).toHaveLength(0);
  });

  it('refuses NaN and says where', () => {
    expect(() => argsort(Float64Array.of(1, Number.NaN, 2))).toThrow(
      'Value 2 of 3 is not a number and has no place in an order; leave it out.',
    );
  });
});
