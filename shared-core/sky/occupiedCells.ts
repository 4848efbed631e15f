import { MAX_NSIDE, raDecToNest } from './healpix.ts';
import { CORNER_X, CORNER_Y, cellPlace, cellsAtCorner, cornerKey } from './healpixCells.ts';
import { isPosition } from './vectors.ts';

/** Cells that hold at least one galaxy. */
export interface OccupiedCells {
  readonly nside: number;
  /** NESTED numbers, ascending. */
  readonly cells: Uint32Array;
  /** Galaxies in each. */
  readonly counts: Uint32Array;
}

/** Counts galaxies in the finest cells; the coarser levels follow from these by coarsen. */
export function countFinest(raDeg: ArrayLike<number>, decDeg: ArrayLike<number>): OccupiedCells {
  const all = new Uint32Array(raDeg.length);
  for (let i = 0; i < all.length; i++) {
    const [ra, dec] = [raDeg[i]!, decDeg[i]!];
    if (!isPosition(ra, dec)) throw new Error(`row ${i} is at RA ${ra}, Dec ${dec}, which is no position`);
    all[i] = raDecToNest(MAX_NSIDE, ra, dec);
  }
  all.sort();
  return gather(MAX_NSIDE, all, null, 0);
}

/** The same galaxies in cells of half the nside: four NESTED neighbours make one. */
export function coarsen({ nside, cells, counts }: OccupiedCells): OccupiedCells {
  return gather(nside / 2, cells, counts, 2);
}

/** Runs of equal numbers (after a shift) in an ascending list become one cell each. */
function gather(
  nside: number,
  sorted: Uint32Array,
  counts: Uint32Array | null,
  shift: number,
): OccupiedCells {
  let distinct = 0;
  for (let i = 0; i < sorted.length; i++) {
    if (i === 0 || sorted[i]! >>> shift !== sorted[i - 1]! >>> shift) distinct++;
  }
  const cells = new Uint32Array(distinct);
  const sums = new Uint32Array(distinct);
  let k = -1;
  for (let i = 0; i < sorted.length; i++) {
    const cell = sorted[i]! >>> shift;
    if (i === 0 || cell !== sorted[i - 1]! >>> shift) cells[++k] = cell;
    sums[k]! += counts === null ? 1 : counts[i]!;
  }
  return { nside, cells, counts: sums };
}

export const BORDER = 0;
export const RIM = 1;
export const INNER = 2;

/**
 * For every cell: BORDER when some cell around it (also across its corners) is empty, RIM when it is not border but
 * touches a border cell, INNER otherwise.
 */
export function classifyCells({ nside, cells }: OccupiedCells): Uint8Array {
  const keys = new Float64Array(4 * cells.length);
  for (let i = 0; i < cells.length; i++) {
    const { face, x, y } = cellPlace(nside, cells[i]!);
    for (let k = 0; k < 4; k++) {
      keys[4 * i + k] = cornerKey(nside, face, x + CORNER_X[k]!, y + CORNER_Y[k]!);
    }
  }
  const sorted = keys.slice().sort();
  const kinds = new Uint8Array(cells.length).fill(INNER);
  // A corner is closed when as many occupied cells share it as there are cells at all.
  const rimKeys = new Uint8Array(sorted.length);
  const places = new Uint32Array(4 * cells.length);
  for (let i = 0; i < keys.length; i++) {
    const place = lowerBound(sorted, keys[i]!);
    places[i] = place;
    if (sorted[place + cellsAtCorner(nside, keys[i]!) - 1] !== keys[i]!) kinds[i >>> 2] = BORDER;
  }
  for (let i = 0; i < keys.length; i++) if (kinds[i >>> 2] === BORDER) rimKeys[places[i]!] = 1;
  for (let i = 0; i < keys.length; i++) {
    if (kinds[i >>> 2] === INNER && rimKeys[places[i]!] === 1) kinds[i >>> 2] = RIM;
  }
  return kinds;
}

/** First place in an ascending list whose value is not below `value`. */
export function lowerBound(sorted: ArrayLike<number>, value: number): number {
  let low = 0;
  let high = sorted.length;
  while (low < high) {
    const middle = (low + high) >>> 1;
    if (sorted[middle]! < value) low = middle + 1;
    else high = middle;
  }
  return low;
}
