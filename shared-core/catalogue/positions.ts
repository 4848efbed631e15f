import { NumberColumn } from './numberColumn.ts';

/** Rows at a position where an earlier row stands already: `row[k]` repeats `first[k]`. Ascending in row. */
export interface Repeats {
  readonly row: Uint32Array;
  readonly first: Uint32Array;
}

const known = new WeakMap<Float64Array, Repeats>();

/**
 * Rows that repeat the RA and Dec of an earlier row exactly (equal as numbers, no tolerance). Arrays of one length,
 * no NaN. About six bytes a row while it works; the answer is kept for as long as the RA array lives.
 */
export function findRepeats(raDeg: Float64Array, decDeg: Float64Array): Repeats {
  let repeats = known.get(raDeg);
  if (repeats === undefined) {
    repeats = searchRepeats(raDeg, decDeg);
    known.set(raDeg, repeats);
  }
  return repeats;
}

/** How many of the kept rows repeat the position of an earlier kept row. `keep` has 1 for a kept row, else 0. */
export function countKeptRepeats(repeats: Repeats, keep: Uint8Array): number {
  // Over the positions with a kept repeat: (rows kept there) - 1.
  const isCounted = new Uint8Array(repeats.row.length === 0 ? 0 : keep.length);
  let repeated = 0;
  for (let k = 0; k < repeats.row.length; k++) {
    if (keep[repeats.row[k]!] === 0) continue;
    const first = repeats.first[k]!;
    repeated++;
    if (isCounted[first] === 0) {
      isCounted[first] = 1;
      if (keep[first] === 0) repeated--;
    }
  }
  return repeated;
}

/** A hash table with linear probing that holds, for each position met, its first row plus one. */
function searchRepeats(raDeg: Float64Array, decDeg: Float64Array): Repeats {
  const rows = raDeg.length;
  const slots = Math.ceil(rows * 1.5) + 1;
  const table = new Uint32Array(slots);
  const raBits = new Uint32Array(raDeg.buffer, raDeg.byteOffset, 2 * rows);
  const decBits = new Uint32Array(decDeg.buffer, decDeg.byteOffset, 2 * rows);
  const repeated = new NumberColumn();
  const firsts = new NumberColumn();
  for (let i = 0; i < rows; i++) {
    let hash = mix(mix(0, raBits, i), decBits, i);
    hash = Math.imul(hash ^ (hash >>> 16), 0x85ebca6b);
    hash = (hash ^ (hash >>> 13)) >>> 0;
    let slot = Math.floor((hash / 4_294_967_296) * slots);
    for (;;) {
      const entry = table[slot]!;
      if (entry === 0) {
        table[slot] = i + 1;
        break;
      }
      if (raDeg[entry - 1] === raDeg[i] && decDeg[entry - 1] === decDeg[i]) {
        repeated.push(i);
        firsts.push(entry - 1);
        break;
      }
      slot = slot + 1 === slots ? 0 : slot + 1;
    }
  }
  return { row: Uint32Array.from(repeated.join()), first: Uint32Array.from(firsts.join()) };
}

/** Stirs the 64 bits of a double into a hash (multipliers of MurmurHash3, public domain). -0 counts as 0. */
function mix(hash: number, bits: Uint32Array, row: number): number {
  const low = bits[2 * row]!;
  const high = bits[2 * row + 1]!;
  const sign = low === 0 && high === 0x80000000 ? 0 : high;
  const stirred = Math.imul(hash ^ Math.imul(low, 0xcc9e2d51), 0x1b873593) + 0x52dce729;
  return Math.imul(stirred ^ Math.imul(sign, 0xcc9e2d51) ^ (stirred >>> 15), 0x1b873593);
}
