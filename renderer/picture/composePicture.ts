import type { PictureOptions, PictureView } from '../../shared-core/picture/options.ts';
import { offeredCaption, offeredTitle } from './caption.ts';
import { describeInWords } from './describe.ts';
import { type PictureFrame, paintFrame, viewBox } from './frame.ts';
import { placePoints } from './galaxies/placePoints.ts';
import { paintLabels } from './labels.ts';
import { type PictureFacts, type PictureNumbers, pictureNumbers } from './numbers.ts';
import { type Scene, type SceneMetadata, SIDE_UNITS } from './scene.ts';
import { groundOf, pictureTheme } from './themes.ts';
import { coneView } from './views/cone.ts';
import { lightConeView } from './views/lightCone.ts';
import { skyView } from './views/sky.ts';
import { penOn, type ViewBox, type ViewDrawing, type ViewInput } from './views/view.ts';
import { wedgeView } from './views/wedge.ts';

const VIEWS: Readonly<Record<PictureView, (input: ViewInput) => ViewDrawing>> = {
  cone: (input) => coneView(input, false),
  perspective: (input) => coneView(input, true),
  wedge: wedgeView,
  sky: skyView,
  'light-cone': lightConeView,
};
/** The caption tells what the view did, and takes room from it: agreed after a few rounds at most. */
const MOST_ROUNDS = 3;

/** A picture's paper, words and view, before anything is drawn around it. */
export interface Layout<View> {
  readonly pxPerUnit: number;
  readonly frame: PictureFrame;
  readonly box: ViewBox;
  readonly view: View;
}

/** Finds room for the caption and the view beside each other. @param draw makes the view in a box */
export function laidOut<View extends { readonly notes: readonly string[] }>(
  options: PictureOptions,
  numbers: PictureNumbers,
  draw: (input: ViewInput) => View,
): Layout<View> {
  const theme = pictureTheme(options.style);
  const pxPerUnit = Math.sqrt(options.widthPx * options.heightPx) / SIDE_UNITS;
  let frame: PictureFrame = {
    width: options.widthPx / pxPerUnit,
    height: options.heightPx / pxPerUnit,
    title: options.title ?? offeredTitle(numbers.study),
    caption: options.caption ?? '',
    options,
    numbers,
    theme,
  };
  let box = viewBox(frame);
  let view = draw({ box, options, numbers, theme });
  for (let round = 0; options.caption === null && round < MOST_ROUNDS; round++) {
    frame = { ...frame, caption: offeredCaption(numbers, view.notes) };
    const next = viewBox(frame);
    if (next.height === box.height) break;
    box = next;
    view = draw({ box, options, numbers, theme });
  }
  return { pxPerUnit, frame, box, view };
}

/**
 * Composes a picture: what the writers turn into PNG, SVG or PDF. The same options and facts give the same scene.
 *
 * @throws Refusal when there is nothing to draw, or a colour or slab is asked for that the study has not
 */
export function composePicture(options: PictureOptions, facts: PictureFacts): Scene {
  const numbers = pictureNumbers(options, facts);
  const { pxPerUnit, frame, box, view } = laidOut(options, numbers, VIEWS[options.view]);
  const { theme, width, height } = frame;
  const around = penOn({ box: { left: 0, top: 0, width, height }, theme });
  paintFrame(around.pen, frame);
  const marked = penOn({ box, theme });
  paintLabels(marked.pen, options, numbers, view);
  return {
    widthPx: options.widthPx,
    heightPx: options.heightPx,
    dpi: options.dpi,
    pxPerUnit,
    width,
    height,
    background: options.transparent ? null : groundOf(theme),
    items: [...view.under, { kind: 'points' }, ...view.over, ...marked.items, ...around.items],
    points: placePoints(view, box, numbers, theme),
    metadata: sceneMetadata(frame, facts, describeInWords(options, numbers, view)),
  };
}

/**
 * The caption that a picture has when none is given, as a text that can be edited.
 *
 * @throws Refusal as composePicture does
 */
export function captionOffer(options: PictureOptions, facts: PictureFacts): string {
  const numbers = pictureNumbers(options, facts);
  return laidOut({ ...options, caption: null }, numbers, VIEWS[options.view]).frame.caption;
}

/** What a file says of itself. */
export function sceneMetadata(
  { title, options, numbers }: PictureFrame,
  { fingerprint }: PictureFacts,
  description: string,
): SceneMetadata {
  return {
    title: title.trim() === '' ? numbers.study.name : title,
    description,
    credit: options.credit,
    software: 'Conewright',
    fingerprint,
  };
}

/** The picture in words, for who cannot see it. */
export const describePicture = (scene: Scene): string => scene.metadata.description;
