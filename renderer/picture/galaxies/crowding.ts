/** How crowded galaxies stand, in squares of CELL units; the same for every size of a picture. */
export interface SceneCrowding {
  readonly onStage: number;
  /** Square units of the squares that hold any. */
  readonly area: number;
  /** Galaxies a square unit where the densest hundredth of them stands, and where the thinnest tenth does. */
  readonly densest: number;
  readonly thinnest: number;
}

const CELL = 5;
/** Cells a side of the counted plane; places outside it are not on the picture. */
const CELLS = 1024;

/** @param x,y places in units of the scene; NaN is not on the picture */
export function crowdingOf(x: Float32Array, y: Float32Array): SceneCrowding {
  const counts = new Uint32Array(CELLS * CELLS);
  let onStage = 0;
  for (let i = 0; i < x.length; i++) {
    const cx = Math.floor(x[i]! / CELL);
    const cy = Math.floor(y[i]! / CELL);
    if (!(cx >= 0 && cx < CELLS && cy >= 0 && cy < CELLS)) continue;
    counts[cy * CELLS + cx]!++;
    onStage++;
  }
  const filled = counts.filter((count) => count > 0).sort();
  return {
    onStage,
    area: filled.length * CELL ** 2,
    densest: countAtShare(filled, 0.99 * onStage) / CELL ** 2,
    thinnest: countAtShare(filled, 0.1 * onStage) / CELL ** 2,
  };
}

/** The count of the cell below which so many galaxies stand. */
function countAtShare(filled: Uint32Array, galaxies: number): number {
  let sum = 0;
  for (const count of filled) {
    sum += count;
    if (sum >= galaxies) return count;
  }
  return 0;
}
