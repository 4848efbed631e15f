import type { PointLayout } from '../pointArrays.ts';
import type { Tone } from '../tone.ts';

/** Bytes at the start of the points' memory that are not points: the table of tones, then scratch for each worker. */
export const RESERVED_BYTES = 4194304;
export const TABLE_AT = 64;
export const SCRATCH_AT = 655360;
/** Each has scratch of its own. */
export const MOST_WORKERS = 4;
/** A counter of workers that have splatted their share: the tones begin when all have. */
export const BARRIER_AT = 16;

/** A run of slots to be splatted with one matrix; start is a multiple of four. */
export interface Run {
  readonly from: number;
  readonly to: number;
  readonly matrix: Float32Array;
  readonly light: number;
  /** Splat's depth and least. */
  readonly depth: Float32Array | null;
  readonly least: number;
}

/** How a worker finishes its part of a picture once all points are in. */
export interface Finish {
  readonly rows: readonly [from: number, to: number];
  /** Byte offsets of all sums to be added up, and of the picture; not used by a worker with its own memory. */
  readonly allSumsAt: readonly number[];
  readonly imageAt: number;
  /** Workers to wait for. */
  readonly hands: number;
  /** The tone whose table this worker makes, when it changed. */
  readonly tone: Tone | null;
}

/** What the page says to a splat worker. Every message with an id is answered by one with the same id. */
export type ToWorker =
  /** Shared memory with the points in it; the worker's scratch begins at scratchAt. */
  | {
      readonly kind: 'shared';
      readonly id: number;
      readonly memory: WebAssembly.Memory;
      readonly layout: PointLayout;
      readonly scratchAt: number;
      readonly wide: boolean;
    }
  /** No shared memory: the worker makes its own for so many slots. */
  | { readonly kind: 'own'; readonly id: number; readonly slots: number; readonly wide: boolean }
  /** Points for the worker's own memory, slots from `at`; an array that is absent stays as it is. */
  | {
      readonly kind: 'fill';
      readonly id: number;
      readonly at: number;
      readonly x?: Float32Array;
      readonly y?: Float32Array;
      readonly z?: Float32Array;
      readonly radius?: Float32Array;
      readonly value?: Uint8Array;
    }
  | {
      readonly kind: 'draw';
      readonly id: number;
      readonly runs: readonly Run[];
      readonly width: number;
      readonly height: number;
      readonly diameter: number;
      readonly emphasis: readonly [min: number, max: number, dim: number];
      /** Byte offset of this worker's sums; the worker's own choice when it has its own memory. */
      readonly sumsAt: number;
      /** Begin anew rather than add to what is there. */
      readonly clear: boolean;
      /** With the last part of a picture: finish it. */
      readonly finish: Finish | null;
    }
  | {
      readonly kind: 'pick';
      readonly id: number;
      readonly runs: readonly Run[];
      readonly xPx: number;
      readonly yPx: number;
      readonly reachPx: number;
    };

export type FromWorker =
  | { readonly kind: 'done'; readonly id: number; readonly wide?: boolean; readonly milliseconds?: number }
  /** The finished picture, from a worker with its own memory. */
  | {
      readonly kind: 'image';
      readonly id: number;
      readonly image: Uint32Array<ArrayBuffer>;
      readonly milliseconds: number;
    }
  | {
      readonly kind: 'hit';
      readonly id: number;
      readonly hit: { slot: number; distance2: number; xPx: number; yPx: number } | null;
    }
  | { readonly kind: 'failed'; readonly id: number; readonly reason: string };
