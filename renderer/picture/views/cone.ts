import { cssColour, shellColours } from '../../colour/shellColours.ts';
import { ConeModel } from '../../cone/coneModel.ts';
import { depthCue, lightAt } from '../../cone/geometry/depthCue.ts';
import { compose, pixelMatrix, project } from '../../cone/geometry/projection.ts';
import { COMOVING_DROP_PX } from '../../cone/overlay/coneRulers.ts';
import { paintOverlay } from '../../cone/overlay/paintOverlay.ts';
import type { Point } from '../../cone/overlay/pen.ts';
import type { OverlayScene, PaintedLane } from '../../cone/overlay/scene.ts';
import { paintShells } from '../../cone/overlay/shellPaint.ts';
import { radiusAt } from '../../cone/points/radiusTable.ts';
import { coneFootprint } from '../../stage/coneInputs.ts';
import { pictureScale } from '../numbers.ts';
import { fieldOfAll } from './fieldOfAll.ts';
import { paintBodies } from './shellBodies.ts';
import { penOn, type ViewDrawing, type ViewInput } from './view.ts';

/** Below the comoving ruler's numbers. */
const TITLE_ROOM = 18;
const INSETS = { leftPx: 26, rightPx: 40 };

/** The cone as the window shows it: from the side where its radius is a ruler, or in perspective. */
export function coneView(input: ViewInput, perspective: boolean): ViewDrawing {
  const { box, numbers, options, theme } = input;
  const { scale, axis, window } = pictureScale(numbers, box.width - INSETS.leftPx - INSETS.rightPx);
  const model = new ConeModel();
  const viewport = { widthPx: box.width, heightPx: box.height - TITLE_ROOM };
  const extent = { min: 0, max: axis.at(window[1]) };
  model.setViewport(viewport);
  model.setFootprint(
    numbers.footprint === null ? { fields: [], wide: true } : coneFootprint(numbers.footprint),
  );
  model.setScale(scale, extent);
  model.setAxis(extent, INSETS);
  if (perspective) model.setView('whole');
  else if (model.view === 'sideOn' || model.view === 'parallel')
    model.setSidewaysFactor(numbers.study.look.sideways);
  const shown = model.shown(0);
  const pixels = pixelMatrix(shown.pose, viewport);
  const lanes: PaintedLane[] = model.lanes(shown.factors).map((lane) => ({
    ...lane,
    matrix: compose(pixels, lane.model),
    shape: model.fields[lane.field]!,
  }));
  const colours = shellColours(numbers.shells.length, theme.mode);
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
    shellColours: colours,
    caption: [],
    marks: { hovered: null, picked: [], pairText: '' },
  };
  const under = penOn(input);
  for (const [i, shell] of scene.shells.shells.entries()) {
    const ends = [radius(shell.comovingMinMpc), radius(shell.comovingMaxMpc)] as const;
    const css = cssColour(colours[i]!, theme.shellAlpha);
    for (const lane of lanes) paintBodies(under.pen, lane, model.aligned, ends, css);
  }
  const over = penOn(input);
  if (options.rulers) {
    paintOverlay(over.pen, scene);
    ensureComovingTitle(over, scene);
  } else paintShells(over.pen, scene);

  const centres = lanes.map(({ shape }) => shape.centre);
  const matrixFor = (field: number): Float64Array | null =>
    model.fields.length === 0 ? pixels : (lanes.find((lane) => lane.field === field)?.matrix ?? null);
  const fieldsOf = fieldOfAll(model.fields.map((field) => field.centre));
  const place: ViewDrawing['place'] = ([x, y, z], mpc): Point | null => {
    const matrix = matrixFor(fieldsOf(x, y, z));
    return matrix && project(matrix, x, y, z, radius(mpc));
  };
  return {
    under: under.items,
    over: over.items,
    notes: model.state().caption,
    words: perspective
      ? `a survey of ${countText(centres.length)} seen in perspective, the observer at the common tip`
      : `a survey of ${countText(centres.length)} seen from the side, the observer at the left and depth to the right`,
    place,
    placeAll(outX, outY, light) {
      const { selected, background } = numbers.facts;
      if (!selected || !background) return;
      const { x, y, z } = selected.directions;
      const matrices = model.fields.length === 0 ? [pixels] : model.fields.map((_, f) => matrixFor(f));
      const range = model.depth(shown);
      const cues = model.fields.map((_, f) => {
        const lane = lanes.find(({ field }) => field === f);
        return lane ? depthCue(shown.pose, lane.model, range, numbers.light.depthCue) : null;
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
function ensureComovingTitle({ pen, items }: ReturnType<typeof penOn>, scene: OverlayScene): void {
  const title = scene.scale.titles.comoving;
  const last = scene.lanes.at(-1);
  if (!scene.aligned || !last || items.some((item) => item.kind === 'text' && item.text === title)) return;
  const low = last.lift + last.shape.extent.alongMin * last.sidewaysFactor;
  const line = project(scene.pixels, 0.5, low - COMOVING_DROP_PX * scene.unitsPerPixel, 0);
  if (line) pen.text(title, line[0], line[1] + 33, pen.theme.inkMuted, { gap: 1 });
}

const countText = (fields: number): string =>
  fields === 0 ? 'the whole sky' : fields === 1 ? 'one field' : `${fields} fields`;
