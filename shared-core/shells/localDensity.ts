import { cos, log10, sin } from '../numerics/elementary/elementary.ts';
import { powerOfTwoFrom } from '../numerics/tableSize.ts';

/** Side of the counting cells; galaxy structure of tens of Mpc shows at this scale. */
const CELL_MPC = 24;

/**
 * Local number density around each galaxy, relative to what galaxies at its distance typically have:
 * log10 of the count in its cell and the 26 around it (a cube of 72 Mpc), minus the running median along
 * the line of sight. Meant for colour, not for measurement.
 *
 * @param raDeg, decDeg of the whole catalogue
 * @param order catalogue index of the i-th galaxy by redshift
 * @param comovingMpc of the i-th galaxy by redshift
 * @returns one value a galaxy, in the order of `order`
 */
export function localDensity(
  raDeg: Float64Array,
  decDeg: Float64Array,
  order: Uint32Array,
  comovingMpc: Float64Array,
): Float32Array {
  const n = order.length;
  const cells = new Int32Array(n * 3);
  const counts = new CellCounts(n);
  for (let i = 0; i < n; i++) {
    const ra = (raDeg[order[i]!]! * Math.PI) / 180;
    const dec = (decDeg[order[i]!]! * Math.PI) / 180;
    const d = comovingMpc[i]! / CELL_MPC;
    cells[3 * i] = Math.floor(d * cos(dec) * cos(ra));
    cells[3 * i + 1] = Math.floor(d * cos(dec) * sin(ra));
    cells[3 * i + 2] = Math.floor(d * sin(dec));
    counts.add(cells[3 * i]!, cells[3 * i + 1]!, cells[3 * i + 2]!);
  }
  const around = new Float32Array(n);
  for (let i = 0; i < n; i++) {
    let sum = 0;
    for (let dx = -1; dx <= 1; dx++)
      for (let dy = -1; dy <= 1; dy++)
        for (let dz = -1; dz <= 1; dz++)
          sum += counts.at(cells[3 * i]! + dx, cells[3 * i + 1]! + dy, cells[3 * i + 2]! + dz);
    around[i] = log10(sum);
  }
  return relativeToNeighboursInDepth(around);
}

/** Open-addressing hash of integer cells to counts: no objects, bounded by twice the number of galaxies. */
class CellCounts {
  readonly #mask: number;
  readonly #keys: Int32Array;
  readonly #counts: Uint32Array;

  constructor(most: number) {
    const size = powerOfTwoFrom(Math.max(16, 2 * most));
    this.#mask = size - 1;
    this.#keys = new Int32Array(3 * size);
    this.#counts = new Uint32Array(size);
  }

  #slot(x: number, y: number, z: number): number {
    let slot = (Math.imul(x, 73856093) ^ Math.imul(y, 19349663) ^ Math.imul(z, 83492791)) >>> 0;
    slot = (Math.imul(slot ^ (slot >>> 15), 0x2c1b3c6d) >>> 0) & this.#mask;
    while (
      this.#counts[slot] !== 0 &&
      (this.#keys[3 * slot] !== x || this.#keys[3 * slot + 1] !== y || this.#keys[3 * slot + 2] !== z)
    )
      slot = (slot + 1) & this.#mask;
    return slot;
  }

  add(x: number, y: number, z: number): void {
    const slot = this.#slot(x, y, z);
    this.#keys.set([x, y, z], 3 * slot);
    this.#counts[slot]!++;
  }

  at(x: number, y: number, z: number): number {
    return this.#counts[this.#slot(x, y, z)]!;
  }
}

// Deeper galaxies are sparser in every flux-limited sample; without this the colour would only repeat the depth.
function relativeToNeighboursInDepth(values: Float32Array): Float32Array {
  const blocks = Math.max(1, Math.min(64, Math.floor(values.length / 200)));
  const medians = Array.from({ length: blocks }, (_, b) => {
    const part = values.slice((values.length * b) / blocks, (values.length * (b + 1)) / blocks).sort();
    return part[part.length >> 1] ?? 0;
  });
  return values.map((value, i) => {
    const place = ((i + 0.5) * blocks) / values.length - 0.5;
    const low = Math.max(0, Math.min(blocks - 1, Math.floor(place)));
    const high = Math.min(blocks - 1, low + 1);
    const share = Math.max(0, Math.min(1, place - low));
    return value - (medians[low]! * (1 - share) + medians[high]! * share);
  });
}
