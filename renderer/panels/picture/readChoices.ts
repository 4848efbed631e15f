import { Refusal } from '../../../shared-core/base/refusal.ts';
import {
  checkFilmSize,
  type FilmOptions,
  filmOptions,
  LEAST_SECONDS,
  MOST_FILM_SIDE_PX,
  MOST_FRAMES_A_SECOND,
  MOST_SECONDS,
} from '../../../shared-core/picture/film.ts';
import {
  LEAST_SIDE_PX,
  MOST_SIDE_PX,
  type PictureOptions,
  parsePictureSize,
  pictureOptions,
} from '../../../shared-core/picture/options.ts';
import { readNumber } from '../../ui/numberText.ts';
import { isSheet, type PictureChoices } from './pictureChoices.ts';

const PRINT_DPI = 300;

/** A name for each field of the bench that can be wrong. */
export type Troubles = ReadonlyMap<string, string>;

export interface ReadPicture {
  /** Null while something cannot be used. */
  readonly options: PictureOptions | null;
  /** The film, where one was chosen and can be used. */
  readonly film: FilmOptions | null;
  /** By field: a sentence that says what to do. What belongs to no field stands under ''. */
  readonly troubles: Troubles;
}

/**
 * The options of a picture from what stands on the bench, and a sentence for each thing that cannot be used.
 * @param screenPx width and height of the window in pixels of the screen
 */
export function readChoices(choices: PictureChoices, screenPx: readonly [number, number]): ReadPicture {
  const troubles = new Map<string, string>();
  const number = (field: string, text: string, name: string, low: number, high: number): number => {
    const read = readNumber(text, name);
    if ('sentence' in read) troubles.set(field, read.sentence);
    else if (!(read.value >= low && read.value <= high))
      troubles.set(field, `${name} is ${text.trim()}: give a number from ${low} to ${high}.`);
    return 'sentence' in read ? Number.NaN : read.value;
  };
  const isFilm = choices.what === 'film';
  const size = isFilm ? filmSizeOf(choices, number) : sizeOf(choices, screenPx, number);
  const seconds = isFilm
    ? number('seconds', choices.seconds, 'The length in seconds', LEAST_SECONDS, MOST_SECONDS)
    : 0;
  const framesPerSecond = isFilm
    ? number('framesPerSecond', choices.framesPerSecond, 'Frames a second', 1, MOST_FRAMES_A_SECOND)
    : 0;
  const slab = slabOf(choices, number);
  const depthRedshift =
    choices.depthRedshift.trim() === ''
      ? null
      : number('depthRedshift', choices.depthRedshift, 'The redshift at which the picture ends', 1e-6, 1100);
  const labels = choices.labels.map((label, i) => {
    const name = (what: string): string => `${what} of label ${i + 1}`;
    if (label.text.trim() === '')
      troubles.set(`label${i}.text`, `Label ${i + 1} has no text: give one, or take the label away.`);
    return {
      text: label.text.trim(),
      raDeg: number(`label${i}.raDeg`, label.raDeg, name('RA'), -360, 360),
      decDeg: number(`label${i}.decDeg`, label.decDeg, name('Dec'), -90, 90),
      redshift: number(`label${i}.redshift`, label.redshift, name('Redshift'), 0, 1100),
    };
  });
  const { view, style, colourBy, colourMap, light, title, caption, credit, rulers, shells, transparent } =
    choices;
  if (troubles.size > 0) return { options: null, film: null, troubles };
  try {
    const options = pictureOptions({
      ...size,
      // A film has a view of its own, and no clear ground.
      view: isFilm ? 'cone' : view,
      style,
      colourBy,
      colourMap,
      ...light,
      slab,
      depthRedshift,
      title,
      caption,
      credit,
      labels,
      rulers,
      shells,
      transparent: transparent && !isFilm,
    });
    if (!isFilm) return { options, film: null, troubles };
    checkFilmSize(options.widthPx, options.heightPx);
    const film = filmOptions({ kind: choices.filmKind, seconds, framesPerSecond, field: choices.field });
    return { options, film, troubles };
  } catch (error) {
    if (!(error instanceof Refusal)) throw error;
    return { options: null, film: null, troubles: new Map([['', error.message]]) };
  }
}

type ReadField = (field: string, text: string, name: string, low: number, high: number) => number;

function sizeOf(choices: PictureChoices, screenPx: readonly [number, number], number: ReadField) {
  if (choices.size === 'own') {
    const side = (field: string, text: string, name: string): number =>
      Math.round(number(field, text, name, LEAST_SIDE_PX, MOST_SIDE_PX));
    return {
      widthPx: side('ownWidthPx', choices.ownWidthPx, 'The width in pixels'),
      heightPx: side('ownHeightPx', choices.ownHeightPx, 'The height in pixels'),
      dpi: number('dpi', choices.dpi, 'Pixels an inch', 1, 10_000),
    };
  }
  if (choices.size === 'screen') return { widthPx: screenPx[0], heightPx: screenPx[1], dpi: PRINT_DPI };
  const name = isSheet(choices.size) && choices.upright ? `${choices.size}-portrait` : choices.size;
  return { ...parsePictureSize(name, PRINT_DPI), dpi: PRINT_DPI };
}

function filmSizeOf(choices: PictureChoices, number: ReadField) {
  if (choices.filmSize !== 'own') return { ...parsePictureSize(choices.filmSize, PRINT_DPI), dpi: PRINT_DPI };
  const side = (field: string, text: string, name: string): number =>
    Math.round(number(field, text, name, LEAST_SIDE_PX, MOST_FILM_SIDE_PX));
  return {
    widthPx: side('ownWidthPx', choices.ownWidthPx, 'The width in pixels'),
    heightPx: side('ownHeightPx', choices.ownHeightPx, 'The height in pixels'),
    dpi: PRINT_DPI,
  };
}

function slabOf(choices: PictureChoices, number: ReadField): PictureOptions['slab'] {
  if (choices.what === 'film' || choices.view !== 'wedge' || choices.slab === 'offered') return null;
  if (choices.slab === 'declination')
    return {
      kind: 'declination',
      decMinDeg: number('decMinDeg', choices.decMinDeg, 'The lowest declination', -90, 90),
      decMaxDeg: number('decMaxDeg', choices.decMaxDeg, 'The highest declination', -90, 90),
    };
  return {
    kind: 'greatCircle',
    poleRaDeg: number('poleRaDeg', choices.poleRaDeg, 'RA of the pole', -360, 360),
    poleDecDeg: number('poleDecDeg', choices.poleDecDeg, 'Dec of the pole', -90, 90),
    thicknessDeg: number('thicknessDeg', choices.thicknessDeg, 'The thickness', 0.001, 180),
  };
}
