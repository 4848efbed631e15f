import { describe, expect, it } from 'vitest';
import { createCosmology } from '../../../shared-core/cosmology/cosmology.ts';
import { createRandom } from '../../../shared-core/numerics/random.ts';
import { model, UNIVERSES } from './models.ts';

const relative = (ours: number, exact: number) => (exact === 0 ? Math.abs(ours) : Math.abs(ours / exact - 1));

/** Even in ln z, with the ends. */
function redshifts(from: number, to: number, count: number): Float64Array {
  const random = createRandom(11);
  return Float64Array.from({ length: count }, (_, i) =>
    i === 0 ? from : i === 1 ? to : from * (to / from) ** random.uniform(),
  );
}

describe.each([
  ...UNIVERSES,
  ['nearly standing still at z 1.8', model({ omegaM0: 0.3, omegaDe0: 1.7 })] as const,
  ['dark energy that comes late and fast', model({ w0: -0.5, wa: -9 })] as const,
])('table of %s', (_, parameters) => {
  const cosmology = createCosmology(parameters);
  const table = cosmology.table();

  it.each([
    [1e-6, 20, 1e-9],
    [20, 1100, 1e-7],
  ])('from z %d to %d within %d of quadrature', (from, to, tolerance) => {
    const z = redshifts(from, to, 400);
    const comoving = new Float64Array(z.length);
    const lookback = new Float64Array(z.length);
    table.fill(z, comoving, lookback);
    let worst = 0;
    z.forEach((at, i) => {
      worst = Math.max(
        worst,
        relative(comoving[i]!, cosmology.comovingMpc(at)),
        relative(lookback[i]!, cosmology.lookbackGyr(at)),
      );
    });
    expect(worst).toBeLessThan(tolerance);
  });

  it('reads one redshift as it reads many, and inverts', () => {
    const z = Float64Array.of(0, 1e-9, 0.003, 0.5, 2, 19, 1100);
    const comoving = new Float64Array(z.length);
    table.fill(z, comoving, null);
    for (let i = 0; i < z.length; i++) {
      expect(table.comovingMpc(z[i]!)).toBe(comoving[i]);
      expect(relative(table.redshiftAtComovingMpc(comoving[i]!), z[i]!)).toBeLessThan(1e-10);
      // 1e-7 at z 1100, where the last 1e-4 of the lookback time must tell them apart
      const tolerance = z[i]! > 20 ? 1e-7 : 1e-10;
      expect(relative(table.redshiftAtLookbackGyr(table.lookbackGyr(z[i]!)), z[i]!)).toBeLessThan(tolerance);
    }
  });

  it('inverts to redshifts that it can read again, up to the last', () => {
    const [farthest, earliest] = [table.comovingMpc(1100), table.lookbackGyr(1100)];
    for (let i = 0; i <= 40; i++) {
      // From the last value down, each time by twice the distance of neighbouring numbers.
      const share = i === 0 ? 1 : 1 - 2 ** (i - 54);
      expect(table.redshiftAtComovingMpc(farthest * share)).toBeLessThanOrEqual(1100);
      expect(table.redshiftAtLookbackGyr(earliest * share)).toBeLessThanOrEqual(1100);
    }
  });

  it('never falls, across cells too', () => {
    const z = Float64Array.from({ length: 20_001 }, (_, i) => 20 * (i / 20_000) ** 3);
    const comoving = new Float64Array(z.length);
    const lookback = new Float64Array(z.length);
    table.fill(z, comoving, lookback);
    for (let i = 1; i < z.length; i++) {
      if (!(comoving[i]! > comoving[i - 1]! && lookback[i]! > lookback[i - 1]!))
        expect.fail(`falls at ${z[i]}`);
    }
  });
});

describe('table', () => {
  const cosmology = createCosmology(model());
  const table = cosmology.table();

  it('is built once', () => {
    expect(cosmology.table()).toBe(table);
  });

  it('marks redshifts outside 0 to 1100 with NaN when it fills', () => {
    const z = Float64Array.of(-1e-9, Number.NaN, 1100.1, Number.POSITIVE_INFINITY, 1);
    const comoving = new Float64Array(5);
    const lookback = new Float64Array(5);
    table.fill(z, comoving, lookback);
    expect(Array.from(comoving, Number.isNaN)).toEqual([true, true, true, true, false]);
    expect(Array.from(lookback, Number.isNaN)).toEqual([true, true, true, true, false]);
  });

  it('refuses single redshifts and values outside, and arrays of different lengths', () => {
    expect(() => table.comovingMpc(1101)).toThrow(
      'Redshift 1101 is outside the table; give one from 0 to 1100.',
    );
    expect(() => table.lookbackGyr(Number.NaN)).toThrow(/^Redshift NaN is outside the table/);
    expect(() => table.redshiftAtComovingMpc(-1)).toThrow(
      /^Comoving distance in Mpc -1 is outside the table; give one from 0 to \d+\.\d+\.$/,
    );
    expect(() => table.redshiftAtLookbackGyr(14)).toThrow(/^Lookback time in Gyr 14 is outside the table/);
    expect(() => table.fill(new Float64Array(3), new Float64Array(2), null)).toThrow(
      'Arrays of 3 redshifts, 2 distances and no times do not match; give arrays of one length.',
    );
  });
});
