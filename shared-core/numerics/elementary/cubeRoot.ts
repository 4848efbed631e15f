import { highWord, upperPart, withHighWord } from './bits.ts';

const TWO_54 = 18014398509481984;
// Two thirds of the exponent bias, less what evens out the error of a straight line through the mantissa.
const THIRD_OF_BIAS = 682 * 1048576 - 34700;

/** Cube root of any double, within 0.7 units in the last place; exact at cubes of 17-bit integers, keeps the sign of zero. */
export function cbrt(x: number): number {
  if (x === 0 || !(Math.abs(x) < Infinity)) return x;
  let size = Math.abs(x);
  let scale = 1;
  if (size < 2.2250738585072014e-308) {
    size *= TWO_54;
    scale = 1 / 262144;
  } else if (size > 1e300) {
    size /= TWO_54;
    scale = 262144;
  }
  // A third of the exponent, mantissa included: within 6 per cent. Halley's steps triple the digits: 2e-4, 1e-11.
  let root = withHighWord(0, Math.floor(highWord(size) / 3) + THIRD_OF_BIAS);
  for (let step = 0; step < 2; step++) {
    const third = root * root * root;
    root *= (third + 2 * size) / (2 * third + size);
  }
  // The last step is taken from 21 bits, whose square is exact, so that only the small correction is rounded.
  root = upperPart(root);
  const quotient = size / (root * root);
  root += (root * (quotient - root)) / (2 * root + quotient);
  return (x < 0 ? -root : root) * scale;
}
