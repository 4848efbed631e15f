import { LIGHT_STEPS, VALUE_STEPS } from '../tone.ts';
import { PAD, strideOf } from './splat.ts';

const f = Math.fround;

export const FIRST_INDEX = (127 - 10) << 5;

/**
 * Finished pixels of rows from..to (end excluded) out of the sums of several workers. The sums of these rows are zero
 * afterwards, ready for the next picture: a row is cleared while it is still near the processor. The reference for the
 * WASM kernel, which gives the same pixels.
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
  image.fill(table[0]!, from * width, to * width);
  for (let row = from; row < to; row++) {
    const start = 2 * ((row + PAD) * stride + PAD);
    const end = start + 2 * width;
    for (let w = 1; w < sums.length; w++) {
      const more = sums[w]!;
      for (let i = start; i < end; i++) first[i]! += more[i]!;
      more.fill(0, start, end);
    }
    let pixel = row * width;
    for (let i = start; i < end; i += 2, pixel++) {
      const lightBits = bits[i]!;
      if (lightBits === 0) continue;
      let step = (lightBits >>> 18) - FIRST_INDEX;
      if (step < 0) step = 0;
      else if (step >= LIGHT_STEPS) step = LIGHT_STEPS - 1;
      const value = f(f(f(first[i + 1]! / first[i]!) * (VALUE_STEPS - 1)) + 0.5) | 0;
      image[pixel] = table[value * LIGHT_STEPS + step]!;
    }
    first.fill(0, start, end);
  }
}
