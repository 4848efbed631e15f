import { Refusal } from '../base/refusal.ts';

/** Below this length a comparison sort is quicker. */
const SHORT = 256;
/** Runs of one key up to this length are finished by insertion. */
const SHORT_RUN = 48;
const DIGIT = 2048;

/**
 * Indices that put `values` in rising order. Stable: equal values (-0 equals 0) keep their order. Infinities are
 * allowed. Three passes of radix sort on a 32-bit key, then the few rows of one key by value.
 *
 * @param values up to 2^32 - 1 numbers; not changed
 * @throws Refusal when a value is NaN
 */
export function argsort(values: Float64Array): Uint32Array<ArrayBuffer> {
  const count = values.length;
  const identity = new Uint32Array(count);
  let min = Number.POSITIVE_INFINITY;
  let max = Number.NEGATIVE_INFINITY;
  let sorted = true;
  let previous = Number.NEGATIVE_INFINITY;
  for (let i = 0; i < count; i++) {
    const value = values[i]!;
    if (Number.isNaN(value)) {
      throw new Refusal(
        `Value ${i + 1} of ${count} is not a number and has no place in an order; leave it out.`,
      );
    }
    if (value < min) min = value;
    if (value > max) max = value;
    if (value < previous) sorted = false;
    previous = value;
    identity[i] = i;
  }
  if (sorted) return identity;
  if (count < SHORT) return byComparison(values, identity);
  const keys = rangeKeys(values, min, max);
  return keys === null ? byComparison(values, identity) : byKeys(values, keys, identity);
}

function byComparison(values: Float64Array, order: Uint32Array<ArrayBuffer>): Uint32Array<ArrayBuffer> {
  return order.sort((i, j) => {
    const a = values[i]!;
    const b = values[j]!;
    return a < b ? -1 : a > b ? 1 : i - j;
  });
}

/** Keys that rise with the values and differ between the least and the greatest; null if the range is denormal. */
function rangeKeys(values: Float64Array, min: number, max: number): Uint32Array<ArrayBuffer> | null {
  const keys = new Uint32Array(values.length);
  if (!Number.isFinite(max - min)) {
    // The upper half of the bits, flipped so that it rises with the number
    const view = new DataView(values.buffer, values.byteOffset, values.byteLength);
    for (let i = 0; i < keys.length; i++) {
      const bits = values[i] === 0 ? 0 : view.getInt32(8 * i + 4, true);
      keys[i] = bits < 0 ? ~bits : bits ^ 0x80000000;
    }
    return keys;
  }
  const scale = 0xffffffff / (max - min);
  if (!Number.isFinite(scale)) return null;
  for (let i = 0; i < keys.length; i++) keys[i] = (values[i]! - min) * scale;
  return keys;
}

function byKeys(
  values: Float64Array,
  keys: Uint32Array<ArrayBuffer>,
  order: Uint32Array<ArrayBuffer>,
): Uint32Array<ArrayBuffer> {
  const count = keys.length;
  let fromKeys = keys;
  let fromOrder = order;
  let toKeys = new Uint32Array(count);
  let toOrder = new Uint32Array(count);
  for (const shift of [0, 11, 22]) {
    const places = new Uint32Array(DIGIT);
    for (let i = 0; i < count; i++) places[(fromKeys[i]! >>> shift) & (DIGIT - 1)]!++;
    let before = 0;
    for (let d = 0; d < DIGIT; d++) {
      const here = places[d]!;
      places[d] = before;
      before += here;
    }
    for (let i = 0; i < count; i++) {
      const key = fromKeys[i]!;
      const place = places[(key >>> shift) & (DIGIT - 1)]!++;
      toKeys[place] = key;
      toOrder[place] = fromOrder[i]!;
    }
    [fromKeys, toKeys] = [toKeys, fromKeys];
    [fromOrder, toOrder] = [toOrder, fromOrder];
  }
  finishRuns(values, fromKeys, fromOrder);
  return fromOrder;
}

/** Rows that share a key stand in their first order: put them in order of value. */
function finishRuns(values: Float64Array, keys: Uint32Array, order: Uint32Array): void {
  const count = keys.length;
  let start = 0;
  while (start < count) {
    const key = keys[start]!;
    let end = start + 1;
    while (end < count && keys[end] === key) end++;
    if (end - start > SHORT_RUN) sortClump(values, order, start, end);
    else if (end - start > 1) sortByInsertion(values, order, start, end);
    start = end;
  }
}

function sortByInsertion(values: Float64Array, order: Uint32Array, start: number, end: number): void {
  for (let i = start + 1; i < end; i++) {
    const row = order[i]!;
    const value = values[row]!;
    let j = i - 1;
    while (j >= start && values[order[j]!]! > value) {
      order[j + 1] = order[j]!;
      j--;
    }
    order[j + 1] = row;
  }
}

/** Many rows of one key, equal more often than not; otherwise their own range gives finer keys. */
function sortClump(values: Float64Array, order: Uint32Array, start: number, end: number): void {
  const run = order.slice(start, end);
  const inner = new Float64Array(run.length);
  for (let i = 0; i < inner.length; i++) inner[i] = values[run[i]!]!;
  const innerOrder = argsort(inner);
  for (let i = 0; i < innerOrder.length; i++) order[start + i] = run[innerOrder[i]!]!;
}
