import { highWord, upperPart, withHighWord } from './bits.ts';
import { productError } from './exactProduct.ts';
import { INVERSE, LN2_HIGH, LN2_LOW, LOG_HIGH, LOG_LOW, PER_LN2, PER_LN10 } from './tables.ts';

const TWO_54 = 18014398509481984;
const parts = new Float64Array(2);

/** ln x, within 0.6 units in the last place; -infinity at 0, NaN below. */
export function log(x: number): number {
  if (!(x > 0 && x < Infinity)) return outside(x);
  logParts(x, parts);
  return parts[0]!;
}

/** ln(1 + x), within 1 unit in the last place, also where it is small; keeps the sign of zero. */
export function log1p(x: number): number {
  if (!(x > -1 && x < Infinity)) return outside(x + 1);
  if (Math.abs(x) < 5e-17) return x;
  if (x >= -1 / 128 && x < 1 / 64) {
    seriesParts(0, 0, x, 0, parts);
    return parts[0]!;
  }
  const sum = 1 + x;
  const lost = x > 1 ? 1 - (sum - x) : x - (sum - 1);
  logParts(sum, parts);
  return parts[0]! + (parts[1]! + lost / sum);
}

/** Decimal logarithm, within 0.6 units in the last place and exact at powers of ten; -infinity at 0, NaN below. */
export function log10(x: number): number {
  return toBase(x, PER_LN10);
}

/** Binary logarithm, within 0.6 units in the last place and exact at powers of two; -infinity at 0, NaN below. */
export function log2(x: number): number {
  return toBase(x, PER_LN2);
}

function toBase(x: number, perLn: Float64Array): number {
  if (!(x > 0 && x < Infinity)) return outside(x);
  logParts(x, parts);
  const [high, low] = [parts[0]!, parts[1]!];
  const product = high * perLn[0]!;
  return product + (productError(high, perLn[0]!, product) + (low * perLn[0]! + high * perLn[1]!));
}

function outside(x: number): number {
  return x === 0 ? -Infinity : x === Infinity ? x : Number.NaN;
}

/**
 * ln x for a finite x > 0 as two doubles, together to about 2^-63 of the value.
 *
 * x = 2^k m with m in [0.6875, 1.375); ln x = k ln2 + ln c + ln(1 + r), c from a table and r = m/c - 1 within 1/64,
 * where 1/c has 10 bits, so that both products are exact.
 */
export function logParts(x: number, out: Float64Array): void {
  let k = 0;
  let m = x;
  if (m < 2.2250738585072014e-308) {
    m *= TWO_54;
    k = -54;
  }
  const word = highWord(m);
  const offset = word - 0x3fe60000;
  const shift = offset >> 20;
  k += shift;
  m = withHighWord(m, word - (shift << 20));
  const i = (offset >> 14) & 63;
  const upper = upperPart(m);
  const a = upper * INVERSE[i]! - 1;
  const b = (m - upper) * INVERSE[i]!;
  const r = a + b;
  const back = r - a;
  const rLow = a - (r - back) + (b - back);
  seriesParts(k * LN2_HIGH + LOG_HIGH[i]!, k * LN2_LOW + LOG_LOW[i]!, r, rLow, out);
}

/** base + ln(1 + r) as two doubles, for |r| <= 1/64 and |base| > |r| or base = 0. */
function seriesParts(base: number, baseLow: number, r: number, rLow: number, out: Float64Array): void {
  const first = base + r;
  const half = 0.5 * r;
  const square = half * r;
  const second = first - square;
  const rounded = base - first + r + (first - second - square) - productError(half, r, square);
  const cube = r * r * r;
  const even = 1 / 3 + r * r * (1 / 5 + r * r * (1 / 7 + r * r * (1 / 9)));
  const odd = 1 / 4 + r * r * (1 / 6 + r * r * (1 / 8 + r * r * (1 / 10)));
  const low = rounded + (baseLow + rLow * (1 - r)) + cube * (even - r * odd);
  const high = second + low;
  out[0] = high;
  out[1] = second - high + low;
}
