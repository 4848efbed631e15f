import { describe, expect, it } from 'vitest';
import { createCosmology } from '../../../shared-core/cosmology/cosmology.ts';
import { model } from './models.ts';

// Closed forms, written again here. c, Mpc and the year as in the head of the table of check values.
const HUBBLE_MPC = 299792.458 / 70;
const HUBBLE_GYR = 3.085677581491367e19 / 70 / (365.25 * 86400e9);
const REDSHIFTS = [1e-6, 1e-3, 0.1, 0.5, 1, 3, 10, 100, 1100, 1e5];

const near = (ours: number, exact: number, tolerance = 1e-12) =>
  expect(Math.abs(ours / exact - 1)).toBeLessThan(tolerance);

/** 1 - (1+z)^-p without loss at small z. */
const fallen = (z: number, p: number) => -Math.expm1(-p * Math.log1p(z));

describe('Einstein-de Sitter', () => {
  const eds = createCosmology(model({ omegaM0: 1 }));
  it.each(REDSHIFTS)('z %d', (z) => {
    near(eds.comovingMpc(z), 2 * HUBBLE_MPC * fallen(z, 0.5));
    near(eds.lookbackGyr(z), (2 / 3) * HUBBLE_GYR * fallen(z, 1.5));
    near(eds.ageGyr(z), (2 / 3) * HUBBLE_GYR * (1 + z) ** -1.5);
    near(eds.hubbleKmSMpc(z), 70 * (1 + z) ** 1.5);
  });
  it('the values of the table (computed)', () => {
    near(eds.comovingMpc(1), 2508.776514, 1e-9);
    near(eds.comovingMpc(3), 4282.7494, 1e-8);
    near(eds.lookbackGyr(1), 6.019909204, 1e-9);
    near(eds.ageGyr(0), 9.312306873, 1e-9);
    near(eds.particleHorizonMpc(), 2 * HUBBLE_MPC);
  });
});

describe('Milne', () => {
  const milne = createCosmology(model({ omegaM0: 0, omegaDe0: 0 }));
  it.each(REDSHIFTS)('z %d', (z) => {
    near(milne.comovingMpc(z), HUBBLE_MPC * Math.log1p(z));
    near(milne.transverseComovingMpc(z), (HUBBLE_MPC * z * (1 + z / 2)) / (1 + z));
    near(milne.lookbackGyr(z), (HUBBLE_GYR * z) / (1 + z));
    near(milne.ageGyr(z), HUBBLE_GYR / (1 + z));
  });
  it('the values of the table (computed)', () => {
    near(milne.comovingMpc(1), 2968.575672, 1e-9);
    near(milne.transverseComovingMpc(1), 3212.06205, 1e-9);
    near(milne.lookbackGyr(0.5), 4.656153, 1e-7);
    near(milne.lookbackGyr(1), 6.98423, 1e-7);
    expect(milne.particleHorizonMpc()).toBe(Number.POSITIVE_INFINITY);
  });
});

describe('de Sitter', () => {
  const deSitter = createCosmology(model({ omegaM0: 0, omegaDe0: 1 }));
  it.each(REDSHIFTS)('z %d', (z) => {
    near(deSitter.comovingMpc(z), HUBBLE_MPC * z);
    near(deSitter.lookbackGyr(z), HUBBLE_GYR * Math.log1p(z));
    near(deSitter.hubbleKmSMpc(z), 70);
  });
  it('has no beginning', () => {
    near(deSitter.lookbackGyr(1), 9.68219888, 1e-9);
    expect(deSitter.ageGyr(0)).toBe(Number.POSITIVE_INFINITY);
    expect(() => deSitter.redshiftAtAgeGyr(5)).toThrow(
      'This universe has no beginning, so an age gives no redshift; ask by lookback time.',
    );
  });
});

