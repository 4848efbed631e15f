import type { PointArrays } from './pointArrays.ts';
import type { FieldRange } from './pointStore.ts';

/** The galaxies of a field by where they stand on the sky: finds those near a pixel without a look at all others. */
export interface PickIndex {
  /** Slots, cell by cell; within a cell from near to far. */
  readonly slots: Uint32Array;
  /** Where each cell begins among the slots, and where the last ends. */
  readonly starts: Uint32Array;
  /** For each cell the middle of its directions, and how far the farthest of them stands from it: four numbers. */
  readonly caps: Float32Array;
}

const PER_CELL = 1024;
const COARSE = 32;
const FINEST = 1024;
/** Galaxies worked on before giving way. */
const SLICE = 32768;

/**
 * Steps that build the index of a field.
 *
 * @param words gives an array of so many numbers, in memory that page and worker share
 */
export function* pickIndex(
  { x, y, z, comoving }: PointArrays,
  { start, count }: FieldRange,
  words: (length: number) => Uint32Array,
): Generator<void, PickIndex> {
  const coarse = new Uint8Array(6 * COARSE * COARSE);
  for (let s = start; s < start + count; s++) coarse[cellOf(x[s]!, y[s]!, z[s]!, COARSE)] = 1;
  yield;
  const filled = coarse.reduce((sum, one) => sum + one, 0);
  const side = Math.min(FINEST, Math.max(4, Math.round(COARSE * Math.sqrt(count / (PER_CELL * filled)))));
  const counts = new Uint32Array(6 * side * side);
  const cells = new Uint32Array(count);
  for (let s = start; s < start + count; s++) {
    const cell = cellOf(x[s]!, y[s]!, z[s]!, side);
    cells[s - start] = cell;
    counts[cell]!++;
    if (s % SLICE === 0) yield;
  }
  const used = counts.reduce((sum, n) => sum + (n > 0 ? 1 : 0), 0);
  const starts = words(used + 1);
  const next = new Uint32Array(counts.length);
  for (let cell = 0, nth = 0, at = 0; cell < counts.length; cell++) {
    next[cell] = at;
    if (counts[cell] === 0) continue;
    starts[nth++] = at;
    at += counts[cell]!;
  }
  starts[used] = count;
  const slots = words(count);
  for (let s = start; s < start + count; s++) {
    slots[next[cells[s - start]!]!++] = s;
    if (s % SLICE === 0) yield;
  }
  const bits = new Uint32Array(comoving.buffer, comoving.byteOffset, comoving.length);
  const caps = new Float32Array(words(4 * used).buffer);
  for (let cell = 0; cell < used; cell++) {
    const own = slots.subarray(starts[cell]!, starts[cell + 1]!);
    sortByDepth(own, bits);
    let mx = 0;
    let my = 0;
    let mz = 0;
    for (const s of own) {
      mx += x[s]! / own.length;
      my += y[s]! / own.length;
      mz += z[s]! / own.length;
    }
    let reach2 = 0;
    for (const s of own) {
      const dx = x[s]! - mx;
      const dy = y[s]! - my;
      const dz = z[s]! - mz;
      reach2 = Math.max(reach2, dx * dx + dy * dy + dz * dz);
    }
    // The middle is kept in 32 bits: the reach covers what that moves it.
    caps.set([mx, my, mz, Math.sqrt(reach2) + 1e-6], 4 * cell);
    yield;
  }
  return { slots, starts, caps };
}

/** Slots in one number beside the 32 bits of a distance. */
const ROOM = 2 ** 21;

/**
 * Sorts a cell's slots from near to far. The bits of positive floats stand in the order of the floats, and those of no
 * number behind all: as plain numbers they are sorted many times faster than by a function.
 */
function sortByDepth(slots: Uint32Array, bits: Uint32Array): void {
  if (slots.length > ROOM) {
    slots.sort((a, b) => bits[a]! - bits[b]!);
    return;
  }
  const keys = Float64Array.from(slots, (s, k) => bits[s]! * ROOM + k).sort();
  slots.set(Uint32Array.from(keys, (key) => slots[key % ROOM]!));
}

/** The cell of a direction on the six faces of a cube, side x side each. */
function cellOf(x: number, y: number, z: number, side: number): number {
  // Plain variables: this runs for every galaxy.
  const ax = Math.abs(x);
  const ay = Math.abs(y);
  const az = Math.abs(z);
  let face = z < 0 ? 5 : 4;
  let u = x / az;
  let v = y / az;
  if (ax >= ay && ax >= az) {
    face = x < 0 ? 1 : 0;
    u = y / ax;
    v = z / ax;
  } else if (ay >= az) {
    face = y < 0 ? 3 : 2;
    u = x / ay;
    v = z / ay;
  }
  const half = side / 2;
  const column = Math.min(side - 1, Math.floor((u + 1) * half));
  const row = Math.min(side - 1, Math.floor((v + 1) * half));
  return (face * side + row) * side + column;
}
