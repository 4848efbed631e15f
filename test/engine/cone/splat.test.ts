import { describe, expect, it } from 'vitest';
import { pointLayout, pointViews } from '../../../renderer/cone/points/pointArrays.ts';
import { MOST_WORKERS, RESERVED_BYTES, SCRATCH_AT } from '../../../renderer/cone/points/software/messages.ts';
import {
  PAD,
  type Splat,
  softDiscs,
  splat,
  strideOf,
  sumsLength,
} from '../../../renderer/cone/points/software/splat.ts';
import { toneRows } from '../../../renderer/cone/points/software/toneRows.ts';
import { SCRATCH_BYTES, wideKernel } from '../../../renderer/cone/points/software/wideKernel.ts';
import { LIGHT_STEPS, toneTable, VALUE_STEPS } from '../../../renderer/cone/points/tone.ts';

const WIDTH = 160;
const HEIGHT = 90;
const SLOTS = 6000;

/** Seeded numbers 0..1. */
function seeded(seed: number): () => number {
  let a = seed >>> 0;
  return () => {
    a = (a * 1664525 + 1013904223) >>> 0;
    return a / 4294967296;
  };
}

/** A memory with points in all directions, some beyond the picture, some empty slots, and room for the sums. */
function scene(shared: boolean) {
  const layout = pointLayout(SLOTS, RESERVED_BYTES);
  const sumsAt = Math.ceil(layout.end / 16) * 16;
  const bytes = sumsAt + 4 * sumsLength(WIDTH, HEIGHT);
  const pages = Math.ceil(bytes / 65536);
  const memory = shared
    ? new WebAssembly.Memory({ initial: pages, maximum: pages, shared: true })
    : new WebAssembly.Memory({ initial: pages });
  const points = pointViews(memory.buffer, layout);
  const random = seeded(20);
  for (let s = 0; s < SLOTS; s++) {
    const z = 2 * random() - 1;
    const angle = 2 * Math.PI * random();
    points.x[s] = Math.sqrt(1 - z * z) * Math.cos(angle);
    points.y[s] = Math.sqrt(1 - z * z) * Math.sin(angle);
    points.z[s] = z;
    points.radius[s] = s % 97 === 0 ? Number.NaN : random();
    points.value[s] = Math.floor(256 * random());
  }
  const sums = new Float32Array(memory.buffer, sumsAt, sumsLength(WIDTH, HEIGHT));
  return { memory, layout, points, sums, sumsAt };
}

function how(diameter: number, perspective: number): Splat {
  const s = 70;
  const w = [0, 0.3 * perspective, perspective, 1];
  return {
    matrix: Float32Array.from([
      ...[s, 3, 0, 0].map((v, i) => v + (WIDTH / 2) * w[i]!),
      ...[1, -s, 5, 0].map((v, i) => v + (HEIGHT / 2) * w[i]!),
      ...w,
    ]),
    width: WIDTH,
    height: HEIGHT,
    light: 1.7,
    emphasisMin: 0.4,
    emphasisMax: 0.7,
    dim: 0.3,
    depth: null,
    least: 1,
    ...softDiscs(diameter),
  };
}

