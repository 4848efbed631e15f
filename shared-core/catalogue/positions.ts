import { powerOfTwoFrom } from '../numerics/tableSize.ts';

/** Rows at a position where an earlier row stands already: `row[k]` repeats `first[k]`. Ascending in row. */
export interface Repeats {
  readonly row: Uint32Array;
  readonly first: Uint32Array;
}

const known = new WeakMap<Float64Array, Repeats>();

/**
 * Rows that repeat the RA and Dec of an earlier row exactly (equal as numbers, no tolerance). Arrays of one length,
 * no NaN. About twelve bytes a row while it works; the answer is kept for as long as the RA array lives.
 */
export function findRepeats(raDeg: Float64Array, decDeg: Float64Array): Repeats {
  let repeats = known.get(raDeg);
  if (repeats === undefined) {
    repeats = searchRepeats(raDeg, decDeg);
    known.set(raDeg, repeats);
  }
  return repeats;
}

/**
 * The kept rows that repeat the position of an earlier kept row. `keep` has 1 for a kept row, else 0. Where the first
 * row of a position is not kept, the earliest that is takes its place.
 */
export function keptRepeats(repeats: Repeats, keep: Uint8Array): Repeats {
  const row: number[] = [];
  const first: number[] = [];
  const earliest = new Map<number, number>();
  for (let k = 0; k < repeats.row.length; k++) {
    const at = repeats.row[k]!;
    if (keep[at] === 0) continue;
    const start = repeats.first[k]!;
    const repeated = keep[start] === 1 ? start : earliest.get(start);
    if (repeated === undefined) {
      earliest.set(start, at);
    } else {
      row.push(at);
      first.push(repeated);
    }
  }
  return { row: Uint32Array.from(row), first: Uint32Array.from(first) };
}

/** Parts of so many rows on average: their tables stay in the processor's cache. */
const ROWS_A_PART = 8192;

/**
 * Rows are laid into parts by the upper bits of their hash, in file order; within a part a small table with linear
 * probing finds equal hashes, and only those are compared. One table for all rows would miss the cache at every step.
 */
function searchRepeats(raDeg: Float64Array, decDeg: Float64Array): Repeats {
  const rows = raDeg.length;
  const parts = Math.min(65536, powerOfTwoFrom(rows / ROWS_A_PART));
  const { order, hashes, starts } = partsOf(hashPositions(raDeg, decDeg), parts);
  let largest = 0;
  for (let p = 0; p + 1 < starts.length; p++) largest = Math.max(largest, starts[p + 1]! - starts[p]!);
  const table = new Uint32Array(powerOfTwoFrom(2 * largest + 2));
  const mask = table.length - 1;
  const found: [row: number, first: number][] = [];
  for (let p = 0; p + 1 < starts.length; p++) {
    table.fill(0);
    for (let k = starts[p]!; k < starts[p + 1]!; k++) {
      const hash = hashes[k]!;
      for (let slot = hash & mask; ; slot = (slot + 1) & mask) {
        const entry = table[slot]!;
        if (entry === 0) {
          table[slot] = k + 1;
          break;
        }
        if (hashes[entry - 1] !== hash) continue;
        const [row, other] = [order[k]!, order[entry - 1]!];
        if (raDeg[other] === raDeg[row] && decDeg[other] === decDeg[row]) {
          found.push([row, other]);
          break;
        }
      }
    }
  }
  found.sort(([a], [b]) => a - b);
  return {
    row: Uint32Array.from(found, ([row]) => row),
    first: Uint32Array.from(found, ([, first]) => first),
  };
}

function hashPositions(raDeg: Float64Array, decDeg: Float64Array): Uint32Array {
  const hashes = new Uint32Array(raDeg.length);
  const raBits = new Uint32Array(raDeg.buffer, raDeg.byteOffset, 2 * raDeg.length);
  const decBits = new Uint32Array(decDeg.buffer, decDeg.byteOffset, 2 * decDeg.length);
  for (let i = 0; i < hashes.length; i++) {
    let hash = mix(mix(0, raBits, i), decBits, i);
    hash = Math.imul(hash ^ (hash >>> 16), 0x85ebca6b);
    hashes[i] = hash ^ (hash >>> 13);
  }
  return hashes;
}

interface Parts {
  /** Row numbers, in file order within each part, and their hashes beside them. */
  readonly order: Uint32Array;
  readonly hashes: Uint32Array;
  /** Part p is starts[p] to starts[p + 1]. */
  readonly starts: Uint32Array;
}

function partsOf(hashOfRow: Uint32Array, parts: number): Parts {
  const rows = hashOfRow.length;
  const starts = new Uint32Array(parts + 1);
  const shift = 1 + Math.clz32(parts);
  const partOf = (hash: number) => (parts === 1 ? 0 : hash >>> shift);
  for (let i = 0; i < rows; i++) starts[partOf(hashOfRow[i]!) + 1]!++;
  for (let p = 1; p < starts.length; p++) starts[p]! += starts[p - 1]!;
  const next = starts.slice();
  const order = new Uint32Array(rows);
  const hashes = new Uint32Array(rows);
  for (let i = 0; i < rows; i++) {
    const at = next[partOf(hashOfRow[i]!)]!++;
    order[at] = i;
    hashes[at] = hashOfRow[i]!;
  }
  return { order, hashes, starts };
}

/** Stirs the 64 bits of a double into a hash (multipliers of MurmurHash3, public domain). -0 counts as 0. */
function mix(hash: number, bits: Uint32Array, row: number): number {
  const low = bits[2 * row]!;
  const high = bits[2 * row + 1]!;
  const sign = low === 0 && high === 0x80000000 ? 0 : high;
  const stirred = Math.imul(hash ^ Math.imul(low, 0xcc9e2d51), 0x1b873593) + 0x52dce729;
  return Math.imul(stirred ^ Math.imul(sign, 0xcc9e2d51) ^ (stirred >>> 15), 0x1b873593);
}
