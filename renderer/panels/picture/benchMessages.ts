import type { PictureFormat } from '../../../shared-core/picture/job.ts';
import type { PictureOptions } from '../../../shared-core/picture/options.ts';
import type { PictureFacts } from '../../picture/numbers.ts';

/** What the bench asks its worker. Facts come first, and again whenever they change. */
export type BenchRequest =
  | { readonly kind: 'facts'; readonly facts: Omit<PictureFacts, 'fingerprint'> }
  | {
      readonly kind: 'preview';
      readonly id: number;
      readonly options: PictureOptions;
      /** Pixels that the preview may take, of the screen. */
      readonly room: readonly [widthPx: number, heightPx: number];
    }
  | {
      readonly kind: 'export';
      readonly id: number;
      readonly format: PictureFormat;
      readonly options: PictureOptions;
    }
  /** The piece has been taken: the next may come. */
  | { readonly kind: 'more'; readonly id: number }
  | { readonly kind: 'cancel'; readonly id: number };

/** The picture as it will be exported, at a size that fits the screen. */
export interface PicturePreview {
  readonly png: Uint8Array<ArrayBuffer>;
  /** The picture in words. */
  readonly description: string;
  /** The caption that tells what a reader must know. */
  readonly offeredCaption: string;
  /** Why this picture cannot be a PDF; null when it can. */
  readonly pdfTrouble: string | null;
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
