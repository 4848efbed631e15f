import { Refusal } from '../base/refusal.ts';
import { omegaMassiveNeutrinos } from './expansion.ts';
import { validateValues } from './validation.ts';

/** What defines a homogeneous universe here. Masses in eV, temperatures in kelvin, H0 in km/s/Mpc. */
export interface CosmologyParameters {
  readonly h0KmSMpc: number;
  /** Baryons plus cold dark matter today. Neutrinos are NOT inside: they are added from their masses. */
  readonly omegaM0: number;
  /** Dark energy today, or 'flat': whatever closes the sum to 1. */
  readonly omegaDe0: number | 'flat';
  /** Chevallier-Polarski-Linder: w(a) = w0 + wa (1 - a). */
  readonly w0: number;
  readonly wa: number;
  /** 0 leaves out radiation and neutrinos. */
  readonly tCmbK: number;
  /** Shared equally by floor(nEff) species. */
  readonly nEff: number;
  /** A mass a species, at most floor(nEff) of them; species without one are massless. */
  readonly neutrinoMassesEv: readonly number[];
}

/**
 * For parameters quoted with the massive neutrinos inside the matter density (as Planck's papers do): the same
 * universe with omegaM0 as it is meant here, that is less the massive neutrinos' density today. Massless species
 * count as radiation and are not subtracted.
 *
 * @param quoted parameters whose omegaM0 is baryons, cold dark matter and massive neutrinos
 * @throws Refusal for a value out of bounds, and for neutrinos that outweigh the matter said to contain them
 */
export function parametersWithNeutrinosInside(quoted: CosmologyParameters): CosmologyParameters {
  validateValues(quoted);
  const neutrinos = omegaMassiveNeutrinos(quoted);
  if (neutrinos > quoted.omegaM0) {
    throw new Refusal(
      `omegaM0 is ${quoted.omegaM0} and cannot contain neutrinos of ${neutrinos.toPrecision(4)}; give more matter or lighter neutrinos.`,
      'use',
    );
  }
  return { ...quoted, omegaM0: quoted.omegaM0 - neutrinos };
}

export { validateCosmology } from './validation.ts';
