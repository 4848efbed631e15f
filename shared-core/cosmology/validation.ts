import { Refusal } from '../base/refusal.ts';
import { roundTo } from '../base/roundTo.ts';
import { expm1, log1p } from '../numerics/elementary/elementary.ts';
import { findRoot } from '../numerics/roots.ts';
import { createExpansion, type Expansion } from './expansion.ts';
import type { CosmologyParameters } from './parameters.ts';
import { MAX_REDSHIFT } from './redshiftRange.ts';

type NumberName = 'h0KmSMpc' | 'omegaM0' | 'omegaDe0' | 'w0' | 'wa' | 'tCmbK' | 'nEff';

/** Generous bounds: they catch slips of unit, not unusual physics. */
const ALLOWED: Readonly<Record<NumberName, readonly [min: number, max: number, meaning: string]>> = {
  h0KmSMpc: [1, 1000, 'km/s/Mpc, not h'],
  omegaM0: [0, 100, 'baryons plus cold dark matter in units of the critical density'],
  omegaDe0: [-100, 100, "in units of the critical density, or 'flat'"],
  w0: [-10, 10, 'pressure over density today'],
  wa: [-10, 10, 'change of w with the scale factor'],
  tCmbK: [0, 100, 'kelvin; 0 leaves out radiation and neutrinos'],
  nEff: [0, 100, 'number of neutrino species'],
};
const MAX_MASS_EV = 100;

/**
 * H must stay above a thousandth of H0: at 0 the past has no big bang but a turning point, and just above it the
 * universe all but stands still and its times grow without bound.
 */
const LEAST_E_SQUARED = 1e-6;

/**
 * Refuses parameters that make no universe.
 *
 * @throws Refusal ('use') whose sentence names the parameter, what came and what is allowed: a value that is not
 * finite or out of its bounds, more neutrino masses than species, or an H^2 that does not stay above 0 from today
 * back to z = 1e9 (no big bang)
 */
export function validateCosmology(parameters: CosmologyParameters): void {
  validateValues(parameters);
  const turn = findTurn(parameters);
  if (turn !== null) refuse(noBigBang(parameters, turn));
}

/** The part of validateCosmology that looks at each value alone. @throws Refusal likewise */
export function validateValues(parameters: CosmologyParameters): void {
  for (const name of Object.keys(ALLOWED) as NumberName[]) {
    const value = parameters[name];
    if (name === 'omegaDe0' && value === 'flat') continue;
    const [min, max, meaning] = ALLOWED[name];
    if (typeof value !== 'number' || !(value >= min && value <= max)) {
      refuse(`${name} is ${value}; allowed is a number from ${min} to ${max} (${meaning}).`);
    }
  }
  validateMasses(parameters);
}

function refuse(sentence: string): never {
  throw new Refusal(sentence, 'use');
}

function validateMasses({ neutrinoMassesEv, nEff, tCmbK }: CosmologyParameters): void {
  for (const mass of neutrinoMassesEv) {
    if (!(mass >= 0 && mass <= MAX_MASS_EV)) {
      refuse(`neutrinoMassesEv contains ${mass}; allowed are masses from 0 to ${MAX_MASS_EV} eV.`);
    }
  }
  const species = Math.floor(nEff);
  const anyMassive = neutrinoMassesEv.some((mass) => mass > 0);
  if (tCmbK > 0 && anyMassive && neutrinoMassesEv.length > species) {
    refuse(
      `neutrinoMassesEv lists ${neutrinoMassesEv.length} masses; allowed are at most ${species}, the whole part of nEff ${nEff}.`,
    );
  }
}

/** The redshift at which H^2 falls too low, or null. */
function findTurn(parameters: CosmologyParameters): number | null {
  const expansion = createExpansion(parameters);
  const { omegaM0, omegaGamma0, omegaK0, omegaDe0, early } = expansion;
  const never = early.coefficient > 0 ? null : MAX_REDSHIFT;
  // Where no term of E^2 is negative, it is never less than what grows with (1+z) is today.
  if (omegaK0 >= 0 && omegaDe0 >= 0 && omegaM0 + omegaGamma0 + omegaK0 > LEAST_E_SQUARED) return never;
  const end = log1p(MAX_REDSHIFT);
  const steps = 2000;
  const step = end / steps;
  let before = Number.POSITIVE_INFINITY;
  let here = expansion.eSquared(0);
  for (let i = 0; i <= steps; i++) {
    const u = i * step;
    const after = i < steps ? expansion.eSquared(u + step) : Number.POSITIVE_INFINITY;
    if (!(here > LEAST_E_SQUARED)) return expm1(u);
    if (here < before && here <= after) {
      const lowest = descend(expansion, Math.max(0, u - step), Math.min(end, u + step));
      if (!(expansion.eSquared(lowest) > LEAST_E_SQUARED)) return expm1(lowest);
    }
    before = here;
    here = after;
  }
  return never;
}

/** Where E^2 is least in [low, high]: golden section (Kiefer 1953), to 1e-9 in ln(1+z). */
function descend(expansion: Expansion, low: number, high: number): number {
  const golden = (Math.sqrt(5) - 1) / 2;
  let left = low;
  let right = high;
  while (right - left > 1e-9) {
    const a = right - golden * (right - left);
    const b = left + golden * (right - left);
    if (expansion.eSquared(a) < expansion.eSquared(b)) right = b;
    else left = a;
  }
  return (left + right) / 2;
}

/** Finds the parameter to blame: the first whose neutral value cures the fault, and how far it may go. */
function noBigBang(parameters: CosmologyParameters, turn: number): string {
  const neutral = { omegaDe0: 0, wa: 0, w0: -1 } as const;
  const came = `H^2 falls to 0 or nearly so at z = ${roundTo(turn, 4)}, so there is no big bang`;
  for (const name of ['omegaDe0', 'wa', 'w0'] as const) {
    const value = parameters[name];
    if (value === 'flat' || value === neutral[name]) continue;
    const fits = (share: number) =>
      findTurn({ ...parameters, [name]: neutral[name] + share * (value - neutral[name]) }) === null;
    if (!fits(0)) continue;
    const share = findRoot((at) => (fits(at) ? 1 : -1), 0, 1, 1e-6);
    const limit = (neutral[name] + share * (value - neutral[name])).toFixed(4);
    return `${name} is ${value} and ${came}; allowed with the other parameters is ${name} ${value > neutral[name] ? 'below' : 'above'} ${Number(limit)}.`;
  }
  return `omegaM0 is ${parameters.omegaM0} with omegaDe0 ${parameters.omegaDe0}, w0 ${parameters.w0} and wa ${parameters.wa}, and ${came}; allowed are densities with H^2 above 0 at every redshift.`;
}
