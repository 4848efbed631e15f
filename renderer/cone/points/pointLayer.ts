import type { DepthCue } from '../geometry/depthCue.ts';
import type { Viewport } from '../geometry/projection.ts';
import type { FieldRange, PointStore } from './pointStore.ts';
import type { Tone } from './tone.ts';

/** Galaxies of one field and the matrix from sky direction times radius to CSS pixels. */
export interface PointPart {
  readonly matrix: Float64Array;
  readonly range: FieldRange;
  /** How light falls with depth; null where it does not. */
  readonly depth: DepthCue | null;
}

/** Galaxies in a part of the radius at full light; all others at `dim` of it. */
export interface Emphasis {
  readonly min: number;
  readonly max: number;
  readonly dim: number;
}

/** One picture of the points. */
export interface PointFrame {
  readonly viewport: Viewport;
  /** Device pixels for one CSS pixel. */
  readonly pixelRatio: number;
  readonly parts: readonly PointPart[];
  /** How much of each range is drawn, 0..1; light is made up for what is left out. */
  readonly fraction: number;
  readonly emphasis: Emphasis | null;
  /** Diameter of a galaxy in CSS pixels. */
  readonly sizePx: number;
  readonly tone: Tone;
}

/** Something that draws galaxies: the WebGL layer and the software layer. */
export interface PointLayer {
  readonly kind: 'webgl' | 'software';
  /** New or changed points; null takes them away. */
  setStore(store: PointStore | null): void;
  /** Tells that colour indices or radii of the store were changed. */
  valuesChanged(): void;
  radiiChanged(): void;
  dispose(): void;
}

/** Pictures with the same key are the same. @param version of what is not in the frame: points, colours, look */
export function pictureKey(frame: PointFrame, version: string): string {
  const { viewport, pixelRatio, fraction, sizePx, emphasis, tone, parts } = frame;
  const size = [viewport.widthPx, viewport.heightPx, pixelRatio, fraction, sizePx, tone.full, tone.single];
  const places = parts.flatMap((part) => [part.range.start, ...part.matrix, ...(part.depth?.row ?? [])]);
  return [version, ...size, emphasis?.min, emphasis?.max, ...places].join(' ');
}
