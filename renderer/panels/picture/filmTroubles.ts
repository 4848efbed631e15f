import type { FilmFormat } from '../../../shared-core/picture/job.ts';
import { filmEncoding } from '../../picture/film/encoding.ts';
import type { FilmForecast } from './benchMessages.ts';

interface FrameSize {
  readonly widthPx: number;
  readonly heightPx: number;
}

/**
 * Asks the browser which films it can write, once for each size that comes after another: encoders are slow to answer,
 * and each preview asks.
 *
 * @param sentenceFor what is said of a fault
 */
export function askEncoders(
  sentenceFor: (fault: unknown) => string,
): (size: FrameSize, framesPerSecond: number) => Promise<FilmForecast['troubles']> {
  let last: { readonly key: string; readonly troubles: Promise<FilmForecast['troubles']> } | null = null;
  return ({ widthPx, heightPx }, framesPerSecond) => {
    const size = { widthPx, heightPx, framesPerSecond };
    const key = JSON.stringify(size);
    const trouble = (format: FilmFormat) => filmEncoding(format, size).then(() => null, sentenceFor);
    if (last?.key !== key) {
      const both = Promise.all([trouble('webm'), trouble('mp4')]);
      last = { key, troubles: both.then(([webm, mp4]) => ({ webm, mp4 })) };
    }
    return last.troubles;
  };
}
