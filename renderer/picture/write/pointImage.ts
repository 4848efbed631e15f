import { type PointTiles, pointTiles } from '../galaxies/tilePoints.ts';
import type { Scene } from '../scene.ts';

/** Longest side of the picture of the galaxies inside a vector file. */
const MOST_SIDE_PX = 8192;

/** The galaxies of a scene as one image that covers the whole page, at the picture's own pixels where they are not too many. */
export interface PointImage {
  readonly widthPx: number;
  readonly heightPx: number;
  readonly tiles: PointTiles;
}

export function pointImage(scene: Scene): PointImage {
  const share = Math.min(1, MOST_SIDE_PX / Math.max(scene.widthPx, scene.heightPx));
  const pxPerUnit = scene.pxPerUnit * share;
  return {
    widthPx: Math.round(scene.widthPx * share),
    heightPx: Math.round(scene.heightPx * share),
    tiles: pointTiles(scene.points, pxPerUnit),
  };
}
