import { shellColours } from '../../colour/shellColours.ts';
import { ConeModel } from '../../cone/coneModel.ts';
import { type DepthRange, depthCue, lightAt } from '../../cone/geometry/depthCue.ts';
import { prepareFields } from '../../cone/geometry/preparedField.ts';
import {
  compose,
  type PixelMatrix,
  type Pose,
  pixelMatrix,
  project,
  type Viewport,
} from '../../cone/geometry/projection.ts';
import { COMOVING_DROP_PX } from '../../cone/overlay/alignedRulers.ts';
import type { Point } from '../../cone/overlay/pen.ts';
import type { OverlayScene, PaintedLane } from '../../cone/overlay/scene.ts';
import { radiusAt } from '../../cone/points/radiusTable.ts';
import { coneFootprint } from '../../stage/coneInputs.ts';
import { pictureScale } from '../numbers.ts';
import { fieldOfAll } from './fieldOfAll.ts';
import type { penOn, ViewDrawing, ViewInput } from './view.ts';

/** Below the comoving ruler's numbers. */
const TITLE_ROOM = 18;
const INSETS = { leftPx: 26, rightPx: 40 };

/** The cone of the window set up in the box of a picture. */
export interface ConeSetting {
  readonly model: ConeModel;
  readonly viewport: Viewport;
  readonly pose: Pose;
  /** How far what is shown reaches along the viewer's line of sight. */
  readonly range: DepthRange;
  readonly pixels: PixelMatrix;
  readonly lanes: readonly PaintedLane[];
  /** Displayed radius, 1 at the far end, of a comoving distance. */
  readonly radius: (comovingMpc: number) => number;
  readonly scene: OverlayScene;
}

/** @param arrange chooses what is looked at and from where, once fields and scale are known */
export function coneSetting(input: ViewInput, arrange: (model: ConeModel) => void): ConeSetting {
  const { box, numbers, options, theme } = input;
  const { scale, axis, window } = pictureScale(
    numbers,
    box.width - INSETS.leftPx - INSETS.rightPx,
    'with ages',
  );
  const model = new ConeModel();
  const viewport = { widthPx: box.width, heightPx: box.height - TITLE_ROOM };
  const extent = { min: 0, max: axis.at(window[1]) };
  model.setViewport(viewport);
  const footprint =
    numbers.footprint === null ? { fields: [], wide: true } : coneFootprint(numbers.footprint);
  model.setFields(prepareFields(footprint), footprint);
  model.setScale(scale, extent);
  model.setAxis(extent, INSETS);
  arrange(model);
  const shown = model.shown(0);
  const pixels = pixelMatrix(shown.pose, viewport);
  const lanes = model.lanes(shown.factors).map((lane) => ({
    ...lane,
    matrix: compose(pixels, lane.model),
    shape: model.fields[lane.field]!,
  }));
  const radius = (mpc: number): number => radiusAt(shown.table, mpc);
  const scene: OverlayScene = {
    view: model.view,
    reading: model.reading,
    aligned: model.aligned,
    pixels,
    unitsPerPixel: shown.pose.unitsPerPixel,
    perspective: shown.pose.perspective > 0,
    lanes,
    scale,
    radius,
    farMpc: model.farMpc,
    shells: { shells: options.shells ? numbers.shellInputs : [], selected: null, hovered: null },
    shellColours: shellColours(numbers.shells.length, theme.mode),
    caption: [],
    marks: { hovered: null, picked: [], pairText: '' },
  };
  return {
    model,
    viewport,
    pose: shown.pose,
    range: model.depth(shown, lanes),
    pixels,
    lanes,
    radius,
    scene,
  };
}

/** What is seen of a setting at one moment. */
export type ConeMoment = Pick<ConeSetting, 'lanes' | 'pose' | 'range'>;

/** Where things of the sky stand in a setting, its lanes and its viewer perhaps moved. */
export function conePlaces(
  { model, radius }: ConeSetting,
  { lanes, pose, range }: ConeMoment,
  { box, numbers }: ViewInput,
): Pick<ViewDrawing, 'place' | 'placeAll'> {
  const laneOf = (field: number): PaintedLane | undefined => lanes.find((lane) => lane.field === field);
  const matrixFor = (field: number): Float64Array | null => laneOf(field)?.matrix ?? null;
  const fieldsOf = fieldOfAll(model.fields.map((field) => field.centre));
  return {
    place: ([x, y, z], mpc): Point | null => {
      const matrix = matrixFor(fieldsOf(x, y, z));
      return matrix && project(matrix, x, y, z, radius(mpc));
    },
    placeAll(outX, outY, light) {
      const { selected, background } = numbers.facts;
      if (!selected || !background) return;
      const { x, y, z } = selected.directions;
      const matrices = model.fields.map((_, f) => matrixFor(f));
      const cues = model.fields.map((_, f) => {
        const lane = laneOf(f);
        return lane ? depthCue(pose, lane.model, range, numbers.light.depthCue) : null;
      });
      for (let i = 0; i < outX.length; i++) {
        const field = fieldsOf(x[i]!, y[i]!, z[i]!);
        const matrix = matrices[field];
        const r = radius(background.comovingMpc[i]!);
        const p = matrix ? project(matrix, x[i]!, y[i]!, z[i]!, r) : null;
        const cue = cues[field];
        if (light && cue) light[i] = lightAt(cue, r * x[i]!, r * y[i]!, r * z[i]!);
        outX[i] = p ? p[0] + box.left : Number.NaN;
        outY[i] = p ? p[1] + box.top : Number.NaN;
      }
    },
  };
}

/** The window's comoving ruler leaves its title out where its numbers stand close; a picture has room below them. */
export function ensureComovingTitle({ pen, items }: ReturnType<typeof penOn>, scene: OverlayScene): void {
  const title = scene.scale.titles.comoving;
  const last = scene.lanes.at(-1);
  if (!scene.aligned || !last || items.some((item) => item.kind === 'text' && item.text === title)) return;
  const low = last.lift + last.shape.extent.alongMin * last.sidewaysFactor;
  const line = project(scene.pixels, 0.5, low - COMOVING_DROP_PX * scene.unitsPerPixel, 0);
  if (line) pen.text(title, line[0], line[1] + 33, pen.theme.inkMuted, { gap: 1 });
}
