import type { PixelMatrix } from '../geometry/projection.ts';
import { Pen, type Point } from './pen.ts';
import type { OverlayScene } from './scene.ts';

/**
 * The same picture in larger pixels: what is so many of them wide, a letter, a mark of a ruler, a room between two,
 * becomes larger by the factor, and everything stands where it stood. The context must be scaled by the same factor.
 */
export function inLargerPixels(pen: Pen, scene: OverlayScene, factor: number): [Pen, OverlayScene] {
  const place = (p: Point | null): Point | null => p && [p[0] / factor, p[1] / factor];
  const { hovered, picked, pairText } = scene.marks;
  return [
    new Pen(pen.context, pen.theme, pen.width / factor, pen.height / factor),
    {
      ...scene,
      pixels: larger(scene.pixels, factor),
      unitsPerPixel: scene.unitsPerPixel * factor,
      lanes: scene.lanes.map((lane) => ({ ...lane, matrix: larger(lane.matrix, factor) })),
      marks: { hovered: place(hovered), picked: picked.map(place), pairText },
    },
  ];
}

/** The rows of x and y count the larger pixels; the third row divides, and stays. */
const larger = (matrix: PixelMatrix, factor: number): PixelMatrix =>
  matrix.map((value, i) => (i < 8 ? value / factor : value));
