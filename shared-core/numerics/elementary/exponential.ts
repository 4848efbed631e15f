import { scaled } from './bits.ts';
import { EXP2_HIGH, EXP2_LOW, STEP_HIGH, STEP_LOW, STEPS_PER_UNIT } from './tables.ts';

/** e^x, within 0.6 units in the last place; 0 below -745.13, infinity above 709.78. */
export function exp(x: number): number {
  return expOfSum(x, 0);
}

/**
 * e^(x + xLow) for |xLow| much below |x|.
 *
 * x = (32 k + j) ln2/32 + r with |r| <= ln2/64: e^x = 2^k 2^(j/32) e^r, the middle factor from a table, the last by its
 * series.
 */
export function expOfSum(x: number, xLow: number): number {
  if (!(x < 710)) return x >= 710 ? Infinity : x;
  if (x < -746) return 0;
  const steps = Math.floor(x * STEPS_PER_UNIT + 0.5);
  const near = x - steps * STEP_HIGH;
  const cut = steps * STEP_LOW;
  const r = near - cut;
  const rLow = near - r - cut + xLow;
  const j = steps & 31;
  const high = EXP2_HIGH[j]!;
  const whole = r + rLow;
  return scaled(high + (EXP2_LOW[j]! + high * (r + (rLow + whole * whole * series(whole)))), steps >> 5);
}

/** e^x - 1, within 1.5 units in the last place, also where it is small; keeps the sign of zero. */
export function expm1(x: number): number {
  if (!(Math.abs(x) >= 5e-17)) return x;
  if (Math.abs(x) < 1 / 32) return x + x * x * longSeries(x);
  if (x > 40) return expOfSum(x, 0);
  if (x < -40) return -1;
  const steps = Math.floor(x * STEPS_PER_UNIT + 0.5);
  const near = x - steps * STEP_HIGH;
  const cut = steps * STEP_LOW;
  const r = near - cut;
  const grown = r + (near - r - cut + r * r * series(r));
  const j = steps & 31;
  const k = steps >> 5;
  const power = scaled(EXP2_HIGH[j]!, k);
  const whole = power - 1;
  const lost = power >= 1 ? power - whole - 1 : power - (whole + 1);
  return whole + (lost + scaled(EXP2_LOW[j]!, k) + power * grown);
}

/** (e^r - 1 - r) / r^2 for |r| <= ln2/64; the first term left out is r^5/5040. */
function series(r: number): number {
  return 1 / 2 + r * (1 / 6 + r * (1 / 24 + r * (1 / 120 + r * (1 / 720))));
}

/** The same for |x| < 1/32; the first term left out is x^8/10!. */
function longSeries(x: number): number {
  return series(x) + x * x * x * x * x * (1 / 5040 + x * (1 / 40320 + x * (1 / 362880)));
}
