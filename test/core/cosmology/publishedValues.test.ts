import { describe, expect, it } from 'vitest';
import { createCosmology } from '../../../shared-core/cosmology/cosmology.ts';
import { parametersWithNeutrinosInside } from '../../../shared-core/cosmology/parameters.ts';
import { findPublishedSet, PUBLISHED_SETS } from '../../../shared-core/cosmology/publishedSets.ts';
import { model } from './models.ts';

const ageToday = (key: string) => createCosmology(findPublishedSet(key).parameters).ageGyr(0);

describe('ages that papers state', () => {
  it('Komatsu et al. 2009 (0803.0547, abstract, read): 13.72 +- 0.12 Gyr', () => {
    expect(Math.abs(ageToday('wmap5') - 13.72)).toBeLessThan(0.02);
  });

  it.each([
    [67.36, 0.3153, 13.797],
    [67.27, 0.3166, 13.8],
    [68.44, 0.301, 13.761],
    [66.88, 0.321, 13.83],
    [67.66, 0.3111, 13.787],
  ])(
    'Planck 2018 VI (1807.06209), table 2 (value from memory): H0 %d, matter %d',
    (h0KmSMpc, omegaM0, age) => {
      const quoted = model({ h0KmSMpc, omegaM0, tCmbK: 2.7255, nEff: 3.046, neutrinoMassesEv: [0.06] });
      // The paper's digits of H0 and matter are worth 0.006 Gyr
      expect(Math.abs(createCosmology(parametersWithNeutrinosInside(quoted)).ageGyr(0) - age)).toBeLessThan(
        0.006,
      );
    },
  );

  it('Hinshaw et al. 2013, table 4 (value from memory): 13.772 Gyr', () => {
    expect(Math.abs(ageToday('wmap9') - 13.772)).toBeLessThan(0.006);
  });

  it('the concordance age is about 13.7 Gyr (common practice, no source)', () => {
    for (const key of ['planck2018', 'planck2018NoBao', 'wmap9', 'wmap5'])
      expect(Math.abs(ageToday(key) - 13.7)).toBeLessThan(0.15);
  });
});

it('Anderson et al. 2014 (1312.4877), z 0.57 (value from memory): D_A 1359.72 Mpc, H 93.558 km/s/Mpc', () => {
  const cosmology = createCosmology(model({ omegaM0: 0.274 }));
  // Six and five digits were printed
  expect(Math.abs(cosmology.angularDiameterMpc(0.57) - 1359.72)).toBeLessThan(0.006);
  expect(Math.abs(cosmology.hubbleKmSMpc(0.57) - 93.558)).toBeLessThan(0.0006);
});

describe('published sets', () => {
  it('each has a name, a paper and a table, keys are unique, and each is a flat universe', () => {
    expect(PUBLISHED_SETS.map((set) => set.key)).toEqual([
      'planck2018',
      'planck2018NoBao',
      'wmap9',
      'wmap5',
      'flat70',
    ]);
    for (const set of PUBLISHED_SETS) {
      expect(set.name.length * set.paper.length * set.table.length).toBeGreaterThan(0);
      expect(set.source).toBe(`${set.paper}, ${set.table}`);
      const cosmology = createCosmology(set.parameters);
      expect(cosmology.omegaK0).toBe(0);
      const { omegaDe0, omegaGamma0, omegaNu0 } = cosmology;
      expect(set.parameters.omegaM0 + omegaDe0 + omegaGamma0 + omegaNu0).toBeCloseTo(1, 14);
    }
  });

  it("Planck's matter without its neutrino is baryons plus cold dark matter, 0.30966 (astropy 5.2.1, Planck18)", () => {
    expect(Math.abs(findPublishedSet('planck2018').parameters.omegaM0 - 0.30966)).toBeLessThan(3e-5);
  });

  it('are found in any case, and an unknown one is refused with the list', () => {
    expect(findPublishedSet('PLANCK2018').key).toBe('planck2018');
    expect(() => findPublishedSet('planck')).toThrow(
      'There is no published cosmology "planck"; choose one of planck2018, planck2018NoBao, wmap9, wmap5, flat70.',
    );
  });
});

describe('neutrinos inside the matter density', () => {
  const radiation = { tCmbK: 2.7255, nEff: 3.046 };

  it('are taken out: about mass / 93.1 eV / h^2 (common practice, no source; 1%: it shares nEff differently)', () => {
    const inside = model({ ...radiation, neutrinoMassesEv: [0.06] });
    const without = parametersWithNeutrinosInside(inside);
    expect(Math.abs(((inside.omegaM0 - without.omegaM0) * 0.49 * 93.1) / 0.06 - 1)).toBeLessThan(0.01);
    expect({ ...without, omegaM0: 0.3 }).toEqual(inside);
  });

  it('massless ones are not subtracted, nor any without radiation', () => {
    for (const parameters of [
      model({ ...radiation, neutrinoMassesEv: [0, 0, 0] }),
      model({ neutrinoMassesEv: [0.06] }),
    ])
      expect(parametersWithNeutrinosInside(parameters)).toEqual(parameters);
  });

  it('are refused when they outweigh the matter, or when a value is out of bounds', () => {
    expect(() =>
      parametersWithNeutrinosInside(model({ ...radiation, omegaM0: 0.01, neutrinoMassesEv: [1] })),
    ).toThrow(
      /^omegaM0 is 0\.01 and cannot contain neutrinos of 0\.02\d+; give more matter or lighter neutrinos\.$/,
    );
    expect(() =>
      parametersWithNeutrinosInside(model({ tCmbK: 2.7, nEff: 0.5, neutrinoMassesEv: [1] })),
    ).toThrow(/^neutrinoMassesEv lists 1 masses/);
  });

  it('missing masses are massless species', () => {
    const at = (neutrinoMassesEv: number[]) =>
      createCosmology(model({ ...radiation, neutrinoMassesEv })).comovingMpc(2);
    expect(at([0.06])).toBe(at([0, 0, 0.06]));
    expect(at([])).toBe(at([0, 0, 0]));
    expect(at([0.06])).not.toBe(at([0.06, 0.06]));
  });
});
