import type { PictureOptions, PictureView } from '../../../shared-core/picture/options.ts';
import { offeredCaption } from '../../picture/caption.ts';
import { type PictureFrame, viewBox } from '../../picture/frame.ts';
import { type PictureFacts, pictureNumbers } from '../../picture/numbers.ts';
import { SIDE_UNITS } from '../../picture/scene.ts';
import { pictureTheme } from '../../picture/themes.ts';
import { coneView } from '../../picture/views/cone.ts';
import { lightConeView } from '../../picture/views/lightCone.ts';
import { skyView } from '../../picture/views/sky.ts';
import type { ViewDrawing, ViewInput } from '../../picture/views/view.ts';
import { wedgeView } from '../../picture/views/wedge.ts';

const VIEWS: Readonly<Record<PictureView, (input: ViewInput) => ViewDrawing>> = {
  cone: (input) => coneView(input, false),
  perspective: (input) => coneView(input, true),
  wedge: wedgeView,
  sky: skyView,
  'light-cone': lightConeView,
};
const MOST_ROUNDS = 3;

/**
 * The caption that a picture has when none is given, as a text that can be edited: the view tells what it did in the
 * room that the caption leaves. A test holds it to the words in the composed picture.
 *
 * @throws Refusal as composePicture does
 */
export function captionOffer(options: PictureOptions, facts: PictureFacts): string {
  const numbers = pictureNumbers(options, facts);
  const theme = pictureTheme(options.style);
  const pxPerUnit = Math.sqrt(options.widthPx * options.heightPx) / SIDE_UNITS;
  const base = {
    width: options.widthPx / pxPerUnit,
    height: options.heightPx / pxPerUnit,
    title: options.title ?? numbers.study.name,
    options,
    numbers,
    theme,
  };
  let caption = '';
  let box = viewBox({ ...base, caption } satisfies PictureFrame);
  let drawing = VIEWS[options.view]({ box, options, numbers, theme });
  for (let round = 0; round < MOST_ROUNDS; round++) {
    caption = offeredCaption(numbers, drawing.notes);
    const next = viewBox({ ...base, caption });
    if (next.height === box.height) break;
    box = next;
    drawing = VIEWS[options.view]({ box, options, numbers, theme });
  }
  return caption;
}
