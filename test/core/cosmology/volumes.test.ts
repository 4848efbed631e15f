import { describe, expect, it } from 'vitest';
import { createCosmology } from '../../../shared-core/cosmology/cosmology.ts';
import { model, UNIVERSES } from './models.ts';

const relative = (ours: number, exact: number) => Math.abs(ours / exact - 1);

describe('Hogg 1999 (astro-ph/9905116), section 9: V / D_H^3 (computed)', () => {
  it.each([
    [1, 0, 0.8419892501, (4 * Math.PI) / 3],
    [0.05, 0, 1.476065958, 14.46187511],
    [0.2, 0.8, 2.339183141, 19.31343637],
    [0.3, 1, 2.509623445, 17.08940976],
  ])('matter %d, Lambda %d', (omegaM0, omegaDe0, atOne, atThree) => {
    const cosmology = createCosmology(model({ omegaM0, omegaDe0 }));
    const unit = (299792.458 / 70) ** 3;
    expect(relative(cosmology.comovingVolumeMpc3(1) / unit, atOne)).toBeLessThan(1e-9);
    expect(relative(cosmology.comovingVolumeMpc3(3) / unit, atThree)).toBeLessThan(1e-9);
  });
});

describe.each(UNIVERSES)('%s', (_, parameters) => {
  const cosmology = createCosmology(parameters);

  it('a thousand thin shells add up to the whole', () => {
    let sum = 0;
    for (let i = 0; i < 1000; i++) sum += cosmology.shellVolumeAllSkyMpc3(i / 1000, (i + 1) / 1000);
    expect(relative(sum, cosmology.comovingVolumeMpc3(1))).toBeLessThan(1e-12);
    expect(relative(cosmology.shellVolumeAllSkyMpc3(0, 1), cosmology.comovingVolumeMpc3(1))).toBeLessThan(
      1e-13,
    );
  });

  it.each([0.01, 0.7, 2])('a shell of dz 1e-4 at z %d keeps nine digits', (z) => {
    const shell = cosmology.shellVolumeAllSkyMpc3(z - 5e-5, z + 5e-5);
    // Simpson's rule over dV/dz: its error is the fourth power of dz/z
    const dv = cosmology.differentialVolumeMpc3PerSr;
    const simpson = ((4 * Math.PI * 1e-4) / 6) * (dv(z - 5e-5) + 4 * dv(z) + dv(z + 5e-5));
    expect(relative(shell, simpson)).toBeLessThan(1e-11);
    // The plain difference of two volumes keeps nine digits too, from z about 0.1 up
    if (z > 0.1) {
      const difference = cosmology.comovingVolumeMpc3(z + 5e-5) - cosmology.comovingVolumeMpc3(z - 5e-5);
      expect(relative(difference, shell)).toBeLessThan(1e-9);
    }
  });

  it('a shell of dz 1e-10 has the volume of its middle, to the digits that its edges still have', () => {
    const [near, far] = [1, 1 + 1e-10];
    const exact = 4 * Math.PI * cosmology.differentialVolumeMpc3PerSr(1) * (far - near);
    expect(relative(cosmology.shellVolumeAllSkyMpc3(near, far), exact)).toBeLessThan(2e-10);
  });
});

describe('a closed universe', () => {
  const hubble = 299792.458 / 70;
  // Lambda near its limit: the light goes round more than half of space
  const closed = createCosmology(model({ omegaM0: 0.3, omegaDe0: 1.65 }));
  const radius = hubble / Math.sqrt(0.95);

  it('has the volume 2 pi R^3 (chi - sin chi cos chi), beyond a quarter turn too', () => {
    const turns = [0.5, 1.5, 2].map((z) => {
      const chi = closed.comovingMpc(z) / radius;
      const exact = 2 * Math.PI * radius ** 3 * (chi - Math.sin(chi) * Math.cos(chi));
      expect(relative(closed.comovingVolumeMpc3(z), exact)).toBeLessThan(1e-13);
      return chi / Math.PI;
    });
    expect(turns.some((turn) => turn > 0.5 && turn < 1)).toBe(true);
  });

  it('has no transverse distance nor volume beyond its antipode, and says so', () => {
    expect(closed.comovingMpc(20)).toBeGreaterThan(Math.PI * radius);
    expect(relative(closed.antipodeMpc, Math.PI * radius)).toBeLessThan(1e-14);
    for (const method of ['transverseComovingMpc', 'angularDiameterMpc', 'luminosityMpc'] as const)
      expect(() => closed[method](20)).toThrow(
        /^Redshift 20 lies beyond the antipode of this closed universe \(comoving distance \d+\.\d Mpc, antipode 13804\.\d Mpc\); choose a lower redshift or less curvature\.$/,
      );
    expect(() => closed.comovingVolumeMpc3(20)).toThrow(/^Redshift 20 lies beyond the antipode/);
    expect(() => closed.shellVolumeAllSkyMpc3(1, 20)).toThrow(/^Redshift 20 lies beyond the antipode/);
  });

  it('gives no redshift for more than its whole space, 2 pi^2 R^3', () => {
    const whole = 2 * Math.PI ** 2 * radius ** 3;
    expect(() => closed.redshiftAtVolumeMpc3(1.001 * whole)).toThrow(/is at no redshift of this cosmology/);
    // Near the antipode the volume hardly grows, so half of space is asked for.
    const z = closed.redshiftAtVolumeMpc3(whole / 2);
    expect(relative(closed.comovingMpc(z), (Math.PI / 2) * radius)).toBeLessThan(1e-10);
  });

  it('of matter alone has half its space within reach: pi^2 R^3 as z grows', () => {
    const bound = createCosmology(model({ omegaM0: 2, omegaDe0: 0 }));
    // z 1e9 falls short by 2 chi' = 2 / sqrt(2e9) in the angle
    expect(relative(bound.comovingVolumeMpc3(1e9), Math.PI ** 2 * hubble ** 3)).toBeLessThan(1e-4);
  });
});

it('a shell given backwards is refused', () => {
  expect(() => createCosmology(model()).shellVolumeAllSkyMpc3(1, 0.5)).toThrow(
    'A shell from z = 1 to 0.5 runs backwards; give the lower redshift first.',
  );
});
