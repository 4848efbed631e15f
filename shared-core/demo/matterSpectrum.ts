import { cube, exp, log, pow, powerOf, square } from '../numerics/elementary/elementary.ts';

/** Shape of the cold dark matter spectrum used for the invented universe: Gamma = Omega_m h, in h/Mpc, and tilt. */
const GAMMA_PER_MPC = 0.19 * 0.7;
const TILT = 0.965;

/**
 * Linear matter power at k (per Mpc, above 0), without normalisation.
 *
 * k^n T(k)^2 with the transfer function of Bardeen, Bond, Kaiser & Szalay 1986, ApJ 304, 15, eq. G3 (no baryons):
 * the right slopes on every scale, which is all that a drawn universe needs.
 */
export function matterPowerShape(kPerMpc: number): number {
  const q = kPerMpc / GAMMA_PER_MPC;
  const polynomial = 1 + 3.89 * q + square(16.1 * q) + cube(5.46 * q) + powerOf(6.71 * q, 4);
  const transfer = log(1 + 2.34 * q) / (2.34 * q) / Math.sqrt(Math.sqrt(polynomial));
  return pow(kPerMpc, TILT) * transfer * transfer;
}

/** Variance of the shape smoothed by a Gaussian of this radius: (1 / 2 pi^2) integral of k^2 P exp(-k^2 R^2) dk. */
export function smoothedVariance(radiusMpc: number): number {
  const steps = 2000;
  const from = log(1e-4);
  const width = (log(10) - from) / steps;
  let sum = 0;
  for (let i = 0; i < steps; i++) {
    const k = exp(from + (i + 0.5) * width);
    sum += cube(k) * matterPowerShape(k) * exp(-square(k * radiusMpc)) * width;
  }
  return sum / (2 * square(Math.PI));
}
