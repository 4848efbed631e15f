import { Refusal } from '../base/refusal.ts';
import { z } from '../base/schema.ts';
import { LEAST_SIDE_PX } from './options.ts';

/** What happens in a film. */
export const FILM_KINDS = ['turntable', 'fly-along', 'shell-by-shell'] as const;
export type FilmKind = (typeof FILM_KINDS)[number];

export const MOST_FILM_SIDE_PX = 4096;
/** Luma samples of a frame at VP9 level 5 (webmproject.org/vp9/levels); H.264 level 5.1 takes 9 437 184. */
export const MOST_FILM_PIXELS = 8_912_896;
export const LEAST_SECONDS = 0.1;
export const MOST_SECONDS = 600;
export const MOST_FRAMES_A_SECOND = 60;
/** Six minutes at 30 frames a second. */
export const MOST_FRAMES = 10_800;

export const filmOptionsSchema = z.strictObject({
  kind: z.enum(FILM_KINDS),
  seconds: z.number().default(12),
  framesPerSecond: z.number().default(30),
  /** The field that a fly-along goes through, counted from 1. */
  field: z.number().default(1),
});

/** What a film shows beside its picture's options: plain data. */
export type FilmOptions = Readonly<z.infer<typeof filmOptionsSchema>>;

/**
 * A film's options from plain data, with what is not said filled in.
 * @throws Refusal ('use') that says which number cannot be used and what can
 */
export function filmOptions(raw: unknown): FilmOptions {
  const parsed = filmOptionsSchema.safeParse(raw);
  if (!parsed.success) {
    const issue = parsed.error.issues[0];
    const place = issue?.path.map(String).join('.') || 'the options';
    throw new Refusal(
      `The film cannot be made: at ${place}, ${issue?.message ?? 'something unexpected'}.`,
      'use',
    );
  }
  const { seconds, framesPerSecond, field } = parsed.data;
  if (!(seconds >= LEAST_SECONDS && seconds <= MOST_SECONDS))
    throw new Refusal(
      `The film was to last ${seconds} seconds: give a number from ${LEAST_SECONDS} to ${MOST_SECONDS}.`,
      'use',
    );
  if (!(Number.isInteger(framesPerSecond) && framesPerSecond >= 1 && framesPerSecond <= MOST_FRAMES_A_SECOND))
    throw new Refusal(
      `The film was to have ${framesPerSecond} frames a second: give a whole number from 1 to ${MOST_FRAMES_A_SECOND}.`,
      'use',
    );
  if (!(Number.isInteger(field) && field >= 1))
    throw new Refusal(`The film was to go through field ${field}: fields are counted from 1.`, 'use');
  const frames = filmFrames(parsed.data);
  if (frames < 2 || frames > MOST_FRAMES)
    throw new Refusal(
      `${seconds} seconds of ${framesPerSecond} frames a second are ${frames} ${frames === 1 ? 'frame' : 'frames'}, and a film has 2 to ${MOST_FRAMES}: change one of the two.`,
      'use',
    );
  return parsed.data;
}

/** How many frames a film has; its length is frames over frames a second. */
export const filmFrames = ({ seconds, framesPerSecond }: FilmOptions): number =>
  Math.round(seconds * framesPerSecond);

/**
 * How far the film is at a frame, 0..1. A turntable has turned once when its first frame comes again, one after its
 * last; the others end with their last frame.
 */
export const filmShare = (film: FilmOptions, frame: number): number =>
  frame / (film.kind === 'turntable' ? filmFrames(film) : filmFrames(film) - 1);

/** When a frame begins, in whole microseconds. */
export const frameStartUs = ({ framesPerSecond }: FilmOptions, frame: number): number =>
  Math.round((frame * 1e6) / framesPerSecond);

/**
 * Looks at the size of a film's frames.
 * @throws Refusal ('use') for sides that are odd (colours are stored for two by two pixels, 4:2:0), too small or too large
 */
export function checkFilmSize(widthPx: number, heightPx: number): void {
  const size = `${widthPx} x ${heightPx}`;
  for (const px of [widthPx, heightPx]) {
    if (!(px >= LEAST_SIDE_PX && px <= MOST_FILM_SIDE_PX))
      throw new Refusal(
        `The film's size is ${size}, a side of ${px} pixels: give sides of ${LEAST_SIDE_PX} to ${MOST_FILM_SIDE_PX} pixels.`,
        'use',
      );
    if (px % 2 !== 0)
      throw new Refusal(
        `The film's size is ${size}, a side of ${px} pixels: films need even sides, such as ${px + 1}.`,
        'use',
      );
  }
  if (widthPx * heightPx > MOST_FILM_PIXELS)
    throw new Refusal(
      `The film's size is ${size}, which is more than players take (${MOST_FILM_PIXELS} pixels): give 3840 x 2160 or less.`,
      'use',
    );
}

/** A time as a person is told of it before waiting: seconds up to a hundred, else minutes. */
export function waitText(seconds: number): string {
  if (seconds < 2) return 'a second or two';
  if (seconds < 100) return `about ${Math.ceil(seconds / 5) * 5} seconds`;
  return `about ${Math.ceil(seconds / 60)} minutes`;
}
