import { asin, cos, sin } from '../numerics/elementary/elementary.ts';
import type { CompiledShape } from './shape.ts';
import { DEG_PER_RAD, RAD_PER_DEG, unitToRaDec } from './vectors.ts';

/** With fewer shapes than this, asking each is quicker than looking up. */
const WORTH_AN_INDEX = 6;
/** Bands and bins are widened by this, far above the rounding of the angles here. */
const PADDING_DEG = 1e-6;

/**
 * Which shapes may hold a point: the sky in cells, each with the shapes whose enclosing cap meets it. Makes a region
 * with thousands of star holes as quick to ask as one with a few.
 */
export interface ShapeIndex {
  /** Cell of a position: raDeg in [0, 360), decDeg in [-90, 90]. */
  cellOf(raDeg: number, decDeg: number): number;
  /** Shapes of cell c: shapes[first[c]] to shapes[first[c + 1] - 1], ascending. */
  readonly first: Int32Array;
  readonly shapes: Int32Array;
}

/** Cells between parallels of equal spacing, about as wide as they are high. */
interface Grid {
  readonly bands: number;
  /** Number of the first cell of each band, and one past the last. */
  readonly bandStart: Int32Array;
}

function makeGrid(bands: number): Grid {
  const bandStart = new Int32Array(bands + 1);
  for (let b = 0; b < bands; b++) {
    const middle = ((b + 0.5) / bands) * Math.PI - Math.PI / 2;
    bandStart[b + 1] = bandStart[b]! + Math.max(1, Math.round(2 * bands * cos(middle)));
  }
  return { bands, bandStart };
}

function forEachCell(grid: Grid, shape: CompiledShape, visit: (cell: number) => void): void {
  const { bands, bandStart } = grid;
  const { raDeg, decDeg } = unitToRaDec(shape.centre);
  const radiusDeg = shape.radiusRad * DEG_PER_RAD + PADDING_DEG;
  const low = Math.max(0, Math.floor(((decDeg - radiusDeg + 90) / 180) * bands));
  const high = Math.min(bands - 1, Math.floor(((decDeg + radiusDeg + 90) / 180) * bands));
  // A cap that does not hold a pole reaches asin(sin r / cos Dec) in RA, and in no band farther.
  const holdsPole = Math.abs(decDeg) + radiusDeg >= 90;
  const sine = sin(radiusDeg * RAD_PER_DEG) / cos(decDeg * RAD_PER_DEG);
  const reachDeg = holdsPole || sine >= 1 ? 180 : asin(sine) * DEG_PER_RAD + PADDING_DEG;
  for (let b = low; b <= high; b++) {
    const start = bandStart[b]!;
    const count = bandStart[b + 1]! - start;
    const from = Math.floor(((raDeg - reachDeg) / 360) * count);
    const to = Math.min(from + count - 1, Math.floor(((raDeg + reachDeg) / 360) * count));
    for (let k = from; k <= to; k++) visit(start + (((k % count) + count) % count));
  }
}

export function compileShapeIndex(shapes: readonly CompiledShape[]): ShapeIndex {
  if (shapes.length < WORTH_AN_INDEX) {
    return {
      cellOf: () => 0,
      first: Int32Array.of(0, shapes.length),
      shapes: Int32Array.from(shapes, (_, s) => s),
    };
  }
  const grid = makeGrid(shapes.length < 100 ? 90 : 720);
  const { bands, bandStart } = grid;
  const cells = bandStart[bands]!;
  const first = new Int32Array(cells + 1);
  for (const shape of shapes) {
    forEachCell(grid, shape, (cell) => {
      first[cell + 1]!++;
    });
  }
  for (let c = 0; c < cells; c++) first[c + 1]! += first[c]!;
  const next = first.slice(0, cells);
  const list = new Int32Array(first[cells]!);
  shapes.forEach((shape, s) => {
    forEachCell(grid, shape, (cell) => {
      list[next[cell]!++] = s;
    });
  });
  return {
    first,
    shapes: list,
    cellOf(raDeg, decDeg) {
      const b = Math.min(bands - 1, Math.floor(((decDeg + 90) / 180) * bands));
      const start = bandStart[b]!;
      const count = bandStart[b + 1]! - start;
      return start + Math.min(count - 1, Math.floor((raDeg / 360) * count));
    },
  };
}
