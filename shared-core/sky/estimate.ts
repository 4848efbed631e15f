import { Refusal } from '../base/refusal.ts';
import { exp } from '../numerics/elementary/elementary.ts';
import { cellOutline } from './cellOutline.ts';
import { CellSet } from './cellSet.ts';
import { pixelAreaDeg2, raDecToNest } from './healpix.ts';
import { BORDER, classifyCells, coarsen, countFinest, type OccupiedCells, RIM } from './occupiedCells.ts';
import type { Footprint, OutlineRing } from './region.ts';
import { isPosition } from './vectors.ts';

/** Greatest share of empty cells well inside the field, where clustering empties more of them than chance would. */
const MAX_EMPTY_SHARE = 0.01;

/**
 * The cell size is chosen from the data: the finest HEALPix cells for which
 * (a) chance would leave less than one cell of the field empty: K exp(-N/K) < 1 for N galaxies in K occupied cells
 *     (and two or more in a cell on average, unless there is one cell only), and
 * (b) at most one in a hundred of the cells well inside the field is empty: those whose parent cell (four of them)
 *     has only occupied neighbours.
 */
function chooseCells(finest: OccupiedCells, galaxies: number): OccupiedCells {
  let level = finest;
  for (;;) {
    const occupied = level.cells.length;
    if (level.nside === 1) return level;
    const parents = coarsen(level);
    const full = occupied === 1 || galaxies >= 2 * occupied;
    const filled = full && occupied * exp(-galaxies / occupied) < 1;
    if (filled && emptyShare(level, parents) <= MAX_EMPTY_SHARE) return level;
    level = parents;
  }
}

function emptyShare(children: OccupiedCells, parents: OccupiedCells): number {
  const kinds = classifyCells(parents);
  let possible = 0;
  let occupied = 0;
  let child = 0;
  for (let i = 0; i < parents.cells.length; i++) {
    let found = 0;
    while (child < children.cells.length && children.cells[child]! >>> 2 === parents.cells[i]!) {
      found++;
      child++;
    }
    if (kinds[i] === BORDER) continue;
    possible += 4;
    occupied += found;
  }
  return possible === 0 ? 0 : 1 - occupied / possible;
}

/**
 * Area in units of cells, with its standard error. Border cells are only partly covered: together they count as
 * many cells as would hold their galaxies at the density of the cells just inside them (the rim). The error is that
 * of both counts, with the rim's own scatter (clustering included) in place of Poisson's where it is greater.
 * Without a rim nothing is known but that the cells are covered in part: half of them, give or take half.
 */
function measure(
  { counts }: OccupiedCells,
  kinds: Uint8Array,
): { inside: number; border: number; borderAsCells: number; error: number } {
  let border = 0;
  let borderGalaxies = 0;
  let rim = 0;
  let rimGalaxies = 0;
  let rimSquares = 0;
  for (let i = 0; i < counts.length; i++) {
    const count = counts[i]!;
    if (kinds[i] === BORDER) {
      border++;
      borderGalaxies += count;
    } else if (kinds[i] === RIM) {
      rim++;
      rimGalaxies += count;
      rimSquares += count * count;
    }
  }
  const inside = counts.length - border;
  if (border === 0) return { inside, border, borderAsCells: 0, error: 0 };
  if (rim === 0) return { inside: 0, border, borderAsCells: border / 2, error: border / 2 };
  const mean = rimGalaxies / rim;
  const scatter = Math.max(1, (rimSquares / rim - mean * mean) / mean);
  const covered = borderGalaxies / mean;
  const error = Math.sqrt(scatter * (covered / mean) * (1 + covered / rim));
  return { inside, border, borderAsCells: Math.min(border, covered), error };
}

/**
 * The footprint of a catalogue whose region nobody stated, from the HEALPix cells (nside 1 to 8192) that hold galaxies.
 * An estimate in every part: `areaDeg2` counts cells inside the field whole and those on its border by the share that
 * their galaxies fill, with the standard error in `estimate.areaErrorDeg2`; contains() says whether a position's
 * cell is occupied; outline() is the boundary of the occupied cells. Gaps as large as a cell stay gaps. The galaxies
 * say where galaxies are, not where one looked: a sample of nothing but a few clumps is taken for as many fields.
 * @param raDeg any finite degrees
 * @param decDeg in [-90, 90]; same length
 * @throws Refusal (kind 'input') for a catalogue without rows; Error for a position that is none
 */
export function estimateFootprint(raDeg: ArrayLike<number>, decDeg: ArrayLike<number>): Footprint {
  if (raDeg.length === 0) {
    throw new Refusal(
      'The catalogue has no galaxy to estimate the observed area from: give a region, or a catalogue with rows.',
    );
  }
  const chosen = chooseCells(countFinest(raDeg, decDeg), raDeg.length);
  const { nside, cells } = chosen;
  const cellAreaDeg2 = pixelAreaDeg2(nside);
  const area = measure(chosen, classifyCells(chosen));
  const occupied = new CellSet(cells);
  let outline: readonly OutlineRing[] | null = null;
  return {
    origin: 'estimated',
    areaDeg2: (area.inside + area.borderAsCells) * cellAreaDeg2,
    estimate: {
      nside,
      cellAreaDeg2,
      cells: cells.length,
      borderCells: area.border,
      borderAsCells: area.borderAsCells,
      areaErrorDeg2: area.error * cellAreaDeg2,
    },
    contains: (ra, dec) => isPosition(ra, dec) && occupied.has(raDecToNest(nside, ra, dec)),
    outline() {
      outline ??= cellOutline(nside, cells, occupied);
      return outline;
    },
  };
}
