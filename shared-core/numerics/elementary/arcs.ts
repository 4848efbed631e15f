import { productError } from './exactProduct.ts';
import { ATAN_HIGH, ATAN_LOW, HALF_PI } from './tables.ts';

const angle = new Float64Array(2);

/** Angle of the point (x, y) in radians, -pi to pi, within 1 unit in the last place; signed zeros as in ECMAScript. */
export function atan2(y: number, x: number): number {
  if (Number.isNaN(y) || Number.isNaN(x)) return Number.NaN;
  const isLeft = x < 0 || Object.is(x, -0);
  let size: number;
  if (y === 0) size = isLeft ? 2 * HALF_PI[0]! : 0;
  else if (x === 0) size = HALF_PI[0]!;
  else {
    const [right, up] = [Math.abs(x), Math.abs(y)];
    if (right === Infinity && up === Infinity) angleOf(1, 0, 1, 0, angle);
    else angleOf(up, 0, right, 0, angle);
    size = isLeft ? fromStraight(angle) : angle[0]!;
  }
  return y < 0 || Object.is(y, -0) ? -size : size;
}

/** Arc sine in radians, -pi/2 to pi/2, within 1 unit in the last place; NaN beyond -1 and 1, keeps the sign of zero. */
export function asin(x: number): number {
  const size = Math.abs(x);
  if (!(size <= 1)) return Number.NaN;
  if (size < 1e-8) return x;
  across(size);
  angleOf(size, 0, leg[0]!, leg[1]!, angle);
  return x < 0 ? -angle[0]! : angle[0]!;
}

/** Arc cosine in radians, 0 to pi, within 1 unit in the last place; NaN beyond -1 and 1. */
export function acos(x: number): number {
  const size = Math.abs(x);
  if (!(size <= 1)) return Number.NaN;
  across(size);
  angleOf(leg[0]!, leg[1]!, size, 0, angle);
  return x < 0 ? fromStraight(angle) : angle[0]!;
}

function fromStraight(a: Float64Array): number {
  const straight = 2 * HALF_PI[0]!;
  const high = straight - a[0]!;
  return high + (straight - high - a[0]! + (2 * HALF_PI[1]! - a[1]!));
}

const leg = new Float64Array(2);

/** sqrt(1 - x^2) for 0 <= x <= 1 as two doubles. */
function across(x: number): void {
  const minus = 1 - x;
  const plus = 1 + x;
  const square = minus * plus;
  const squareLow = productError(minus, plus, square) + (1 - minus - x) * plus + minus * (1 - plus + x);
  const root = Math.sqrt(square);
  const back = root * root;
  leg[0] = root;
  leg[1] = root > 0 ? (square - back - productError(root, root, back) + squareLow) / (2 * root) : 0;
}

/** Angle of a point of the first quadrant as two doubles: out = atan((y + yLow) / (x + xLow)); not both zero. */
function angleOf(y: number, yLow: number, x: number, xLow: number, out: Float64Array): void {
  const isSteep = y > x;
  if (isSteep) arcOf(x, xLow, y, yLow, out);
  else arcOf(y, yLow, x, xLow, out);
  let [high, low] = [out[0]!, out[1]!];
  if (isSteep) {
    const rest = HALF_PI[0]! - high;
    low = HALF_PI[0]! - rest - high + (HALF_PI[1]! - low);
    high = rest;
  }
  const sum = high + low;
  out[0] = sum;
  out[1] = high - sum + low;
}

/**
 * atan of a ratio between 0 and 1 as two doubles: atan q = atan c + atan((q - c) / (1 + c q)), c the nearest sixteenth
 * with its arc from a table, the rest by its series.
 */
function arcOf(short: number, shortLow: number, long: number, longLow: number, out: Float64Array): void {
  const q = short / long;
  let qLow = 0;
  if (long < 1e150 && long > 1e-120 && q > 1e-100) {
    const back = q * long;
    qLow = (short - back - productError(q, long, back) + (shortLow - q * longLow)) / long;
  }
  const i = Math.floor(q * 16 + 0.5);
  if (i < 2) {
    out[0] = q;
    out[1] = qLow + series(q);
    return;
  }
  const c = i / 16;
  const r = (q - c + qLow) / (1 + c * q);
  out[0] = ATAN_HIGH[i]!;
  out[1] = ATAN_LOW[i]! + (r + series(r));
}

/** atan r - r for |r| < 3/32; the first term left out is r^17/17. */
function series(r: number): number {
  const z = r * r;
  return (
    r * z * (-1 / 3 + z * (1 / 5 + z * (-1 / 7 + z * (1 / 9 + z * (-1 / 11 + z * (1 / 13 + z * (-1 / 15)))))))
  );
}
