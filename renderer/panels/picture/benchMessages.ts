import type { FilmOptions } from '../../../shared-core/picture/film.ts';
import type { DrawnFormat, FilmFormat } from '../../../shared-core/picture/job.ts';
import type { PictureOptions } from '../../../shared-core/picture/options.ts';
import type { PictureFacts } from '../../picture/numbers.ts';

/** What the bench asks its worker. Facts come first, and again whenever they change. */
export type BenchRequest =
  | { readonly kind: 'facts'; readonly facts: Omit<PictureFacts, 'fingerprint'> }
  | {
      readonly kind: 'preview';
      readonly id: number;
      readonly options: PictureOptions;
      /** A film and the frame of it to look at; null for a picture. */
      readonly moment: FilmMoment | null;
      /** Pixels that the preview may take, of the screen. */
      readonly room: readonly [widthPx: number, heightPx: number];
    }
  | {
      readonly kind: 'export';
      readonly id: number;
      readonly format: DrawnFormat;
      readonly options: PictureOptions;
      readonly film: FilmOptions | null;
    }
  /** The piece has been taken: the next may come. */
  | { readonly kind: 'more'; readonly id: number }
  | { readonly kind: 'cancel'; readonly id: number };

export interface FilmMoment {
  readonly film: FilmOptions;
  readonly frame: number;
}

/** What a film's preview tells beside its picture. */
export interface FilmForecast {
  /** Why the browser cannot write a format; null where it can. */
  readonly troubles: Readonly<Record<FilmFormat, string | null>>;
  /** How long a frame takes at the film's own size, guessed from the preview. */
  readonly secondsAFrame: number;
}

/** The picture as it will be exported, at a size that fits the screen. */
export interface PicturePreview {
  readonly png: Uint8Array<ArrayBuffer>;
  /** The picture in words. */
  readonly description: string;
  /** The caption that tells what a reader must know. */
  readonly offeredCaption: string;
  /** Why this picture cannot be a PDF; null when it can. */
  readonly pdfTrouble: string | null;
  /** Null for a picture. */
  readonly forecast: FilmForecast | null;
}

export type BenchAnswer =
  | { readonly kind: 'preview'; readonly id: number; readonly preview: PicturePreview }
  /** A newer wish came before this one was begun. */
  | { readonly kind: 'superseded'; readonly id: number }
  | { readonly kind: 'piece'; readonly id: number; readonly bytes: Uint8Array<ArrayBuffer> }
  | { readonly kind: 'progress'; readonly id: number; readonly fraction: number }
  | { readonly kind: 'done'; readonly id: number }
  | { readonly kind: 'cancelled'; readonly id: number }
  | { readonly kind: 'refused'; readonly id: number; readonly sentence: string };
