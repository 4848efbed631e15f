import { describe, expect, it } from 'vitest';
import { Refusal } from '../../../shared-core/base/refusal.ts';
import { createCosmology } from '../../../shared-core/cosmology/cosmology.ts';
import { type CosmologyParameters, validateCosmology } from '../../../shared-core/cosmology/parameters.ts';
import { PUBLISHED_SETS } from '../../../shared-core/cosmology/publishedSets.ts';
import { model, UNIVERSES } from './models.ts';

function sentenceOf(parameters: CosmologyParameters): string {
  try {
    validateCosmology(parameters);
  } catch (error) {
    expect(error).toBeInstanceOf(Refusal);
    expect((error as Refusal).kind).toBe('use');
    return (error as Refusal).message;
  }
  return '';
}

describe('parameters out of bounds', () => {
  it.each([
    [{ h0KmSMpc: 0 }, 'h0KmSMpc is 0; allowed is a number from 1 to 1000 (km/s/Mpc, not h).'],
    [{ h0KmSMpc: 0.7 }, 'h0KmSMpc is 0.7; allowed is a number from 1 to 1000 (km/s/Mpc, not h).'],
    [{ h0KmSMpc: -70 }, /^h0KmSMpc is -70;/],
    [{ omegaM0: -0.1 }, /^omegaM0 is -0\.1; allowed is a number from 0 to 100/],
    [{ omegaM0: Number.NaN }, /^omegaM0 is NaN;/],
    [{ omegaDe0: Number.POSITIVE_INFINITY }, /^omegaDe0 is Infinity; allowed is a number from -100 to 100/],
    [{ w0: Number.NEGATIVE_INFINITY }, /^w0 is -Infinity;/],
    [{ wa: Number.NaN }, /^wa is NaN;/],
    [
      { tCmbK: -1 },
      'tCmbK is -1; allowed is a number from 0 to 100 (kelvin; 0 leaves out radiation and neutrinos).',
    ],
    [{ nEff: -3 }, /^nEff is -3;/],
    [
      { neutrinoMassesEv: [0, -0.06] },
      'neutrinoMassesEv contains -0.06; allowed are masses from 0 to 100 eV.',
    ],
    [{ neutrinoMassesEv: [Number.NaN] }, /^neutrinoMassesEv contains NaN;/],
    [
      { tCmbK: 2.7, nEff: 3.9, neutrinoMassesEv: [0, 0, 0, 0.1] },
      'neutrinoMassesEv lists 4 masses; allowed are at most 3, the whole part of nEff 3.9.',
    ],
    [
      { tCmbK: 2.7, nEff: 0.5, neutrinoMassesEv: [0.1] },
      /^neutrinoMassesEv lists 1 masses; allowed are at most 0/,
    ],
  ] as const)('%j', (changes, sentence) => {
    const came = sentenceOf(model(changes));
    if (typeof sentence === 'string') expect(came).toBe(sentence);
    else expect(came).toMatch(sentence);
    expect(() => createCosmology(model(changes))).toThrow(came);
  });

  it('a value of the wrong type, as it may come from a file', () => {
    const broken = { ...model(), w0: '-1' } as unknown as CosmologyParameters;
    expect(sentenceOf(broken)).toMatch(/^w0 is -1; allowed is a number/);
    expect(sentenceOf({ ...model(), omegaDe0: 'open' } as unknown as CosmologyParameters)).toMatch(
      /^omegaDe0 is open/,
    );
  });
});

describe('no big bang', () => {
  /** Carroll, Press & Turner 1992, ARA&A 30, 499, eq. 11 (value from memory): the greatest Lambda with a big bang. */
  const greatest = (m: number) =>
    4 * m * (m < 0.5 ? Math.cosh : Math.cos)((m < 0.5 ? Math.acosh : Math.acos)((1 - m) / m) / 3) ** 3;

  it.each([0.1, 0.3, 0.7, 1])('matter %d: Lambda is bounded as Carroll, Press & Turner say', (omegaM0) => {
    const limit = greatest(omegaM0);
    expect(sentenceOf(model({ omegaM0, omegaDe0: limit - 1e-4 }))).toBe('');
    const sentence = sentenceOf(model({ omegaM0, omegaDe0: limit + 0.05 }));
    const allowed = /allowed with the other parameters is omegaDe0 below (\S+)\.$/.exec(sentence)?.[1];
    // The sentence gives four places
    expect(Math.abs(Number(allowed) / limit - 1)).toBeLessThan(1e-4);
  });

  it.each([
    [
      { omegaDe0: 2 },
      /^omegaDe0 is 2 and H\^2 falls to 0 or nearly so at z = 0\.\d+, so there is no big bang; allowed with the other parameters is omegaDe0 below 1\.71\d+\.$/,
    ],
    [
      { omegaM0: 1.5, w0: 0.5 },
      /^w0 is 0\.5 and H\^2 falls to 0 or nearly so at z = .*; allowed with the other parameters is w0 below 0\.$/,
    ],
    [
      { omegaM0: 1.2, wa: 2 },
      /^wa is 2 and H\^2 falls to 0 .*; allowed with the other parameters is wa below 1\.$/,
    ],
    [{ omegaM0: 0, omegaDe0: 2 }, /omegaDe0 below 1\.$/],
    [{ omegaDe0: -0.2, w0: 0.2, wa: 0.4 }, /^omegaDe0 is -0\.2 and .* omegaDe0 above /],
  ] as const)('%j', (changes, sentence) => {
    expect(sentenceOf(model(changes))).toMatch(sentence);
  });

  it('a universe that all but stands still is refused too', () => {
    // E^2 touches 0 at the limit: within 1e-9 of it H falls under a thousandth of H0
    expect(sentenceOf(model({ omegaDe0: greatest(0.3) - 1e-9 }))).toMatch(/^omegaDe0 is 1\.71/);
  });

  it('is found beyond the table too', () => {
    // dark energy of a negative density that overtakes matter at z of some ten thousand
    const sentence = sentenceOf(model({ omegaM0: 1.0001, w0: 0.3 }));
    expect(Number(/at z = (\S+),/.exec(sentence)?.[1])).toBeGreaterThan(1100);
  });
});

describe('what is allowed', () => {
  it.each([...UNIVERSES, ...PUBLISHED_SETS.map((set) => [set.key, set.parameters] as const)])(
    '%s',
    (_, parameters) => {
      expect(sentenceOf(parameters)).toBe('');
    },
  );
  it.each([
    ['de Sitter', { omegaM0: 0, omegaDe0: 1 }],
    ['negative Lambda', { omegaDe0: -1 }],
    ['masses without radiation, which are then left out', { neutrinoMassesEv: [0.1] }],
    ['four massless species listed', { tCmbK: 2.7, nEff: 3, neutrinoMassesEv: [0, 0, 0, 0] }],
  ] as const)('%s', (_, changes) => {
    expect(sentenceOf(model(changes))).toBe('');
  });
});
