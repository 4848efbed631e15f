import type { Command } from 'commander';
import { Refusal } from '../../shared-core/base/refusal.ts';
import { type Cosmology, createCosmology } from '../../shared-core/cosmology/cosmology.ts';
import {
  type CosmologyParameters,
  parametersWithNeutrinosInside,
} from '../../shared-core/cosmology/parameters.ts';
import {
  findPublishedSet,
  PUBLISHED_SETS,
  type PublishedSet,
} from '../../shared-core/cosmology/publishedSets.ts';
import { numberList, oneNumber } from './numbers.ts';

export interface CosmologyOptions {
  cosmology?: string;
  h0?: number;
  omegaM?: number;
  omegaDe?: number;
  w0?: number;
  wa?: number;
  tcmb?: number;
  neff?: number;
  mnu?: number[];
  flat?: true;
  neutrinosInside?: true;
}

/** The options that every verb with a cosmology has. */
export function addCosmologyOptions(command: Command): Command {
  const names = PUBLISHED_SETS.map((set) => set.key).join(', ');
  return command
    .option('--cosmology <name>', `published set: ${names} (planck2018 if none is named)`)
    .option('--h0 <km/s/Mpc>', "Hubble constant, instead of the set's", oneNumber('--h0'))
    .option(
      '--omega-m <n>',
      'baryons plus cold dark matter today; neutrinos are added to it',
      oneNumber('--omega-m'),
    )
    .option('--omega-de <n>', 'dark energy today; flat if not given', oneNumber('--omega-de'))
    .option('--w0 <n>', 'dark energy today, w(a) = w0 + wa (1 - a)', oneNumber('--w0'))
    .option('--wa <n>', 'change of w with a', oneNumber('--wa'))
    .option('--tcmb <K>', 'CMB temperature; 0 leaves out radiation and neutrinos', oneNumber('--tcmb'))
    .option('--neff <n>', 'effective number of neutrino species', oneNumber('--neff'))
    .option('--mnu <eV,...>', 'neutrino masses, such as 0,0,0.06', numberList('--mnu'))
    .option('--flat', 'dark energy closes the sum to 1 (so it is unless --omega-de is given)')
    .option('--neutrinos-inside', 'the density of --omega-m contains the massive neutrinos');
}

/** The cosmology asked for, and which published set it is. */
export function cosmologyOf(options: CosmologyOptions): {
  cosmology: Cosmology;
  /** Null where a parameter was changed. */
  set: PublishedSet | null;
} {
  const set = findPublishedSet(options.cosmology ?? 'planck2018');
  if (options.flat && options.omegaDe !== undefined)
    throw new Refusal('--flat and --omega-de contradict each other: give one of them.', 'use');
  if (options.neutrinosInside && options.omegaM === undefined)
    throw new Refusal(
      '--neutrinos-inside came without --omega-m: give the matter density that contains them.',
      'use',
    );
  const base = set.parameters;
  let parameters: CosmologyParameters = {
    h0KmSMpc: options.h0 ?? base.h0KmSMpc,
    omegaM0: options.omegaM ?? base.omegaM0,
    omegaDe0: options.omegaDe ?? (options.flat ? 'flat' : base.omegaDe0),
    w0: options.w0 ?? base.w0,
    wa: options.wa ?? base.wa,
    tCmbK: options.tcmb ?? base.tCmbK,
    nEff: options.neff ?? base.nEff,
    neutrinoMassesEv:
      options.tcmb === 0 && options.mnu === undefined ? [] : (options.mnu ?? base.neutrinoMassesEv),
  };
  if (options.neutrinosInside) parameters = parametersWithNeutrinosInside(parameters);
  const changed = Object.keys(options).some((key) =>
    ['h0', 'omegaM', 'omegaDe', 'w0', 'wa', 'tcmb', 'neff', 'mnu', 'neutrinosInside'].includes(key),
  );
  const cosmology = createCosmology(parameters);
  return { cosmology, set: changed ? null : set };
}