describe('matter alone: Mattig 1958', () => {
  const mattig = (omega: number, z: number) =>
    ((2 * HUBBLE_MPC) / (omega ** 2 * (1 + z))) *
    (omega * z + (omega - 2) * ((omega * z) / (Math.sqrt(1 + omega * z) + 1)));
  it.each([0.3, 1, 2, 5])('matter %d', (omegaM0) => {
    const cosmology = createCosmology(model({ omegaM0, omegaDe0: 0 }));
    // 1e-9: the formula itself cancels for omega 0.3 at small z
    for (const z of REDSHIFTS.slice(1)) near(cosmology.transverseComovingMpc(z), mattig(omegaM0, z), 1e-9);
  });
  it('the values of the table (computed)', () => {
    const open = createCosmology(model({ omegaDe0: 0 }));
    const closed = createCosmology(model({ omegaM0: 2, omegaDe0: 0 }));
    near(open.transverseComovingMpc(1), 2936.147221, 1e-9);
    near(open.transverseComovingMpc(3), 6107.955173, 1e-9);
    near(closed.transverseComovingMpc(1), 2141.3747, 1e-8);
    near(open.ageGyr(0), 11.297596476, 1e-10);
    near(closed.ageGyr(0), 7.973145836, 1e-9);
  });
  it('ages in closed form (Peebles 1993, eq. 13.10 and 13.11, values from memory, agree with the table)', () => {
    const o = 0.3;
    near(
      createCosmology(model({ omegaM0: o, omegaDe0: 0 })).ageGyr(0),
      HUBBLE_GYR * (1 / (1 - o) - (o / 2) * (1 - o) ** -1.5 * Math.acosh(2 / o - 1)),
    );
    near(createCosmology(model({ omegaM0: 2, omegaDe0: 0 })).ageGyr(0), HUBBLE_GYR * (Math.PI / 2 - 1));
  });
});

describe('flat LCDM', () => {
  const cosmology = createCosmology(model());
  it.each(REDSHIFTS)('age at z %d (arcsinh form)', (z) => {
    const exact =
      (2 / (3 * Math.sqrt(0.7))) * HUBBLE_GYR * Math.asinh(Math.sqrt(0.7 / 0.3) * (1 + z) ** -1.5);
    near(cosmology.ageGyr(z), exact);
  });
  it('the values of the table (computed)', () => {
    near(cosmology.ageGyr(0), 13.466983947, 1e-10);
    for (const [z, dc, dl, da, lookback, gpc3] of [
      [0.5, 1888.625396, 2832.938094, 1259.083597, 5.040637929, 28.21799064],
      [1, 3303.828806, 6607.657612, 1651.914403, 7.715337004, 151.0571253],
      [3, 6355.685436, 25422.741745, 1588.921359, 11.354456756, 1075.414264],
    ] as const) {
      near(cosmology.comovingMpc(z), dc, 1e-9);
      near(cosmology.transverseComovingMpc(z), dc, 1e-9);
      near(cosmology.luminosityMpc(z), dl, 1e-9);
      near(cosmology.angularDiameterMpc(z), da, 1e-9);
      near(cosmology.lookbackGyr(z), lookback, 1e-9);
      near(cosmology.comovingVolumeMpc3(z), gpc3 * 1e9, 1e-9);
      near(cosmology.distanceModulus(z), 5 * Math.log10(dl) + 25, 1e-9);
      near(
        cosmology.volumeAveragedMpc(z),
        Math.cbrt((z * dc * dc * 299792.458) / cosmology.hubbleKmSMpc(z)),
        1e-9,
      );
      near(
        cosmology.differentialVolumeMpc3PerSr(z),
        (dc * dc * 299792.458) / cosmology.hubbleKmSMpc(z),
        1e-8,
      );
    }
  });
});

describe('dark energy alone', () => {
  // E = (1+z)^(3(1+w)/2)
  it.each([-0.5, -2 / 3 + 0.1, 0.2])('w %d', (w0) => {
    const cosmology = createCosmology(model({ omegaM0: 0, omegaDe0: 1, w0 }));
    const half = 1.5 * (1 + w0);
    for (const z of REDSHIFTS) {
      near(
        cosmology.comovingMpc(z),
        (HUBBLE_MPC * Math.expm1((1 - half) * Math.log1p(z))) / (1 - half),
        1e-11,
      );
      near(cosmology.ageGyr(z), (HUBBLE_GYR / half) * (1 + z) ** -half);
    }
  });
});

