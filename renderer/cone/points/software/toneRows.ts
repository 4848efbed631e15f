import { LIGHT_STEPS, VALUE_STEPS } from '../tone.ts';
import { PAD, strideOf } from './splat.ts';

const FIRST_INDEX = (127 - 10) << 5;

/**
 * Finished pixels of rows from..to (end excluded) out of the sums of several workers, which are added into the first.
 *
 * @param sums pairs (light, light times value) of each worker, with their free border
 * @param table of toneTable
 * @param image width x height words; red, green, blue, alpha bytes in memory order
 */
export function toneRows(
  sums: readonly Float32Array[],
  table: Uint32Array,
  image: Uint32Array,
  width: number,
  from: number,
  to: number,
): void {
  const stride = strideOf(width);
  const first = sums[0]!;
  const bits = new Uint32Array(first.buffer, first.byteOffset, first.length);
  const ground = table[0]!;
  for (let row = from; row < to; row++) {
    const start = 2 * ((row + PAD) * stride + PAD);
    const end = start + 2 * width;
    for (let w = 1; w < sums.length; w++) {
      const more = sums[w]!;
      for (let i = start; i < end; i++) first[i]! += more[i]!;
    }
    let pixel = row * width;
    for (let i = start; i < end; i += 2) {
      const light = first[i]!;
      if (light === 0) image[pixel++] = ground;
      else {
        let step = (bits[i]! >>> 18) - FIRST_INDEX;
        if (step < 0) step = 0;
        else if (step >= LIGHT_STEPS) step = LIGHT_STEPS - 1;
        const value = ((first[i + 1]! / light) * (VALUE_STEPS - 1) + 0.5) | 0;
        image[pixel++] = table[value * LIGHT_STEPS + step]!;
      }
    }
  }
}
