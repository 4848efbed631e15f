import { productError } from './exactProduct.ts';
import { expOfSum } from './exponential.ts';
import { logParts } from './logarithm.ts';

/** x^2, rounded once. */
export function square(x: number): number {
  return x * x;
}

/** x^3 as x x x. */
export function cube(x: number): number {
  return x * x * x;
}

/**
 * x^n for an integer |n| < 2^31 by repeated squaring, a negative power as 1 / x^|n|; exact for a power of two within
 * the normal range, else about |n| rounding errors at the worst.
 */
export function powerOf(x: number, n: number): number {
  let result = 1;
  let factor = x;
  for (let left = Math.abs(n); left > 0; left >>>= 1) {
    if ((left & 1) === 1) result *= factor;
    if (left > 1) factor *= factor;
  }
  return n < 0 ? 1 / result : result;
}

const parts = new Float64Array(2);

/** x^y for real y, within 1 unit in the last place; its special cases are those of ECMAScript's Number::exponentiate. */
export function pow(x: number, y: number): number {
  if (y === 0) return 1;
  if (Number.isNaN(x) || Number.isNaN(y)) return Number.NaN;
  const size = Math.abs(x);
  if (Math.abs(y) === Infinity) return size === 1 ? Number.NaN : size > 1 === y > 0 ? Infinity : 0;
  const isOdd = Math.abs(y) < 9007199254740992 && Math.abs(y % 2) === 1;
  const isNegative = isOdd && (x < 0 || Object.is(x, -0));
  if (size === 0 || size === Infinity) {
    const end = (size === 0) === y > 0 ? 0 : Infinity;
    return isNegative ? -end : end;
  }
  if (x < 0 && y !== Math.floor(y)) return Number.NaN;
  if (y === 1) return x;
  const result = size === 1 ? 1 : ofPositive(size, y);
  return isNegative ? -result : result;
}

function ofPositive(x: number, y: number): number {
  // The logarithm of a double that is not 1 is at least 1.1e-16: beyond this exponent nothing is left between 0 and infinity.
  if (Math.abs(y) > 1e20) return x > 1 === y > 0 ? Infinity : 0;
  logParts(x, parts);
  const high = parts[0]!;
  const product = high * y;
  if (Math.abs(product) < 1e-290) return 1;
  return expOfSum(product, productError(high, y, product) + parts[1]! * y);
}
