import { LIGHT_STEPS, lightIndex, VALUE_STEPS } from '../../cone/points/tone.ts';
import type { ScenePoints } from '../scene.ts';
import { toneAlpha } from './toneAlpha.ts';

/** Each pixel of a picture is this many squared of the grid that light is summed on. */
export const SUPERSAMPLING = 2;
/** Places of a disc's middle between grid points, each way; of a wide one half a grid point is nothing. */
const PLACES = 8;
const WIDE = 320;
const FINE = 1024;

/** A part of the picture in whole pixels. */
export interface Tile {
  readonly left: number;
  readonly top: number;
  readonly width: number;
  readonly height: number;
}

/** Draws tiles of the galaxies. */
export interface PointTiles {
  /** Red, green, blue, opacity of each pixel, not premultiplied. The same pixels however the picture is cut up. */
  render(tile: Tile): Uint8ClampedArray<ArrayBuffer>;
}

/**
 * Prepares galaxies for a picture of so many pixels a unit. Every galaxy's place between grid points is found in the
 * whole picture, and each grid point sums its galaxies in the same order in every tile; so tiles have no seams.
 */
export function pointTiles(points: ScenePoints, pxPerUnit: number): PointTiles {
  const grid = pxPerUnit * SUPERSAMPLING;
  const disc = softDisc(Math.max(1.6, points.diameter * grid));
  const table = toneAlpha(points, grid);
  const rows = rowIndex(points, pxPerUnit);
  let light = new Float32Array(0);
  return {
    render(tile) {
      const width = tile.width * SUPERSAMPLING;
      const height = tile.height * SUPERSAMPLING;
      if (light.length < 2 * width * height) light = new Float32Array(2 * width * height);
      light.fill(0, 0, 2 * width * height);
      const reach = Math.ceil(disc.side / SUPERSAMPLING) + 1;
      const { order, starts } = rows;
      const first = Math.max(0, tile.top - reach);
      const last = Math.min(starts.length - 2, tile.top + tile.height + reach);
      const from = first < starts.length ? starts[first]! : order.length;
      const to = last >= 0 ? starts[last + 1]! : 0;
      for (let k = from; k < to; k++) {
        const i = order[k]!;
        // Fractions of grid points as whole numbers: the same for every tile, to the last bit.
        const x = Math.round(points.x[i]! * grid * FINE) - tile.left * SUPERSAMPLING * FINE;
        const y = Math.round(points.y[i]! * grid * FINE) - tile.top * SUPERSAMPLING * FINE;
        addDisc(disc, light, width, height, x, y, points.value[i]! / 255, points.light?.[i] ?? 1);
      }
      return toned(light, table, tile);
    },
  };
}

/** Galaxies by the pixel row that they stand in; rows above and below the picture are left out. */
function rowIndex(points: ScenePoints, pxPerUnit: number): { order: Uint32Array; starts: Uint32Array } {
  const { count, y, x } = points;
  let height = 0;
  const rowOf = new Int32Array(count);
  for (let i = 0; i < count; i++) {
    const row = Number.isNaN(x[i]!) ? Number.NaN : Math.floor(y[i]! * pxPerUnit);
    rowOf[i] = row >= 0 && row < 1 << 17 ? row : -1;
    if (rowOf[i]! >= height) height = rowOf[i]! + 1;
  }
  const starts = new Uint32Array(height + 1);
  for (const row of rowOf) if (row >= 0) starts[row + 1]!++;
  for (let row = 0; row < height; row++) starts[row + 1]! += starts[row]!;
  const next = starts.slice();
  const order = new Uint32Array(starts[height]!);
  for (let i = 0; i < count; i++) if (rowOf[i]! >= 0) order[next[rowOf[i]!]!++] = i;
  return { order, starts };
}

interface Disc {
  readonly side: number;
  readonly places: number;
  readonly weights: Float32Array;
}

/** The window's soft disc, exp(-4.5 (2r/diameter)^2), for each place of the middle between grid points. */
function softDisc(diameter: number): Disc {
  const side = 2 * Math.ceil((diameter + 0.5) / 2);
  const places = side > WIDE ? 1 : PLACES;
  const weights = new Float32Array(places * places * side * side);
  let d = 0;
  for (let py = 0; py < places; py++) {
    for (let px = 0; px < places; px++) {
      const cx = (side - 1) / 2 + (px + 0.5) / places;
      const cy = (side - 1) / 2 + (py + 0.5) / places;
      for (let row = 0; row < side; row++) {
        for (let column = 0; column < side; column++) {
          const r2 = (column + 0.5 - cx) ** 2 + (row + 0.5 - cy) ** 2;
          weights[d++] = Math.exp((-4.5 * 4 * r2) / diameter ** 2);
        }
      }
    }
  }
  return { side, places, weights };
}

/** @param xFine,yFine the galaxy's place in FINE-ths of a grid point from the tile's corner, whole numbers */
function addDisc(
  { side, places, weights }: Disc,
  light: Float32Array,
  width: number,
  height: number,
  xFine: number,
  yFine: number,
  value: number,
  strength: number,
): void {
  const shift = ((1 - side) * FINE) / 2;
  const left = Math.floor((xFine + shift) / FINE);
  const top = Math.floor((yFine + shift) / FINE);
  if (left >= width || top >= height || left + side <= 0 || top + side <= 0) return;
  const placeX = Math.floor(((xFine + shift - FINE * left) * places) / FINE);
  const placeY = Math.floor(((yFine + shift - FINE * top) * places) / FINE);
  const base = (placeY * places + placeX) * side * side;
  const firstColumn = Math.max(0, -left);
  const endColumn = Math.min(side, width - left);
  for (let row = Math.max(0, -top); row < Math.min(side, height - top); row++) {
    let w = base + row * side + firstColumn;
    let i = 2 * ((top + row) * width + left + firstColumn);
    for (let column = firstColumn; column < endColumn; column++, w++, i += 2) {
      const more = weights[w]! * strength;
      light[i]! += more;
      light[i + 1]! += more * value;
    }
  }
}

/** Sums to colours by the table, then the mean of each pixel's grid points, weighed by their opacity. */
function toned(light: Float32Array, table: Uint8Array, tile: Tile): Uint8ClampedArray<ArrayBuffer> {
  const out = new Uint8ClampedArray(tile.width * tile.height * 4);
  const bits = new Uint32Array(light.buffer, light.byteOffset, light.length);
  const width = tile.width * SUPERSAMPLING;
  for (let row = 0, o = 0; row < tile.height; row++) {
    for (let column = 0; column < tile.width; column++, o += 4) {
      let [r, g, b, a] = [0, 0, 0, 0];
      for (let s = 0; s < SUPERSAMPLING * SUPERSAMPLING; s++) {
        const dy = (s / SUPERSAMPLING) | 0;
        const dx = s - dy * SUPERSAMPLING;
        const i = 2 * ((row * SUPERSAMPLING + dy) * width + column * SUPERSAMPLING + dx);
        if (light[i] === 0) continue;
        const value = ((light[i + 1]! / light[i]!) * (VALUE_STEPS - 1) + 0.5) | 0;
        const t = 4 * (value * LIGHT_STEPS + lightIndex(bits[i]!));
        const cover = table[t + 3]!;
        r += table[t]! * cover;
        g += table[t + 1]! * cover;
        b += table[t + 2]! * cover;
        a += cover;
      }
      if (a === 0) continue;
      out[o] = r / a;
      out[o + 1] = g / a;
      out[o + 2] = b / a;
      out[o + 3] = a / (SUPERSAMPLING * SUPERSAMPLING);
    }
  }
  return out;
}