describe('the splat', () => {
  it('puts one galaxy into the pixel that holds it', () => {
    const layout = pointLayout(4, 0);
    const points = pointViews(new ArrayBuffer(layout.end), layout);
    points.radius.fill(Number.NaN);
    points.x[0] = 1;
    points.radius[0] = 1;
    points.value[0] = 51;
    const sums = new Float32Array(sumsLength(WIDTH, HEIGHT));
    const matrix = Float32Array.from([37.4, 0, 0, 0, 20.9, 0, 0, 0, 0, 0, 0, 1]);
    const plain = { ...how(1, 0), matrix, light: 2, emphasisMin: 0, emphasisMax: 9 };
    splat(points, 0, 4, plain, sums);
    const i = 2 * ((20 + PAD) * strideOf(WIDTH) + 37 + PAD);
    expect(sums[i]).toBe(2);
    expect(sums[i + 1]).toBeCloseTo((2 * 51) / 255, 6);
    expect(sums.reduce((a, b) => a + b, 0)).toBeCloseTo(2 + (2 * 51) / 255, 5);
  });

  it('spreads a disc about the galaxy, its light centred there', () => {
    const layout = pointLayout(4, 0);
    const points = pointViews(new ArrayBuffer(layout.end), layout);
    points.radius.fill(Number.NaN);
    points.x[0] = 1;
    points.radius[0] = 1;
    for (const [x, y] of [
      [40.13, 30.62],
      [80.5, 45.5],
      [12.99, 9.01],
    ] as const) {
      const sums = new Float32Array(sumsLength(WIDTH, HEIGHT));
      const matrix = Float32Array.from([x, 0, 0, 0, y, 0, 0, 0, 0, 0, 0, 1]);
      splat(points, 0, 4, { ...how(6, 0), matrix, emphasisMin: 0, emphasisMax: 9 }, sums);
      let [total, sx, sy] = [0, 0, 0];
      for (let p = 0; p < sums.length / 2; p++) {
        total += sums[2 * p]!;
        sx += sums[2 * p]! * ((p % strideOf(WIDTH)) - PAD + 0.5);
        sy += sums[2 * p]! * (Math.floor(p / strideOf(WIDTH)) - PAD + 0.5);
      }
      // Quarters of a pixel: the centre is right to an eighth, and the soft rim is cut at the square.
      expect(Math.abs(sx / total - x)).toBeLessThan(0.14);
      expect(Math.abs(sy / total - y)).toBeLessThan(0.14);
    }
  });

  it('gives each place its part of the light by depth, within its ends', () => {
    const layout = pointLayout(4, 0);
    const points = pointViews(new ArrayBuffer(layout.end), layout);
    points.radius.fill(1);
    points.x.set([0, 0.25, 0.5, 1]);
    const sums = new Float32Array(sumsLength(WIDTH, HEIGHT));
    // A pixel each, ten apart; light 1.25 - 1.5 x, kept within 0.2 and 1: exact in binary but for the least.
    const matrix = Float32Array.from([40, 0, 0, 5, 0, 0, 0, 5, 0, 0, 0, 1]);
    const depth = Float32Array.from([-1.5, 0, 0, 1.25]);
    const whole = { emphasisMin: 0, emphasisMax: 9, light: 1, depth, least: 0.2 };
    splat(points, 0, 4, { ...how(1, 0), matrix, ...whole }, sums);
    const at = (px: number): number => sums[2 * ((5 + PAD) * strideOf(WIDTH) + px + PAD)]!;
    expect([at(5), at(15), at(25), at(45)]).toEqual([1, 0.875, 0.5, Math.fround(0.2)]);
  });

  for (const shared of [false, true]) {
    for (const [name, diameter, perspective, depth] of [
      ['single pixels', 1, 0],
      ['discs', 3.2, 0],
      ['large discs', 12, 0],
      ['the largest discs', 80, 0],
      ['single pixels in perspective', 1, 0.7],
      ['discs in perspective', 5, 0.7],
      ['single pixels with a depth cue', 1, 0.7, [-0.4, 0.2, 0.5, 0.6]],
      ['discs with a depth cue', 4, 0, [0.9, 0.3, -0.4, 0.5]],
    ] as const) {
      it(`sums alike in WebAssembly and JavaScript, ${shared ? 'shared' : 'own'} memory: ${name}`, async () => {
        const { memory, layout, points, sums, sumsAt } = scene(shared);
        const wide = await wideKernel(memory, shared, layout, SCRATCH_AT);
        expect(wide).not.toBeNull();
        const cue = depth ? { depth: Float32Array.from(depth), least: 0.25 } : {};
        const settings = { ...how(diameter, perspective), ...cue };
        wide!.splat(0, SLOTS, settings, sumsAt);
        const reference = new Float32Array(sumsLength(WIDTH, HEIGHT));
        splat(points, 0, SLOTS, settings, reference);
        expect(reference.some((v) => v > 0)).toBe(true);
        // The same 32-bit operations in the same order: equal to the last bit.
        expect(sums.every((v, i) => v === reference[i])).toBe(true);
      });
    }
  }

  it.each([false, true])('tones alike in WebAssembly and JavaScript (shared memory: %s)', async (shared) => {
    const [width, height] = [77, 31];
    const tableAt = 65536;
    const length = sumsLength(width, height);
    const sumsAt = [0, 1, 2].map(
      (i) => tableAt + 4 * VALUE_STEPS * LIGHT_STEPS + 64 * Math.ceil((4 * length * i) / 64),
    );
    const imageAt = sumsAt[2]! + 64 * Math.ceil((4 * length) / 64);
    const pages = Math.ceil((imageAt + 4 * width * height) / 65536);
    const memory = shared
      ? new WebAssembly.Memory({ initial: pages, maximum: pages, shared: true })
      : new WebAssembly.Memory({ initial: pages });
    const wide = await wideKernel(memory, shared, pointLayout(4, 0), 1024);
    const table = new Uint32Array(memory.buffer, tableAt, VALUE_STEPS * LIGHT_STEPS);
    toneTable(
      {
        background: [9, 8, 7],
        colours: Uint8Array.from({ length: 768 }, (_, i) => (i * 13) % 256),
        stretch: 'logarithmic',
        full: 40,
        single: 1,
        glow: [255, 255, 255],
        glowShare: 0.65,
      },
      table,
    );
    const random = seeded(5);
    const sums = sumsAt.map((at) => new Float32Array(memory.buffer, at, length));
    for (const part of sums) {
      for (let i = 0; i < length; i += 2) {
        // Bare pixels, tiny and huge sums, and all between.
        const light = random() < 0.4 ? 0 : 10 ** (8 * random() - 4);
        part[i] = light;
        part[i + 1] = light * random();
      }
    }
    const copies = sums.map((part) => Float32Array.from(part));
    const reference = new Uint32Array(width * height);
    toneRows(copies, Uint32Array.from(table), reference, width, 0, height);
    wide!.toneRows(sumsAt, tableAt, imageAt, width, 0, 13);
    wide!.toneRows(sumsAt, tableAt, imageAt, width, 13, height);
    const image = new Uint32Array(memory.buffer, imageAt, width * height);
    expect(image.every((pixel, i) => pixel === reference[i])).toBe(true);
    expect(new Set(image).size).toBeGreaterThan(100);
    // The picture's part of the sums is left at zero by both.
    for (const set of [sums, copies]) {
      for (const part of set) {
        for (let row = 0; row < height; row++) {
          const start = 2 * ((row + PAD) * strideOf(width) + PAD);
          expect(part.subarray(start, start + 2 * width).every((v) => v === 0)).toBe(true);
        }
      }
    }
  });

  it('has scratch for the largest disc of every worker below the points', () => {
    expect(SCRATCH_AT + MOST_WORKERS * (SCRATCH_BYTES + 64)).toBeLessThanOrEqual(RESERVED_BYTES);
  });
});
