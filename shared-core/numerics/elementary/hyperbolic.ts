import { exp } from './exponential.ts';
import { log, log1p } from './logarithm.ts';

/** Hyperbolic sine, within 2 units in the last place; keeps the sign of zero, overflows beyond 710.47. */
export function sinh(x: number): number {
  const size = Math.abs(x);
  if (!(size >= 1e-8)) return x;
  if (size < 1) return x + x * x * x * series(x * x);
  const half = halfExp(size);
  const value = size > 40 ? half : half - 0.25 / half;
  return x < 0 ? -value : value;
}

/** Hyperbolic cosine, within 2 units in the last place; overflows beyond 710.47. */
export function cosh(x: number): number {
  const half = halfExp(Math.abs(x));
  return half + 0.25 / half;
}

/** Inverse hyperbolic sine, within 3 units in the last place; keeps the sign of zero. */
export function asinh(x: number): number {
  const size = Math.abs(x);
  if (!(size >= 1e-8 && size < Infinity)) return x;
  const square = size * size;
  const value = size > 1e10 ? log(size) + Math.LN2 : log1p(size + square / (1 + Math.sqrt(1 + square)));
  return x < 0 ? -value : value;
}

/** e^x / 2 for x >= 0, also where e^x itself would overflow. */
function halfExp(x: number): number {
  if (x < 709) return 0.5 * exp(x);
  const root = exp(0.5 * x);
  return 0.5 * root * root;
}

/** (sinh x - x) / x^3 in z = x^2 <= 1; the first term left out is z^8/19!. */
function series(z: number): number {
  return (
    1 / 6 +
    z *
      (1 / 120 +
        z *
          (1 / 5040 +
            z *
              (1 / 362880 +
                z *
                  (1 / 39916800 +
                    z * (1 / 6227020800 + z * (1 / 1307674368000 + z * (1 / 355687428096000)))))))
  );
}
