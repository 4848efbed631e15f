import { cube, exp, expm1, powerOf, square } from '../numerics/elementary/elementary.ts';
import { GRAVITATION_SI, KM_PER_MPC, SPEED_OF_LIGHT_KM_S, STEFAN_BOLTZMANN_SI } from './constants.ts';
import { createNeutrinos, NEUTRINO_TO_PHOTON } from './neutrinos.ts';
import type { CosmologyParameters } from './parameters.ts';

/** The expansion law of one universe: its densities today and E(z) = H(z)/H0. */
export interface Expansion {
  readonly omegaM0: number;
  readonly omegaGamma0: number;
  readonly omegaNu0: number;
  readonly omegaDe0: number;
  readonly omegaK0: number;
  /** E squared at u = ln(1+z). Not above 0 where the universe would have turned round. */
  eSquared(u: number): number;
  /** As (1+z) grows E squared tends to coefficient (1+z)^power. */
  readonly early: { readonly power: number; readonly coefficient: number };
}

/** Photons today, in units of the critical density: (4 sigma T^4 / c^3) / (3 H0^2 / 8 pi G). */
function photonDensity(tCmbK: number, h0KmSMpc: number): number {
  const c = SPEED_OF_LIGHT_KM_S * 1000;
  const hubblePerS = h0KmSMpc / KM_PER_MPC;
  const critical = (3 * square(hubblePerS)) / (8 * Math.PI * GRAVITATION_SI);
  return (4 * STEFAN_BOLTZMANN_SI * powerOf(tCmbK, 4)) / cube(c) / critical;
}

/** What the massive neutrinos weigh today, in units of the critical density. */
export function omegaMassiveNeutrinos(parameters: CosmologyParameters): number {
  const neutrinos = createNeutrinos(parameters);
  if (!neutrinos.hasMassive) return 0;
  return photonDensity(parameters.tCmbK, parameters.h0KmSMpc) * neutrinos.massive(0);
}

/**
 * E^2 = Om (1+z)^3 + Ok (1+z)^2 + Og (1+z)^4 [1 + neutrinos] + Ode (1+z)^(3(1+w0+wa)) exp(-3 wa z/(1+z))
 * (Chevallier & Polarski 2001; Linder 2003 for the dark energy).
 * Neutrinos: see createNeutrinos.
 */
export function createExpansion(parameters: CosmologyParameters): Expansion {
  const { omegaM0, w0, wa, tCmbK, nEff } = parameters;
  const omegaGamma0 = photonDensity(tCmbK, parameters.h0KmSMpc);
  const neutrinos = createNeutrinos(parameters);
  const radiation = omegaGamma0 * (1 + neutrinos.massless);
  const hasMassive = omegaGamma0 > 0 && neutrinos.hasMassive;
  const omegaNu0 = omegaGamma0 * (neutrinos.massless + (hasMassive ? neutrinos.massive(0) : 0));

  const rest = omegaM0 + omegaGamma0 + omegaNu0;
  const omegaDe0 = parameters.omegaDe0 === 'flat' ? 1 - rest : parameters.omegaDe0;
  const omegaK0 = parameters.omegaDe0 === 'flat' ? 0 : unlessRounding(1 - rest - omegaDe0);

  const isConstant = (w0 === -1 && wa === 0) || omegaDe0 === 0;
  const darkPower = 3 * (1 + w0 + wa);
  const eSquared = (u: number) => {
    const x = exp(u);
    const relativistic = hasMassive ? radiation + omegaGamma0 * neutrinos.massive(u) : radiation;
    const dark = isConstant ? omegaDe0 : omegaDe0 * exp(darkPower * u + 3 * wa * expm1(-u));
    return x * x * (x * (omegaM0 + x * relativistic) + omegaK0) + dark;
  };

  return {
    omegaM0,
    omegaGamma0,
    omegaNu0,
    omegaDe0,
    omegaK0,
    eSquared,
    early: earlyLaw([
      [4, omegaGamma0 * (1 + NEUTRINO_TO_PHOTON * nEff)],
      [3, omegaM0],
      [2, omegaK0],
      isConstant ? [0, omegaDe0] : [darkPower, omegaDe0 * exp(-3 * wa)],
    ]),
  };
}

/** Densities that miss the sum of 1 by the rounding of their addition make a flat universe. */
function unlessRounding(omegaK0: number): number {
  return Math.abs(omegaK0) <= 4 * Number.EPSILON ? 0 : omegaK0;
}

function earlyLaw(terms: readonly (readonly [power: number, coefficient: number])[]) {
  let power = Number.NEGATIVE_INFINITY;
  let coefficient = 0;
  for (const [termPower, termCoefficient] of terms) {
    if (termCoefficient === 0) continue;
    if (termPower > power) {
      power = termPower;
      coefficient = termCoefficient;
    } else if (termPower === power) coefficient += termCoefficient;
  }
  return { power, coefficient };
}
