import type { PictureOptions, PictureView } from '../../shared-core/picture/options.ts';
import { offeredCaption } from './caption.ts';
import { describeInWords } from './describe.ts';
import { type PictureFrame, paintFrame, viewBox } from './frame.ts';
import { placePoints } from './galaxies/placePoints.ts';
import { paintLabels } from './labels.ts';
import { type PictureFacts, pictureNumbers } from './numbers.ts';
import { type Scene, SIDE_UNITS } from './scene.ts';
import { groundOf, pictureTheme } from './themes.ts';
import { coneView } from './views/cone.ts';
import { lightConeView } from './views/lightCone.ts';
import { skyView } from './views/sky.ts';
import { penOn, type ViewDrawing, type ViewInput } from './views/view.ts';
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

/**
 * Composes a picture: what the writers turn into PNG, SVG or PDF. The same options and facts give the same scene.
 *
 * @throws Refusal when there is nothing to draw, or a colour or slab is asked for that the study has not
 */
export function composePicture(options: PictureOptions, facts: PictureFacts): Scene {
  const numbers = pictureNumbers(options, facts);
  const theme = pictureTheme(options.style);
  const pxPerUnit = Math.sqrt(options.widthPx * options.heightPx) / SIDE_UNITS;
  const paper = { left: 0, top: 0, width: options.widthPx / pxPerUnit, height: options.heightPx / pxPerUnit };
  const title = options.title ?? numbers.study.name;
  let frame: PictureFrame = { ...paper, title, caption: options.caption ?? '', options, numbers, theme };
  let box = viewBox(frame);
  let drawing = VIEWS[options.view]({ box, options, numbers, theme });
  for (let round = 0; options.caption === null && round < MOST_ROUNDS; round++) {
    frame = { ...frame, caption: offeredCaption(numbers, drawing.notes) };
    const next = viewBox(frame);
    if (next.height === box.height) break;
    box = next;
    drawing = VIEWS[options.view]({ box, options, numbers, theme });
  }
  const around = penOn({ box: paper, theme });
  paintFrame(around.pen, frame);
  const marked = penOn({ box, theme });
  paintLabels(marked.pen, options, numbers, drawing);
  const { fingerprint } = facts;
  return {
    widthPx: options.widthPx,
    heightPx: options.heightPx,
    dpi: options.dpi,
    pxPerUnit,
    width: paper.width,
    height: paper.height,
    background: options.transparent ? null : groundOf(theme),
    items: [...drawing.under, { kind: 'points' }, ...drawing.over, ...marked.items, ...around.items],
    points: placePoints(drawing, box, numbers, theme),
    metadata: {
      title: title.trim() === '' ? numbers.study.name : title,
      description: describeInWords(options, numbers, drawing),
      credit: options.credit,
      software: 'Conewright',
      fingerprint,
    },
  };
}

/** The picture in words, for who cannot see it. */
export const describePicture = (scene: Scene): string => scene.metadata.description;
