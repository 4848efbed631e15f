import { type FilmKind, type FilmOptions, filmShare } from '../../../shared-core/picture/film.ts';
import type { PictureOptions } from '../../../shared-core/picture/options.ts';
import { offeredCaption } from '../caption.ts';
import { laidOut, sceneMetadata } from '../composePicture.ts';
import { describeInWords } from '../describe.ts';
import { type PictureFrame, paintFrame } from '../frame.ts';
import { pointColours, pointLook, pointPlaces } from '../galaxies/placePoints.ts';
import { paintLabels } from '../labels.ts';
import { type PictureFacts, pictureNumbers } from '../numbers.ts';
import type { Scene, SceneItem, SceneMetadata } from '../scene.ts';
import { groundOf } from '../themes.ts';
import { penOn, type ViewBox, type ViewInput } from '../views/view.ts';
import { steadyLook } from './steadyLook.ts';
import type { FilmDrawing, FilmView } from './views/filmView.ts';
import { flyAlongView } from './views/flyAlong.ts';
import { shellByShellView } from './views/shellByShell.ts';
import { turntableView } from './views/turntable.ts';

const VIEWS: Readonly<Record<FilmKind, (input: ViewInput, film: FilmOptions) => FilmView>> = {
  turntable: turntableView,
  'fly-along': (input, { field }) => flyAlongView(input, field),
  'shell-by-shell': shellByShellView,
};

const KIND_WORDS: Readonly<Record<FilmKind, string>> = {
  turntable: 'Film, turntable',
  'fly-along': 'Film, fly-along',
  'shell-by-shell': 'Film, shell by shell',
};

/** A film before it has pixels: a scene for each of its frames, made when it is asked for. */
export interface Film {
  readonly options: FilmOptions;
  readonly widthPx: number;
  readonly heightPx: number;
  readonly metadata: SceneMetadata;
  /** The caption that tells what a reader must know, whether or not it is the one shown. */
  readonly offeredCaption: string;
  /** The same frame is the same scene whenever it is asked for; from 0, and one after the last is allowed. */
  readonly sceneAt: (frame: number) => Scene;
}

/**
 * Composes a film. Title, key, caption and rulers hold still; the same options and facts give the same frames.
 *
 * @param picture size, words and look; its view, slab and clear ground do not act
 * @throws Refusal when there is nothing to draw, no shell or no such field, or a colour is asked for that the study has not
 */
export function composeFilm(picture: PictureOptions, film: FilmOptions, facts: PictureFacts): Film {
  const numbers = pictureNumbers(picture, facts);
  const { pxPerUnit, frame, box, view } = laidOut(picture, numbers, (input) => VIEWS[film.kind](input, film));
  const { theme, width, height } = frame;
  const { widthPx, heightPx } = picture;
  const metadata = sceneMetadata(
    frame,
    facts,
    describeInWords(picture, numbers, view, KIND_WORDS[film.kind]),
  );
  const around = frameItems(frame, box);
  const colours = pointColours(numbers, theme);
  const placesOf = latest((placeAll: FilmDrawing['placeAll']) => pointPlaces({ placeAll }, numbers));
  const lookOf = latest((places: ReturnType<typeof placesOf>) => pointLook(places, box, numbers));
  const lookAt = steadyLook((share) => lookOf(placesOf(view.drawingAt(share).placeAll)));
  return {
    options: film,
    widthPx,
    heightPx,
    metadata,
    offeredCaption: offeredCaption(numbers, view.notes),
    sceneAt(index) {
      const share = filmShare(film, index);
      const drawing = view.drawingAt(share);
      const places = placesOf(drawing.placeAll);
      const light = drawing.dim === null ? places.light : dimmed(places, drawing.dim);
      const marked = penOn({ box, theme });
      paintLabels(marked.pen, picture, numbers, drawing, true);
      return {
        widthPx,
        heightPx,
        dpi: picture.dpi,
        pxPerUnit,
        width,
        height,
        background: groundOf(theme),
        items: [...drawing.under, { kind: 'points' }, ...drawing.over, ...marked.items, ...around],
        points: { ...places, ...colours, ...lookAt(share), light },
        metadata,
      };
    },
  };
}

/**
 * The same work, not done again while it is asked of the same thing: a cone that holds still places its galaxies by one
 * function. No more than one result is kept, and none while the next is made.
 */
function latest<In, Out>(work: (of: In) => Out): (of: In) => Out {
  let kept: { readonly of: In; readonly out: Out } | null = null;
  return (of) => {
    if (kept?.of === of) return kept.out;
    kept = null;
    const out = work(of);
    kept = { of, out };
    return out;
  };
}

/** The light that galaxies keep, in an array of its own. */
function dimmed(
  { count, light }: ReturnType<typeof pointPlaces>,
  dim: NonNullable<FilmDrawing['dim']>,
): Float32Array {
  const out = light?.slice() ?? new Float32Array(count).fill(1);
  dim(out);
  return out;
}

/** What stands around the stage, on a ground that covers what reaches out of it. */
function frameItems(frame: PictureFrame, box: ViewBox): readonly SceneItem[] {
  const { width, height, theme } = frame;
  const { pen, items } = penOn({ box: { left: 0, top: 0, width, height }, theme });
  const { context } = pen;
  context.fillStyle = theme.background;
  const [right, bottom] = [box.left + box.width, box.top + box.height];
  context.fillRect(0, 0, width, box.top);
  context.fillRect(0, bottom, width, height - bottom);
  context.fillRect(0, box.top, box.left, box.height);
  context.fillRect(right, box.top, width - right, box.height);
  paintFrame(pen, frame);
  return items;
}
