import { describe, expect, it } from 'vitest';
import { createCosmology } from '../../../shared-core/cosmology/cosmology.ts';
import { model, UNIVERSES } from './models.ts';

const REDSHIFTS = [1e-8, 1e-5, 0.01, 0.3, 1, 4, 20, 200, 1100];
const relative = (ours: number, exact: number) => Math.abs(ours / exact - 1);

describe.each(UNIVERSES)('%s: every inverse is an inverse', (_, parameters) => {
  const cosmology = createCosmology(parameters);

  it.each(REDSHIFTS)('z %d', (z) => {
    expect(relative(cosmology.redshiftAtComovingMpc(cosmology.comovingMpc(z)), z)).toBeLessThan(1e-10);
    expect(relative(cosmology.redshiftAtVolumeMpc3(cosmology.comovingVolumeMpc3(z)), z)).toBeLessThan(1e-10);
    expect(relative(cosmology.redshiftAtLookbackGyr(cosmology.lookbackGyr(z)), z)).toBeLessThan(1e-10);
    // An age near today's holds a small z only to the last bits of the age itself
    const lost = (4 * Number.EPSILON * cosmology.ageGyr(0)) / cosmology.lookbackGyr(z);
    expect(relative(cosmology.redshiftAtAgeGyr(cosmology.ageGyr(z)), z)).toBeLessThan(Math.max(1e-10, lost));
  });

  it('the value of the redshift of a value is that value', () => {
    for (const mpc of [0.001, 10, 4000]) {
      expect(relative(cosmology.comovingMpc(cosmology.redshiftAtComovingMpc(mpc)), mpc)).toBeLessThan(1e-12);
      const volume = mpc ** 3;
      expect(
        relative(cosmology.comovingVolumeMpc3(cosmology.redshiftAtVolumeMpc3(volume)), volume),
      ).toBeLessThan(1e-12);
    }
    for (const gyr of [1e-6, 0.1, 6]) {
      expect(relative(cosmology.lookbackGyr(cosmology.redshiftAtLookbackGyr(gyr)), gyr)).toBeLessThan(1e-12);
      expect(relative(cosmology.ageGyr(cosmology.redshiftAtAgeGyr(gyr)), gyr)).toBeLessThan(1e-12);
    }
  });

  it('nothing is at z 0', () => {
    expect(cosmology.redshiftAtComovingMpc(0)).toBe(0);
    expect(cosmology.redshiftAtLookbackGyr(0)).toBe(0);
    expect(cosmology.redshiftAtVolumeMpc3(0)).toBe(0);
    expect(cosmology.redshiftAtAgeGyr(cosmology.ageGyr(0))).toBe(0);
  });
});

describe('what no redshift has is refused', () => {
  const cosmology = createCosmology(model());
  it.each([
    [
      () => cosmology.redshiftAtComovingMpc(20_000),
      /^Comoving distance 20000 Mpc is at no redshift of this cosmology; give one from 0 to 14154\.\d+ Mpc\.$/,
    ],
    [() => cosmology.redshiftAtComovingMpc(-1), /^Comoving distance -1 Mpc is at no redshift/],
    [() => cosmology.redshiftAtComovingMpc(Number.NaN), /^Comoving distance NaN Mpc is at no redshift/],
    [
      () => cosmology.redshiftAtLookbackGyr(13.5),
      /^Lookback time 13\.5 Gyr is at no redshift of this cosmology; give one from 0 to 13\.466984 Gyr\.$/,
    ],
    [
      () => cosmology.redshiftAtVolumeMpc3(1e20),
      /^All-sky volume 100000000000000000000 Mpc\^3 is at no redshift/,
    ],
    [
      () => cosmology.redshiftAtAgeGyr(13.5),
      /^Age 13\.5 Gyr is outside the history of this universe; give one from \S+ to 13\.466984 Gyr\.$/,
    ],
    [() => cosmology.redshiftAtAgeGyr(0), /^Age 0 Gyr is outside the history/],
  ])('%#', (ask, sentence) => {
    expect(ask).toThrow(sentence);
  });
});
