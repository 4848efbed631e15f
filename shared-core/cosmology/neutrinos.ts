import { cbrt, exp, log, pow, powerOf, square } from '../numerics/elementary/elementary.ts';
import { COEFFICIENTS, evaluateCell, fitCell } from '../numerics/piecewisePolynomial.ts';
import { integrate } from '../numerics/quadrature.ts';
import { BOLTZMANN_EV_K } from './constants.ts';
import type { CosmologyParameters } from './parameters.ts';

/** Energy density of one massless species in units of that of the photons: 7/8 (4/11)^(4/3). */
export const NEUTRINO_TO_PHOTON = (7 / 8) * pow(4 / 11, 4 / 3);

/** Temperature of the neutrino background today, (4/11)^(1/3) T_CMB, times Boltzmann's constant: eV. */
function neutrinoTemperatureEv(tCmbK: number): number {
  return cbrt(4 / 11) * tCmbK * BOLTZMANN_EV_K;
}

/**
 * How much denser a species of mass m is than a massless one, y = m c2 / (k T_nu (1+z)):
 *   f(y) = 120/(7 pi^4) * integral over x > 0 of x^2 sqrt(x^2 + y^2) / (e^x + 1)
 * (Komatsu et al. 2011, ApJS 192, 18, eq. 24 to 26, the integral itself and not their fit). f(0) = 1; f tends to 0.3173 y.
 */
export function massiveNeutrinoRatioExact(y: number): number {
  const integrand = (x: number) => (x * x * Math.sqrt(x * x + y * y)) / (exp(x) + 1);
  // Split where the integrand bends for small y; beyond x = 60 it is under 1e-22 of the whole.
  const bend = Math.min(Math.max(y, 1e-3), 20);
  return (120 / (7 * powerOf(Math.PI, 4))) * (integrate(integrand, 0, bend) + integrate(integrand, bend, 60));
}

/*
 * f(y) is tabulated in ln y, once for all cosmologies, each cell when it is first asked for: within 1e-12 of the
 * integral. Below the table f = 1 + 5 y^2/(7 pi^2) + O(y^4 ln y), above it the expansion of the square root for
 * x << y, whose terms are integrals of x^(2k)/(e^x + 1) = (2k)! (1 - 2^-2k) zeta(2k+1).
 */
const LOW = log(1e-3);
const HIGH = log(300);
const CELLS = 128;
const WIDTH = (HIGH - LOW) / CELLS;
const LARGE_Y = [1.803085354739391, 23.33087449072582, 714.667550344438, 40243.162076878].map(
  (integral, k) => (120 / (7 * powerOf(Math.PI, 4))) * integral * [1, 1 / 2, -1 / 8, 1 / 16][k]!,
);
const table = new Float64Array(CELLS * COEFFICIENTS);
const fitted = new Uint8Array(CELLS);

function fitAt(cell: number): void {
  const ratio = (lnY: number) => massiveNeutrinoRatioExact(exp(lnY));
  fitCell(ratio, LOW + cell * WIDTH, WIDTH, table, cell * COEFFICIENTS);
  fitted[cell] = 1;
}

/** massiveNeutrinoRatioExact from a table, at ln y. */
export function massiveNeutrinoRatio(lnY: number): number {
  if (lnY < LOW) return 1 + (5 / (7 * square(Math.PI))) * exp(2 * lnY);
  if (lnY >= HIGH) {
    const y = exp(lnY);
    const q = 1 / (y * y);
    return y * (LARGE_Y[0]! + q * (LARGE_Y[1]! + q * (LARGE_Y[2]! + q * LARGE_Y[3]!)));
  }
  const at = (lnY - LOW) / WIDTH;
  const cell = Math.min(Math.floor(at), CELLS - 1);
  if (fitted[cell] === 0) fitAt(cell);
  return evaluateCell(table, cell * COEFFICIENTS, at - cell);
}

/** Densities in units of the photons' at the same redshift. */
export interface Neutrinos {
  readonly hasMassive: boolean;
  /** Of all massless species. */
  readonly massless: number;
  /** Of all massive species at u = ln(1+z). */
  massive(u: number): number;
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
  const lnYToday = masses.map((mass) => log(mass / neutrinoTemperatureEv(tCmbK)));
  return {
    hasMassive: true,
    massless: perSpecies * (species - masses.length),
    massive: (u) => {
      let sum = 0;
      for (let i = 0; i < lnYToday.length; i++) sum += massiveNeutrinoRatio(lnYToday[i]! - u);
      return perSpecies * sum;
    },
  };
}
