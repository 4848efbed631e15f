import type { Viewport } from '../geometry/projection.ts';
import type { PointArrays } from './pointArrays.ts';
import type { PointPart } from './pointLayer.ts';

/** What the picture's light depends on, from an even sample of the galaxies. */
export interface Crowding {
  /** Galaxies on the stage, estimated. */
  readonly onStage: number;
  /** Galaxies a CSS pixel where the densest three in a thousand of them stand, and where the thinnest tenth does. */
  readonly densestPerPixel: number;
  readonly thinnestPerPixel: number;
  /** The same where the middle one stands. */
  readonly middlePerPixel: number;
}

export const NOTHING: Crowding = { onStage: 0, densestPerPixel: 0, thinnestPerPixel: 0, middlePerPixel: 0 };

const CELL_PX = 6;
const SAMPLE = 16384;
const BINS = 256;

/**
 * How crowded the picture is. The same sample is used whatever is drawn, so the light does not jump when the picture
 * comes to rest, and the same data in the same view gives the same light.
 */
export function crowding(arrays: PointArrays, parts: readonly PointPart[], viewport: Viewport): Crowding {
  const columns = Math.ceil(viewport.widthPx / CELL_PX);
  const rowCount = Math.ceil(viewport.heightPx / CELL_PX);
  const total = parts.reduce((sum, part) => sum + part.range.count, 0);
  if (total === 0) return NOTHING;
  if (cells.length < columns * rowCount) cells = new Float32Array(columns * rowCount);
  cells.fill(0, 0, columns * rowCount);
  let visited = 0;
  let onStage = 0;
  for (const { matrix: m, range } of parts) {
    const share = Math.min(1, SAMPLE / total);
    const sample = Math.min(range.count, Math.ceil(range.count * share));
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
      const cell = ((py / CELL_PX) | 0) * columns + ((px / CELL_PX) | 0);
      cells[cell]! += weight;
      cellOf[visited] = cell;
      weightOf[visited++] = weight;
      onStage += weight;
    }
  }
  const bins = histogram(visited);
  return {
    onStage,
    densestPerPixel: percentile(bins, 0.997 * onStage) / CELL_PX ** 2,
    thinnestPerPixel: percentile(bins, 0.1 * onStage) / CELL_PX ** 2,
    middlePerPixel: percentile(bins, 0.5 * onStage) / CELL_PX ** 2,
  };
}

/** Scratch of the last call: the counts, and cell and weight of each galaxy of the sample. */
let cells = new Float32Array(0);
const cellOf = new Uint32Array(SAMPLE + 1024);
const weightOf = new Float32Array(SAMPLE + 1024);

/** Galaxies by the count of the cell that they stand in, in eighths of an octave. */
function histogram(visited: number): Float64Array {
  const bins = new Float64Array(BINS);
  for (let i = 0; i < visited; i++) {
    const bin = Math.min(BINS - 1, Math.floor(8 * Math.log2(1 + cells[cellOf[i]!]!)));
    bins[bin]! += weightOf[i]!;
  }
  return bins;
}

/** The count of the cell below which so many galaxies stand. */
function percentile(bins: Float64Array, galaxies: number): number {
  let sum = 0;
  for (let bin = 0; bin < BINS; bin++) {
    sum += bins[bin]!;
    if (sum >= galaxies) return 2 ** ((bin + 1) / 8) - 1;
  }
  return 0;
}

/**
 * Diameter of a galaxy in CSS pixels: small sets get discs that can be seen and clicked, large and crowded ones a pixel
 * each.
 *
 * @param middlePerPixel where given, the room that galaxies have among each other counts as much as the stage's
 */
export function pointSizePx(onStage: number, viewport: Viewport, middlePerPixel?: number): number {
  const onAll = Math.sqrt((viewport.widthPx * viewport.heightPx) / Math.max(1, onStage));
  const among = middlePerPixel !== undefined && middlePerPixel > 0 ? 1 / Math.sqrt(middlePerPixel) : onAll;
  const room = Math.sqrt(onAll * Math.min(onAll, among));
  const most = 4 + 6 * Math.exp(-onStage / 150);
  return Math.min(most, Math.max(1, 1.05 * room ** 0.75));
}

/** Light of one galaxy summed over its disc, in units of its middle, for a diameter in device pixels. */
export const discLight = (diameter: number): number =>
  diameter <= 1.5 ? 1 : ((Math.PI * diameter * diameter) / 4 / 4.5) * (1 - Math.exp(-4.5));

/**
 * Sums of light that fix the curve of brightness. `full`: that of the densest places, but no less than a galaxy or a
 * few, so that a small set is bright. `single`: one galaxy, or half of the thinnest places where all is crowded, so
 * that a large set keeps its contrast.
 */
export function exposure(
  crowd: Omit<Crowding, 'middlePerPixel'>,
  pixelRatio: number,
  diameter: number,
): { full: number; single: number } {
  const light = discLight(diameter) / pixelRatio ** 2;
  return {
    full: Math.max(1 + 0.6 * Math.min(1, crowd.onStage / 3000), crowd.densestPerPixel * light),
    single: Math.max(1, (crowd.thinnestPerPixel * light) / 2),
  };
}
