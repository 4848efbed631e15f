import { integrate } from '../numerics/quadrature.ts';
import { BOLTZMANN_EV_K } from './constants.ts';
import type { CosmologyParameters } from './parameters.ts';

/** Energy density of one massless species in units of that of the photons: 7/8 (4/11)^(4/3). */
export const NEUTRINO_TO_PHOTON = (7 / 8) * (4 / 11) ** (4 / 3);

/** Temperature of the neutrino background today, (4/11)^(1/3) T_CMB, times Boltzmann's constant: eV. */
function neutrinoTemperatureEv(tCmbK: number): number {
  return (4 / 11) ** (1 / 3) * tCmbK * BOLTZMANN_EV_K;
}

/**
 * How much denser a species of mass m is than a massless one, y = m c2 / (k T_nu (1+z)):
 *   f(y) = 120/(7 pi^4) * integral over x > 0 of x^2 sqrt(x^2 + y^2) / (e^x + 1)
 * (Komatsu et al. 2011, ApJS 192, 18, eq. 24 to 26, the integral itself and not their fit). f(0) = 1; f tends to 0.3173 y.
 */
export function massiveNeutrinoRatioExact(y: number): number {
  const integrand = (x: number) => (x * x * Math.sqrt(x * x + y * y)) / (Math.exp(x) + 1);
  // Split where the integrand bends for small y; beyond x = 60 it is under 1e-22 of the whole.
  const bend = Math.min(Math.max(y, 1e-3), 20);
  return (120 / (7 * Math.PI ** 4)) * (integrate(integrand, 0, bend) + integrate(integrand, bend, 60));
}

/** massiveNeutrinoRatioExact. */
export function massiveNeutrinoRatio(y: number): number {
  return massiveNeutrinoRatioExact(y);
}

/** Densities in units of the photons' at the same redshift. */
export interface Neutrinos {
  readonly hasMassive: boolean;
  /** Of all massless species. */
  readonly massless: number;
  /** Of all massive species at 1+z = x. */
  massive(x: number): number;
}

/**
 * floor(nEff) species share nEff equally; a species without a mass in the list is massless (the list is padded with
 * zeros). Each is 7/8 (4/11)^(4/3) nEff/floor(nEff) f(y) of the photons. With all massless their sum is
 * 7/8 (4/11)^(4/3) nEff for any nEff. Without photons (tCmbK 0) there are no neutrinos.
 */
export function createNeutrinos(parameters: CosmologyParameters): Neutrinos {
  const { nEff, tCmbK } = parameters;
  const masses = tCmbK > 0 ? parameters.neutrinoMassesEv.filter((mass) => mass > 0) : [];
  if (masses.length === 0) {
    return { hasMassive: false, massless: NEUTRINO_TO_PHOTON * nEff, massive: () => 0 };
  }
  const species = Math.floor(nEff);
  const perSpecies = (NEUTRINO_TO_PHOTON * nEff) / species;
  const yToday = masses.map((mass) => mass / neutrinoTemperatureEv(tCmbK));
  return {
    hasMassive: true,
    massless: perSpecies * (species - masses.length),
    massive: (x) => {
      let sum = 0;
      for (let i = 0; i < yToday.length; i++) sum += massiveNeutrinoRatio(yToday[i]! / x);
      return perSpecies * sum;
    },
  };
}
