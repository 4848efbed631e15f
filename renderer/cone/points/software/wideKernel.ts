import type { PointLayout } from '../pointArrays.ts';
import { module } from './assembler.ts';
import { PAD, type Splat, strideOf } from './splat.ts';
import { PARAMETER as P, SPLAT } from './splatModule.ts';
import { MERGE, TONE } from './toneModule.ts';

/** The WASM kernel over one memory. */
export interface WideKernel {
  /** splat of splat.ts: slots from..to, both multiples of four; sums at a byte offset of the memory. */
  splat(from: number, to: number, how: Splat, sumsAt: number): void;
  /** toneRows of toneRows.ts: everything at byte offsets of the memory. */
  toneRows(
    sumsAt: readonly number[],
    tableAt: number,
    imageAt: number,
    width: number,
    from: number,
    to: number,
  ): void;
}

interface Exports {
  splat(from: number, to: number, parameters: number): void;
  merge(into: number, from: number, end: number): void;
  tone(at: number, end: number, image: number, table: number): void;
}

/** Bytes of scratch that a kernel needs: parameters and the largest discs with doubled weights. */
export const SCRATCH_BYTES = P.size + 16 * PAD * PAD * 8 + 16;

/**
 * The kernel made ready, or null where WebAssembly or its SIMD is not allowed or not there.
 *
 * @param scratchAt byte offset of SCRATCH_BYTES that only this kernel writes to; a multiple of 16
 */
export async function wideKernel(
  memory: WebAssembly.Memory,
  shared: boolean,
  layout: PointLayout,
  scratchAt: number,
): Promise<WideKernel | null> {
  let code: Exports;
  try {
    const { instance } = await WebAssembly.instantiate(module([SPLAT, MERGE, TONE], shared), {
      env: { memory },
    });
    code = instance.exports as unknown as Exports;
  } catch {
    return null;
  }
  const discsAt = scratchAt + P.size;
  return {
    splat(from, to, how, sumsAt) {
      // The views are made anew: the memory may have grown.
      const floats = new Float32Array(memory.buffer, scratchAt, P.size / 4);
      const words = new Uint32Array(memory.buffer, scratchAt, P.size / 4);
      const half = how.side / 2;
      floats.set(how.matrix, P.matrix / 4);
      floats[P.low / 4] = -half;
      floats[P.right / 4] = how.width + half;
      floats[P.bottom / 4] = how.height + half;
      floats[P.nearest / 4] = 0.02;
      floats[P.full / 4] = how.light;
      floats[P.dimmed / 4] = Math.fround(how.light) * Math.fround(how.dim);
      floats[P.emphasisMin / 4] = how.emphasisMin;
      floats[P.emphasisMax / 4] = how.emphasisMax;
      floats[P.byte / 4] = 1 / 255;
      floats[P.shift / 4] = 0.5 - half;
      floats[P.four / 4] = 4;
      if (how.depth) floats.set(how.depth, P.depth / 4);
      floats[P.least / 4] = how.least;
      floats[P.one / 4] = 1;
      words[P.cued / 4] = how.depth ? 1 : 0;
      const stride = strideOf(how.width);
      words[P.stride / 4] = stride;
      words[P.origin / 4] = PAD * stride + PAD;
      words[P.side / 4] = how.side;
      words[P.discBytes / 4] = how.side * how.side * 8;
      words[P.rowBytes / 4] = stride * 8;
      words[P.x / 4] = layout.x;
      words[P.y / 4] = layout.y;
      words[P.z / 4] = layout.z;
      words[P.radius / 4] = layout.radius;
      words[P.value / 4] = layout.value;
      words[P.sums / 4] = sumsAt;
      words[P.discs / 4] = discsAt;
      if (how.side > 0) {
        const doubled = new Float32Array(memory.buffer, discsAt, 2 * how.discs.length);
        for (let i = 0; i < how.discs.length; i++) doubled[2 * i] = doubled[2 * i + 1] = how.discs[i]!;
      }
      code.splat(from, to, scratchAt);
    },
    toneRows(sumsAt, tableAt, imageAt, width, from, to) {
      const stride = strideOf(width);
      const first = sumsAt[0]!;
      for (let row = from; row < to; row++) {
        const start = 8 * ((row + PAD) * stride + PAD);
        // Two pixels a step: an odd row takes one of the free border along, which nobody looks at.
        const end = start + 16 * Math.ceil(width / 2);
        for (const more of sumsAt.slice(1)) code.merge(first + start, more + start, more + end);
        code.tone(first + start, first + start + 8 * width, imageAt + 4 * row * width, tableAt);
      }
    },
  };
}
