import { Refusal } from '../base/refusal.ts';
import { type CosmologyParameters, parametersWithNeutrinosInside } from './parameters.ts';

/** A cosmology that a paper published. */
export interface PublishedSet {
  /** What a command or a study calls it. */
  readonly key: string;
  /** What a person reads. */
  readonly name: string;
  readonly paper: string;
  readonly table: string;
  /** Paper and table in one line. */
  readonly source: string;
  readonly parameters: CosmologyParameters;
}

const LAMBDA = { omegaDe0: 'flat', w0: -1, wa: 0 } as const;

// One massive and two massless neutrinos, T_CMB of Fixsen 2009: the base model of Planck 2018 VI, section 2.1.
const PLANCK_RADIATION = { tCmbK: 2.7255, nEff: 3.046, neutrinoMassesEv: [0, 0, 0.06] } as const;
// Massless neutrinos, T_CMB of Mather et al. 1999: the base model of the WMAP papers.
const WMAP_RADIATION = { tCmbK: 2.725, nEff: 3.04, neutrinoMassesEv: [0, 0, 0] } as const;

const PLANCK_PAPER = 'Planck Collaboration 2020, A&A 641, A6 (Planck 2018 results VI, arXiv:1807.06209)';

/** Planck's matter densities contain the massive neutrino: it is taken out here. */
export const PUBLISHED_SETS: readonly PublishedSet[] = [
  set(
    'planck2018',
    'Planck 2018 + BAO',
    PLANCK_PAPER,
    'table 2, TT,TE,EE+lowE+lensing+BAO',
    parametersWithNeutrinosInside({ ...LAMBDA, ...PLANCK_RADIATION, h0KmSMpc: 67.66, omegaM0: 0.3111 }),
  ),
  set(
    'planck2018NoBao',
    'Planck 2018',
    PLANCK_PAPER,
    'table 2, TT,TE,EE+lowE+lensing',
    parametersWithNeutrinosInside({ ...LAMBDA, ...PLANCK_RADIATION, h0KmSMpc: 67.36, omegaM0: 0.3153 }),
  ),
  set(
    'wmap9',
    'WMAP 9-year',
    'Hinshaw et al. 2013, ApJS 208, 19 (arXiv:1212.5226)',
    'table 4, WMAP+eCMB+BAO+H0',
    { ...LAMBDA, ...WMAP_RADIATION, h0KmSMpc: 69.32, omegaM0: 0.2865 },
  ),
  set(
    'wmap5',
    'WMAP 5-year',
    'Komatsu et al. 2009, ApJS 180, 330 (arXiv:0803.0547)',
    'table 1 and abstract, WMAP+BAO+SN mean',
    { ...LAMBDA, ...WMAP_RADIATION, h0KmSMpc: 70.5, omegaM0: 0.274 },
  ),
  set('flat70', 'Flat 70 / 0.3', 'Round numbers, no paper', 'H0 70, matter 0.3, no radiation', {
    ...LAMBDA,
    h0KmSMpc: 70,
    omegaM0: 0.3,
    tCmbK: 0,
    nEff: 0,
    neutrinoMassesEv: [],
  }),
];

function set(
  key: string,
  name: string,
  paper: string,
  table: string,
  parameters: CosmologyParameters,
): PublishedSet {
  return { key, name, paper, table, source: `${paper}, ${table}`, parameters };
}

/** @throws Refusal for an unknown key, listing those there are */
export function findPublishedSet(key: string): PublishedSet {
  const found = PUBLISHED_SETS.find((one) => one.key.toLowerCase() === key.toLowerCase());
  if (found) return found;
  throw new Refusal(
    `There is no published cosmology "${key}"; choose one of ${PUBLISHED_SETS.map((one) => one.key).join(', ')}.`,
    'use',
  );
}

/** The key of the published set that has exactly these parameters, or null for own ones. */
export function publishedSetKey(parameters: CosmologyParameters): string | null {
  const text = canonical(parameters);
  return PUBLISHED_SETS.find((set) => canonical(set.parameters) === text)?.key ?? null;
}

function canonical(p: CosmologyParameters): string {
  return JSON.stringify([p.h0KmSMpc, p.omegaM0, p.omegaDe0, p.w0, p.wa, p.tCmbK, p.nEff, p.neutrinoMassesEv]);
}
