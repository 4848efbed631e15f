import type { Command } from 'commander';
import { Refusal } from '../../../shared-core/base/refusal.ts';
import { FILM_KINDS, type FilmOptions, filmFrames, filmOptions } from '../../../shared-core/picture/film.ts';
import { isFilmFormat, type PictureJob } from '../../../shared-core/picture/job.ts';
import { memoryText } from '../../../shared-core/picture/memory.ts';
import type { PictureOptions } from '../../../shared-core/picture/options.ts';
import { oneNumber } from '../numbers.ts';

/** What a person may say of a film on the command line. */
export interface FilmWishes {
  film?: string;
  seconds?: number;
  fps?: number;
  field?: number;
  view?: string;
  transparent?: true;
}

export const addFilmOptions = (command: Command): Command =>
  command
    .option('--film <kind>', `film instead of a picture: ${FILM_KINDS.join(', ')}`)
    .option('--seconds <n>', 'how long the film lasts (12 if not given)', oneNumber('--seconds'))
    .option('--fps <n>', 'frames a second (30 if not given)', oneNumber('--fps'))
    .option('--field <n>', 'field that a fly-along goes through, from 1', oneNumber('--field'));

/**
 * The film that is wished for; null where a picture is.
 * @throws Refusal ('use') for what belongs to the other of the two
 */
export function filmOf(format: PictureJob['format'], wishes: FilmWishes): FilmOptions | null {
  const { film, seconds, fps, field, view, transparent } = wishes;
  if (!isFilmFormat(format)) {
    const given = Object.entries({ film, seconds, fps, field }).find(([, value]) => value !== undefined);
    if (given)
      throw new Refusal(
        `--${given[0]} is for films: give a name that ends in .webm or .mp4 with it, or leave it out.`,
        'use',
      );
    return null;
  }
  if (film === undefined)
    throw new Refusal(`A .${format} is a film: say which with --film ${FILM_KINDS.join(', ')}.`, 'use');
  if (!FILM_KINDS.some((kind) => kind === film))
    throw new Refusal(`--film is "${film}", expected ${FILM_KINDS.join(', ')}.`, 'use');
  if (view !== undefined)
    throw new Refusal(`--view came with --film ${film}, which has its own: leave --view out.`, 'use');
  if (transparent === true) throw new Refusal('Films have no clear ground: leave --transparent out.', 'use');
  if (field !== undefined && film !== 'fly-along')
    throw new Refusal('--field says what a fly-along goes through: leave it out.', 'use');
  return filmOptions({ kind: film, seconds, framesPerSecond: fps, field });
}

/** How much work a film is, in a sentence. */
export const filmWork = (
  film: FilmOptions,
  { widthPx, heightPx }: PictureOptions,
  neededBytes: number,
): string =>
  `${filmFrames(film)} frames of ${widthPx} x ${heightPx} pixels, with about ${memoryText(neededBytes)} of memory.`;
