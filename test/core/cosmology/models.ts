import type { CosmologyParameters } from '../../../shared-core/cosmology/parameters.ts';

/** H0 70, no radiation, flat with matter 0.3 unless said otherwise. */
export function model(changes: Partial<CosmologyParameters> = {}): CosmologyParameters {
  return {
    h0KmSMpc: 70,
    omegaM0: 0.3,
    omegaDe0: 'flat',
    w0: -1,
    wa: 0,
    tCmbK: 0,
    nEff: 0,
    neutrinoMassesEv: [],
    ...changes,
  };
}

/** A spread of universes that exercise every term. */
export const UNIVERSES: readonly (readonly [name: string, parameters: CosmologyParameters])[] = [
  ['flat LCDM', model()],
  ['Einstein-de Sitter', model({ omegaM0: 1 })],
  ['Milne', model({ omegaM0: 0, omegaDe0: 0 })],
  ['open', model({ omegaDe0: 0 })],
  ['closed with Lambda', model({ omegaM0: 0.35, omegaDe0: 0.9 })],
  ['nearly flat', model({ omegaDe0: 0.7 + 1e-9 })],
  ['w0 wa', model({ w0: -0.8, wa: 0.5 })],
  ['phantom', model({ w0: -1.4, wa: -1 })],
  ['radiation', model({ tCmbK: 2.7255, nEff: 3.046 })],
  [
    'massive neutrinos, curved, w0 wa',
    model({
      omegaDe0: 0.65,
      w0: -0.9,
      wa: 0.3,
      tCmbK: 2.7255,
      nEff: 3.046,
      neutrinoMassesEv: [0.01, 0.05, 0.3],
    }),
  ],
  ['heavy neutrino', model({ tCmbK: 2.7255, nEff: 3.046, neutrinoMassesEv: [2] })],
];
