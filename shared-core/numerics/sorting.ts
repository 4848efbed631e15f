import { Refusal } from '../base/refusal.ts';

/**
 * Indices that put `values` in rising order; equal values keep their order (-0 counts as 0). Infinities are allowed.
 * @throws Refusal when a value is NaN
 */
export function argsort(values: Float64Array): Uint32Array {
  const nan = values.findIndex(Number.isNaN);
  if (nan >= 0) throw new Refusal(`Value ${nan} of ${values.length} is not a number; NaN cannot be sorted.`);
  return new Uint32Array(values.length).map((_, i) => i).sort((i, j) => values[i]! - values[j]! || i - j);
}
