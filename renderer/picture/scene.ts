import type { Stretch } from '../../shared-core/study/schema.ts';
import type { Triple } from '../colour/oklab.ts';

/*
 * A picture before it has pixels. Lengths are in units, of which a square picture has SIDE_UNITS a side; y downward.
 * Everything but the galaxies is vectors and text, so that one scene serves every size and format.
 */

/** Sides of a picture in units, when it is square; else the geometric mean of its sides. */
export const SIDE_UNITS = 1000;

export interface Paint {
  /** sRGB bytes. */
  readonly colour: Triple;
  /** 0..1. */
  readonly alpha: number;
}

export interface Stroke extends Paint {
  readonly width: number;
  readonly dash: readonly number[];
}

export interface PathItem {
  readonly kind: 'path';
  /** Runs of x, y pairs. */
  readonly runs: readonly Float64Array[];
  readonly closed: boolean;
  readonly fill: Paint | null;
  /** Holes by the even-odd rule; otherwise by winding. */
  readonly evenOdd: boolean;
  readonly stroke: Stroke | null;
}

export interface CircleItem {
  readonly kind: 'circle';
  readonly x: number;
  readonly y: number;
  readonly radius: number;
  readonly fill: Paint | null;
  readonly stroke: Stroke | null;
}

export interface TextItem {
  readonly kind: 'text';
  readonly text: string;
  /** On the baseline, at the start, middle or end of the text. */
  readonly x: number;
  readonly y: number;
  readonly anchor: 'start' | 'middle' | 'end';
  readonly size: number;
  readonly bold: boolean;
  /** Clockwise about (x, y), radians. */
  readonly angle: number;
  readonly paint: Paint;
  /** The ground showing around the letters, so that they read over galaxies. */
  readonly halo: Stroke | null;
}

/** Where, between what lies under and over them, the galaxies are. */
export interface PointsItem {
  readonly kind: 'points';
}

export type SceneItem = PathItem | CircleItem | TextItem | PointsItem;

/** The galaxies of a picture; arrays of one length. A place that is NaN is not drawn. */
export interface ScenePoints {
  readonly count: number;
  readonly x: Float32Array;
  readonly y: Float32Array;
  /** Index of the colour, 0..255. */
  readonly value: Uint8Array;
  /** Part of its light that a galaxy keeps, 0..1; null: all of it. */
  readonly light: Float32Array | null;
  /** 256 colours, sRGB bytes. */
  readonly colours: Uint8Array;
  readonly stretch: Stretch;
  readonly exposureStops: number;
  /** Toward which the brightest places turn. */
  readonly glow: Triple;
  /** How far they do, 0..1. */
  readonly glowShare: number;
  /** Diameter of a galaxy. */
  readonly diameter: number;
  /** Galaxies a square unit where the densest hundredth stands, and where the thinnest tenth does. */
  readonly densest: number;
  readonly thinnest: number;
}

export interface Scene {
  readonly widthPx: number;
  readonly heightPx: number;
  readonly dpi: number;
  /** Pixels of one unit. */
  readonly pxPerUnit: number;
  readonly width: number;
  readonly height: number;
  /** Null where the picture is transparent. */
  readonly background: Triple | null;
  readonly items: readonly SceneItem[];
  readonly points: ScenePoints;
  readonly metadata: SceneMetadata;
}

export interface SceneMetadata {
  readonly title: string;
  /** What the picture shows, for who cannot see it. */
  readonly description: string;
  readonly credit: string;
  readonly software: string;
  /** SHA-256 of the study's text. */
  readonly fingerprint: string;
}
