import type { Viewport } from '../geometry/projection.ts';
import type { PointArrays } from './pointArrays.ts';
import type { PointPart } from './pointLayer.ts';

/** What the picture's light depends on, from an even sample of the galaxies. */
export interface Crowding {
  /** Galaxies on the stage, estimated. */
  readonly onStage: number;
  /** Galaxies a CSS pixel where the densest hundredth of them stands. */
  readonly densestPerPixel: number;
}

const CELL_PX = 6;
const SAMPLE = 20000;
const BINS = 256;

/**
 * How crowded the picture is. The same sample is used whatever is drawn, so the light does not jump when the picture
 * comes to rest, and the same data in the same view gives the same light.
 */
export function crowding(arrays: PointArrays, parts: readonly PointPart[], viewport: Viewport): Crowding {
  const columns = Math.ceil(viewport.widthPx / CELL_PX);
  const rowCount = Math.ceil(viewport.heightPx / CELL_PX);
  const cells = new Float32Array(columns * rowCount);
  const total = parts.reduce((sum, part) => sum + part.range.count, 0);
  if (total === 0 || cells.length === 0) return { onStage: 0, densestPerPixel: 0 };
  const share = Math.min(1, SAMPLE / total);
  const visited: number[] = [];
  const weights: number[] = [];
  let onStage = 0;
  for (const { matrix: m, range } of parts) {
    const sample = Math.min(range.count, Math.max(64, Math.ceil(range.count * share)));
    const weight = range.count / Math.max(1, sample);
    for (let s = range.start; s < range.start + sample; s++) {
      const r = arrays.radius[s]!;
      const x = r * arrays.x[s]!;
      const y = r * arrays.y[s]!;
      const z = r * arrays.z[s]!;
      const w = m[8]! * x + m[9]! * y + m[10]! * z + m[11]!;
      if (!(w > 0.02)) continue;
      const px = (m[0]! * x + m[1]! * y + m[2]! * z + m[3]!) / w;
      const py = (m[4]! * x + m[5]! * y + m[6]! * z + m[7]!) / w;
      if (!(px >= 0 && px < viewport.widthPx && py >= 0 && py < viewport.heightPx)) continue;
      const cell = Math.floor(py / CELL_PX) * columns + Math.floor(px / CELL_PX);
      cells[cell]! += weight;
      visited.push(cell);
      weights.push(weight);
      onStage += weight;
    }
  }
  return { onStage, densestPerPixel: percentile(cells, visited, weights, onStage) / CELL_PX ** 2 };
}

/** The count of the cell below which 99 of 100 galaxies stand, by a histogram of logarithms. */
function percentile(
  cells: Float32Array,
  visited: readonly number[],
  weights: readonly number[],
  total: number,
): number {
  const bins = new Float64Array(BINS);
  for (const [i, cell] of visited.entries()) {
    const bin = Math.min(BINS - 1, Math.floor(8 * Math.log2(1 + cells[cell]!)));
    bins[bin]! += weights[i]!;
  }
  let sum = 0;
  for (let bin = 0; bin < BINS; bin++) {
    sum += bins[bin]!;
    if (sum >= 0.99 * total) return 2 ** ((bin + 1) / 8) - 1;
  }
  return 0;
}

/**
 * Diameter of a galaxy in CSS pixels for so many on a stage: small sets get discs that can be seen and clicked, large
 * ones a pixel each.
 */
export function pointSizePx(onStage: number, viewport: Viewport): number {
  const room = Math.sqrt((viewport.widthPx * viewport.heightPx) / Math.max(1, onStage));
  const most = 4 + 3 * Math.exp(-onStage / 100);
  return Math.min(most, Math.max(1, 1.05 * room ** 0.75));
}

/** Light of one galaxy summed over its disc, in units of its middle, for a diameter in device pixels. */
export const discLight = (diameter: number): number =>
  diameter <= 1.5 ? 1 : ((Math.PI * diameter * diameter) / 4 / 4.5) * (1 - Math.exp(-4.5));
