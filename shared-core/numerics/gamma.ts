import { log } from './elementary/elementary.ts';

/** Bernoulli numbers over 2k(2k-1): Stirling's series of ln Gamma. */
const STIRLING = [1 / 12, -1 / 360, 1 / 1260, -1 / 1680, 1 / 1188, -691 / 360360, 1 / 156];
const HALF_LN_2PI = 0.5 * log(2 * Math.PI);

/**
 * ln Gamma(x) for x > 0 by Stirling's series (Abramowitz & Stegun 6.1.40), raised to x >= 8 by the recurrence.
 * Absolute error below 1e-13 max(1, |ln Gamma|).
 */
export function lnGamma(x: number): number {
  let product = 1;
  let y = x;
  while (y < 8) {
    product *= y;
    y += 1;
  }
  const q = 1 / (y * y);
  let series = 0;
  for (let k = STIRLING.length - 1; k >= 0; k--) series = series * q + STIRLING[k]!;
  return (y - 0.5) * log(y) - y + HALF_LN_2PI + series / y - log(product);
}
