import type { ConeModel } from './coneModel.ts';
import type { Lane } from './geometry/arrangement.ts';
import { type DepthCue, depthCue } from './geometry/depthCue.ts';
import type { PreparedField } from './geometry/preparedField.ts';
import { compose, type PixelMatrix, pixelMatrix, project, type Viewport } from './geometry/projection.ts';
import type { Shown } from './movement.ts';
import type { Point } from './overlay/pen.ts';
import type { Galaxies } from './points/galaxies.ts';
import type { Emphasis, PointPart } from './points/pointLayer.ts';
import { radiusAt } from './points/radiusTable.ts';
import type { ShellsInput } from './types.ts';

/** Matrices of one moment: every layer of a picture is drawn with the same. */
export interface ConeFrame {
  /** The fields that the lanes count: a region may change while a picture of the old one is drawn. */
  readonly fields: readonly PreparedField[];
  readonly shown: Shown;
  readonly lanes: readonly Lane[];
  /** Display space to CSS pixels. */
  readonly pixels: PixelMatrix;
  /** Sky direction times radius to CSS pixels, for each lane. */
  readonly laneMatrices: readonly Float64Array[];
  /** How light falls with depth in a lane (in display space, where there is none). */
  readonly depthIn: (lane: Lane | null) => DepthCue | null;
}

/** @param cue how much fainter what is farthest is than what is nearest, 0..1 */
export function coneFrame(model: ConeModel, viewport: Viewport, now: number, cue: number): ConeFrame {
  const shown = model.shown(now);
  const lanes = model.lanes(shown.factors);
  const pixels = pixelMatrix(shown.pose, viewport);
  const range = cue > 0 ? model.depth(shown, lanes) : { near: 0, far: 0 };
  return {
    fields: model.fields,
    shown,
    lanes,
    pixels,
    laneMatrices: lanes.map((lane) => compose(pixels, lane.model)),
    depthIn: (lane) => depthCue(shown.pose, lane?.model ?? DISPLAY, range, cue),
  };
}

const DISPLAY = [1, 0, 0, 0, 0, 1, 0, 0, 0, 0, 1, 0];

/** The galaxies of the lanes; before there is a region, all of them as they stand on the sky. */
export function partsOf(frame: ConeFrame, galaxies: Galaxies): PointPart[] {
  const ranges = galaxies.store?.ranges ?? [];
  if (frame.lanes.length === 0 && ranges[0])
    return [{ matrix: frame.pixels, range: ranges[0], depth: frame.depthIn(null) }];
  return frame.lanes.flatMap((lane, i) => {
    const range = ranges[lane.field];
    return range ? [{ matrix: frame.laneMatrices[i]!, range, depth: frame.depthIn(lane) }] : [];
  });
}

/** Galaxies outside the chosen shell keep this part of their light. */
const DIMMED = 0.3;

/** The chosen shell at full light, all else dimmed; null when none is chosen. */
export function emphasisOf({ shown }: ConeFrame, { shells, selected }: ShellsInput): Emphasis | null {
  const shell = selected === null ? undefined : shells[selected];
  if (!shell) return null;
  const min = radiusAt(shown.table, shell.comovingMinMpc);
  return { min, max: radiusAt(shown.table, shell.comovingMaxMpc), dim: DIMMED };
}

/** Where a row of the catalogue is drawn; null when it is not. */
export function pixelOf(row: number, frame: ConeFrame, galaxies: Galaxies): Point | null {
  const place = galaxies.place(row);
  if (!place) return null;
  const nth = frame.lanes.findIndex((lane) => lane.field === place.field);
  const matrix = frame.laneMatrices[nth] ?? (frame.lanes.length === 0 ? frame.pixels : undefined);
  if (!matrix) return null;
  return project(matrix, place.x, place.y, place.z, radiusAt(frame.shown.table, place.comovingMpc));
}
