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
  for (let s = start; s < start + count; s++) {
    counts[cellOf(x[s]!, y[s]!, z[s]!, side)]!++;
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
    slots[next[cellOf(x[s]!, y[s]!, z[s]!, side)]!++] = s;
    if (s % SLICE === 0) yield;
  }
  const caps = new Float32Array(words(4 * used).buffer);
  for (let cell = 0; cell < used; cell++) {
    const own = slots.subarray(starts[cell]!, starts[cell + 1]!);
    own.set(Array.from(own).sort((a, b) => depth(comoving[a]!) - depth(comoving[b]!)));
    let [mx, my, mz] = [0, 0, 0];
    for (const s of own) {
      mx += x[s]! / own.length;
      my += y[s]! / own.length;
      mz += z[s]! / own.length;
    }
    let reach = 0;
    for (const s of own) reach = Math.max(reach, Math.hypot(x[s]! - mx, y[s]! - my, z[s]! - mz));
    // The middle is kept in 32 bits: the reach covers what that moves it.
    caps.set([mx, my, mz, reach + 1e-6], 4 * cell);
    yield;
  }
  return { slots, starts, caps };
}

/** A galaxy whose distance is not known stands last. */
const depth = (mpc: number): number => (Number.isNaN(mpc) ? Number.MAX_VALUE : mpc);

/** The cell of a direction on the six faces of a cube, side x side each. */
function cellOf(x: number, y: number, z: number, side: number): number {
  const [ax, ay, az] = [Math.abs(x), Math.abs(y), Math.abs(z)];
  let [face, u, v, w] = [z < 0 ? 5 : 4, x, y, az];
  if (ax >= ay && ax >= az) [face, u, v, w] = [x < 0 ? 1 : 0, y, z, ax];
  else if (ay >= az) [face, u, v, w] = [y < 0 ? 3 : 2, x, z, ay];
  const place = (t: number) => Math.min(side - 1, Math.floor(((t / w + 1) / 2) * side));
  return (face * side + place(v)) * side + place(u);
}
