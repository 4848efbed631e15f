import { highWord, powerOfTwo } from './bits.ts';
import { HALF_PI_256, QUARTER_TURN, TWO_OVER_PI } from './tables.ts';

/**
 * Takes whole quarter turns from a finite angle x (radians): x = n pi/2 + out[0] + out[1], within pi/4; returns n modulo
 * 4. Relative precision of the rest about 2^-61 for every double.
 */
export function quarterTurns(x: number, out: Float64Array): number {
  if (Math.abs(x) < 1e6) {
    const n = Math.floor(x * 0.6366197723675814 + 0.5);
    const near = x - n * QUARTER_TURN[0]!;
    const middle = n * QUARTER_TURN[1]!;
    const rest = near - middle;
    const back = near - rest;
    const rounded = near - (rest + back) - (middle - back);
    const last = n * QUARTER_TURN[2]! - rounded;
    const high = rest - last;
    // Nearer to a whole quarter turn the three parts of pi/2 would no longer do.
    if (Math.abs(high) > 1e-6 || n === 0) {
      out[0] = high;
      out[1] = rest - high - last;
      return n & 3;
    }
  }
  return exactTurns(x, out);
}

/** The same in whole numbers, with as many digits of 2/pi as the largest double needs; takes about a microsecond. */
function exactTurns(x: number, out: Float64Array): number {
  const size = Math.abs(x);
  const exponent = (highWord(size) >>> 20) - 1075;
  const mantissa = BigInt(exponent < 0 ? size * powerOfTwo(-exponent) : size / powerOfTwo(exponent));
  const turns = mantissa * TWO_OVER_PI;
  const shift = BigInt(1216 - exponent);
  const n = (turns + (1n << (shift - 1n))) >> shift;
  const rest = ((turns - (n << shift)) * HALF_PI_256) >> (shift - 44n);
  const high = Number(rest);
  const sign = x < 0 ? -1 : 1;
  const unit = sign * powerOfTwo(-300);
  out[0] = high * unit;
  out[1] = Number(rest - BigInt(high)) * unit;
  return Number(BigInt.asUintN(2, x < 0 ? -n : n));
}
