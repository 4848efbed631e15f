import type { Cosmology } from '../cosmology/cosmology.ts';
import { exp, log } from '../numerics/elementary/elementary.ts';

/*
 * Luminosities follow Schechter 1976, ApJ 203, 297, with faint-end slope -1: dN = exp(-x) dx / x, x = L / L*.
 * A depth limit then gives a number density that falls with redshift, and a deeper field one that falls later.
 */

/** Absolute magnitude of an L* galaxy at redshift 0, and its brightening per unit of redshift (invented). */
const CHARACTERISTIC_MAG = -22.6;
const BRIGHTENING_MAG = 0.6;

/** Quantiles kept of a distribution of magnitudes, and steps of ln x that they are found in. */
const QUANTILES = 256;
const STEPS = 512;
/** Beyond this luminosity, in units of L*, there is nothing left: exp(-30). */
const LN_MOST = log(30);

/** Apparent magnitude of an L* galaxy at this redshift, the k-correction being part of the brightening. */
export function characteristicMag(cosmology: Cosmology, z: number): number {
  return CHARACTERISTIC_MAG - BRIGHTENING_MAG * z + cosmology.distanceModulus(z);
}

/** Galaxies above a depth limit at many distances. */
export interface Brightness {
  /** Galaxies per unit volume, up to a constant, for each characteristic magnitude given. */
  readonly count: Float64Array;
  /** Apparent magnitude below which the share u (0 <= u < 1) lies, between entries i and i + 1. */
  magnitude(i: number, t: number, u: number): number;
}

/**
 * Tabulates the luminosity function above a limit. The count is E1(x) of the least luminosity x (Abramowitz & Stegun
 * 5.1.1), within 2e-4 of it for x from 0.01 to 5.
 *
 * @param characteristic apparent magnitudes of an L* galaxy, one for each distance
 */
export function brightnessAbove(limitMag: number, characteristic: Float64Array): Brightness {
  const knots = characteristic.length;
  const count = new Float64Array(knots);
  const width = QUANTILES + 1;
  const table = new Float64Array(knots * width);
  const cumulative = new Float64Array(STEPS + 1);
  for (let i = 0; i < knots; i++) {
    const lnLeast = (Math.LN10 / 2.5) * (characteristic[i]! - limitMag);
    const step = Math.max(0, LN_MOST - lnLeast) / STEPS;
    // From the brightest to the limit: dN = exp(-e^s) ds with s = ln x.
    let before = exp(-exp(LN_MOST));
    for (let k = 1; k <= STEPS; k++) {
      const now = exp(-exp(LN_MOST - k * step));
      cumulative[k] = cumulative[k - 1]! + ((before + now) / 2) * step;
      before = now;
    }
    const total = cumulative[STEPS]!;
    count[i] = total;
    for (let j = 0, k = 0; j <= QUANTILES; j++) {
      // The first entry stands for a quarter of the first share, so that no straight line leads to infinity.
      const wanted = (total * Math.max(0.25, j)) / QUANTILES;
      while (k < STEPS - 1 && cumulative[k + 1]! < wanted) k++;
      const rise = cumulative[k + 1]! - cumulative[k]!;
      const lnX = LN_MOST - (k + (rise > 0 ? (wanted - cumulative[k]!) / rise : 0)) * step;
      table[i * width + j] = characteristic[i]! - (2.5 / Math.LN10) * lnX;
    }
  }
  return {
    count,
    magnitude(i, t, u) {
      const at = u * QUANTILES;
      const j = Math.floor(at);
      const f = at - j;
      const k = i * width + j;
      const near = table[k]! + f * (table[k + 1]! - table[k]!);
      const far = table[k + width]! + f * (table[k + width + 1]! - table[k + width]!);
      return near + t * (far - near);
    },
  };
}
