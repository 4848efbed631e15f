import type { Directions, MapBox } from './skyFrames.ts';
import { pointProjection, type SkyFrame } from './skyProjection.ts';

/** More points than this change nothing in a map of this size. */
const MOST_POINTS = 120_000;
/** Opacity of a single galaxy, so that even a lone one is seen. */
const FAINTEST = 0.3;

/** A picture of counts: how many of the points fall on every device pixel. */
export interface SkyCounts {
  readonly width: number;
  readonly height: number;
  readonly counts: Uint16Array;
}

/** Galaxies counted before giving way. */
const SLICE = 4096;

/**
 * Steps that count galaxies on the pixels of the map; of very many, every n-th. They come sorted by redshift, so that
 * every n-th is an even sample of the sky.
 * @param pixelRatio device pixels in a CSS pixel
 */
export function* countPoints(
  { x, y, z }: Directions,
  frame: SkyFrame,
  box: MapBox,
  size: { readonly widthPx: number; readonly heightPx: number },
  pixelRatio: number,
): Generator<void, SkyCounts> {
  const width = Math.max(1, Math.round(size.widthPx * pixelRatio));
  const height = Math.max(1, Math.round(size.heightPx * pixelRatio));
  const counts = new Uint16Array(width * height);
  const project = pointProjection(frame);
  const step = Math.max(1, Math.ceil(x.length / MOST_POINTS));
  const dot = dotOffsets(dotRadius(x.length, pixelRatio));
  const at = { x: 0, y: 0 };
  for (let i = 0, n = 1; i < x.length; i += step, n++) {
    if (n % SLICE === 0) yield;
    project(x[i]!, y[i]!, z[i]!, at);
    if (!(at.x >= box.left && at.x < box.right && at.y >= box.top && at.y < box.bottom)) continue;
    const [px, py] = [Math.floor(at.x * pixelRatio), Math.floor(at.y * pixelRatio)];
    for (const [dx, dy] of dot) {
      const [cx, cy] = [px + dx, py + dy];
      if (cx < 0 || cy < 0 || cx >= width || cy >= height) continue;
      const k = cy * width + cx;
      if (counts[k]! < 65_535) counts[k]!++;
    }
  }
  return { width, height, counts };
}

/** Radius of a galaxy's dot in device pixels: few galaxies are drawn larger. */
export function dotRadius(galaxies: number, pixelRatio: number): number {
  const css = galaxies <= 100 ? 2.3 : galaxies <= 3000 ? 1 : 0.5;
  return css * pixelRatio;
}

function dotOffsets(radius: number): [number, number][] {
  const reach = Math.floor(radius);
  const offsets: [number, number][] = [];
  for (let dy = -reach; dy <= reach; dy++)
    for (let dx = -reach; dx <= reach; dx++) if (Math.hypot(dx, dy) <= radius) offsets.push([dx, dy]);
  return offsets;
}

/** Counts as opacity of one colour: fuller where galaxies crowd, against the mean of the filled pixels. */
export function tonePoints(
  { counts }: SkyCounts,
  colour: readonly [number, number, number],
  rgba: Uint8ClampedArray,
): void {
  let [filled, sum] = [0, 0];
  for (const count of counts) {
    if (count === 0) continue;
    filled++;
    sum += count;
  }
  const mean = filled === 0 ? 1 : sum / filled;
  for (let i = 0; i < counts.length; i++) {
    const count = counts[i]!;
    rgba[4 * i] = colour[0];
    rgba[4 * i + 1] = colour[1];
    rgba[4 * i + 2] = colour[2];
    rgba[4 * i + 3] =
      count === 0 ? 0 : 255 * (FAINTEST + (1 - FAINTEST) * (1 - Math.exp(-count / (2 * mean))));
  }
}
