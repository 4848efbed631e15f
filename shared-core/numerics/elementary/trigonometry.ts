import { quarterTurns } from './quarterTurns.ts';
import { COSINE, SINE } from './tables.ts';

const rest = new Float64Array(2);
const QUARTER_PI = 0.785398163397448;

/** Sine of an angle in radians, within 0.8 units in the last place for every finite double; NaN at infinity. */
export function sin(x: number): number {
  if (Math.abs(x) < QUARTER_PI) return Math.abs(x) < 1e-8 ? x : sineOf(x, 0);
  if (!(Math.abs(x) < Infinity)) return Number.NaN;
  const n = quarterTurns(x, rest);
  const size = (n & 1) === 0 ? sineOf(rest[0]!, rest[1]!) : cosineOf(rest[0]!, rest[1]!);
  return n < 2 ? size : -size;
}

/** Cosine of an angle in radians, within 0.8 units in the last place for every finite double; NaN at infinity. */
export function cos(x: number): number {
  if (Math.abs(x) < QUARTER_PI) return cosineOf(x, 0);
  if (!(Math.abs(x) < Infinity)) return Number.NaN;
  const n = quarterTurns(x, rest);
  const size = (n & 1) === 0 ? cosineOf(rest[0]!, rest[1]!) : sineOf(rest[0]!, rest[1]!);
  return n === 1 || n === 2 ? -size : size;
}

/** Tangent of an angle in radians, within 2 units in the last place for every finite double; NaN at infinity. */
export function tan(x: number): number {
  if (Math.abs(x) < 1e-8) return x;
  if (!(Math.abs(x) < Infinity)) return Number.NaN;
  const n = quarterTurns(x, rest);
  const sine = sineOf(rest[0]!, rest[1]!);
  const cosine = cosineOf(rest[0]!, rest[1]!);
  return (n & 1) === 0 ? sine / cosine : -cosine / sine;
}

/** sin(y + yLow) for |y| <= pi/4. */
function sineOf(y: number, yLow: number): number {
  const z = y * y;
  const tail = SINE[1]! + z * (SINE[2]! + z * (SINE[3]! + z * (SINE[4]! + z * SINE[5]!)));
  return y + (yLow * (1 - 0.5 * z) + y * z * (SINE[0]! + z * tail));
}

/** cos(y + yLow) for |y| <= pi/4. */
function cosineOf(y: number, yLow: number): number {
  const z = y * y;
  const half = 0.5 * z;
  const most = 1 - half;
  const tail =
    COSINE[0]! + z * (COSINE[1]! + z * (COSINE[2]! + z * (COSINE[3]! + z * (COSINE[4]! + z * COSINE[5]!))));
  return most + (1 - most - half + (z * z * tail - y * yLow));
}
