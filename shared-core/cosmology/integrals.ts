import { exp, log } from '../numerics/elementary/elementary.ts';
import { integrate } from '../numerics/quadrature.ts';
import type { Expansion } from './expansion.ts';

/** Integrals over the expansion, in units of the Hubble distance or time; u = ln(1+z). */
export interface ExpansionIntegrals {
  readonly comovingIntegrand: (u: number) => number;
  readonly timeIntegrand: (u: number) => number;
  /** Of dz/E from u to u + width: comoving distance. The width stands apart so that a thin shell keeps its digits. */
  comoving(u: number, width: number): number;
  /** Of dz/((1+z)E), likewise: time. */
  time(u: number, width: number): number;
  /** From u to the beginning; Infinity where the past has no end. */
  timeToBeginning(u: number): number;
  comovingToBeginning(u: number): number;
}

const PANEL = 4;
/** The tail's possible error as a share of the integral. */
const TAIL_ERROR = 1e-16;

export function createIntegrals(expansion: Expansion): ExpansionIntegrals {
  const { eSquared, early } = expansion;
  const timeIntegrand = (u: number) => 1 / Math.sqrt(eSquared(u));
  const comovingIntegrand = (u: number) => exp(u) / Math.sqrt(eSquared(u));

  /*
   * The integrand tends to exp(-decay u). The rest beyond u is f(u)/decay (1 + small), where small is how far the
   * integrand still is from its power law: stop when tail times that is below rounding.
   */
  const toBeginning = (f: (u: number) => number, decay: number, from: number) => {
    if (!(decay > 0)) return Number.POSITIVE_INFINITY;
    let sum = 0;
    let u = from;
    for (;;) {
      const tail = f(u) / decay;
      const departure = Math.abs(log(eSquared(u) / early.coefficient) - early.power * u);
      if (tail * Math.min(1, departure) <= TAIL_ERROR * (sum + tail) || tail === 0) return sum + tail;
      sum += integrate(f, u, u + PANEL);
      u += PANEL;
    }
  };

  return {
    comovingIntegrand,
    timeIntegrand,
    comoving: (u, width) => integrate((v) => comovingIntegrand(u + v), 0, width),
    time: (u, width) => integrate((v) => timeIntegrand(u + v), 0, width),
    timeToBeginning: (u) => toBeginning(timeIntegrand, early.power / 2, u),
    comovingToBeginning: (u) => toBeginning(comovingIntegrand, early.power / 2 - 1, u),
  };
}