describe('matter and radiation', () => {
  const all = createCosmology(model({ tCmbK: 2.7255, nEff: 3.046 }));
  const r = all.omegaGamma0 + all.omegaNu0;
  const m = 1 - r;
  // no dark energy: matter fills the rest
  const cosmology = createCosmology(model({ omegaM0: m, tCmbK: 2.7255, nEff: 3.046 }));
  it.each([...REDSHIFTS, 1e7, 1e9])('z %d', (z) => {
    const a = 1 / (1 + z);
    const q = (x: number) => Math.sqrt(m * x + r);
    // sqrt(1) - sqrt(m a + r) = m (1 - a) / (sum), to keep digits
    near(cosmology.comovingMpc(z), (2 * HUBBLE_MPC * (z * a)) / (q(1) + q(a)), 1e-12);
    // age: 2/(3 m^2) [(m a - 2 r) q + 2 r^(3/2)], as a^2 (..)/.. to keep digits: (q - s)^2 (q + 2 s), s = sqrt r
    const s = Math.sqrt(r);
    near(cosmology.ageGyr(z), (2 / 3) * HUBBLE_GYR * (a / (q(a) + s)) ** 2 * (q(a) + 2 * s), 1e-12);
  });
  it('particle horizon', () => {
    near(cosmology.particleHorizonMpc(), (2 * HUBBLE_MPC) / (Math.sqrt(m + r) + Math.sqrt(r)));
  });
});

describe('limits', () => {
  it('at z = 0', () => {
    const cosmology = createCosmology(model());
    expect(cosmology.comovingMpc(0)).toBe(0);
    expect(cosmology.lookbackGyr(0)).toBe(0);
    expect(cosmology.comovingVolumeMpc3(0)).toBe(0);
    expect(cosmology.volumeAveragedMpc(0)).toBe(0);
    expect(cosmology.distanceModulus(0)).toBe(Number.NEGATIVE_INFINITY);
    expect(cosmology.hubbleKmSMpc(0)).toBeCloseTo(70, 12);
    expect(cosmology.h).toBe(0.7);
  });

  it('a curvature that vanishes gives the flat universe', () => {
    const flat = createCosmology(model());
    for (const off of [1e-12, -1e-12]) {
      const curved = createCosmology(model({ omegaDe0: 0.7 + off }));
      for (const z of [0.01, 1, 8]) {
        near(curved.comovingVolumeMpc3(z), flat.comovingVolumeMpc3(z), 1e-11);
        near(curved.transverseComovingMpc(z), flat.transverseComovingMpc(z), 1e-11);
      }
    }
  });

  it('densities that miss 1 by rounding are flat', () => {
    expect(createCosmology(model({ omegaM0: 0.1 + 0.2, omegaDe0: 0.7 })).omegaK0).toBe(0);
    expect(createCosmology(model({ omegaDe0: 0.69 })).omegaK0).toBeCloseTo(0.01, 15);
  });

  it('w = -1 written as w0 and wa that cancel at z = 0 differs from Lambda only where it should', () => {
    const a = createCosmology(model({ w0: -1, wa: 1e-12 }));
    near(a.comovingMpc(2), createCosmology(model()).comovingMpc(2), 1e-11);
  });

  it('refuses a redshift out of range, by every method', () => {
    const cosmology = createCosmology(model());
    const sentence = 'Redshift -0.1 is outside the range of the cosmology; give one from 0 to 1000000000.';
    expect(() => cosmology.comovingMpc(-0.1)).toThrow(sentence);
    for (const method of [
      'hubbleKmSMpc',
      'comovingMpc',
      'transverseComovingMpc',
      'angularDiameterMpc',
      'luminosityMpc',
      'distanceModulus',
      'volumeAveragedMpc',
      'lookbackGyr',
      'ageGyr',
      'comovingVolumeMpc3',
      'differentialVolumeMpc3PerSr',
    ] as const) {
      for (const z of [-0.1, Number.NaN, 2e9, Number.POSITIVE_INFINITY])
        expect(() => cosmology[method](z), method).toThrow(/is outside the range of the cosmology/);
    }
  });
});
