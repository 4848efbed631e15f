import fc from 'fast-check';
import { expect, it } from 'vitest';
import { pointTiles, type Tile } from '../../../renderer/picture/galaxies/tilePoints.ts';
import type { ScenePoints } from '../../../renderer/picture/scene.ts';
import { createRandom } from '../../../shared-core/numerics/random.ts';

/** Galaxies in a crowd, some beyond the picture's borders and some nowhere. */
function crowd(count: number, more: Partial<ScenePoints> = {}): ScenePoints {
  const random = createRandom(7);
  const x = Float32Array.from({ length: count }, () => random.uniform() * 120 - 10);
  const y = Float32Array.from({ length: count }, () => random.uniform() * 120 - 10);
  x[3] = Number.NaN;
  y[3] = Number.NaN;
  return {
    count,
    x,
    y,
    value: Uint8Array.from({ length: count }, (_, i) => i % 256),
    light: null,
    colours: Uint8Array.from({ length: 768 }, (_, i) => (i * 7) % 256),
    stretch: 'asinh',
    exposureStops: 0,
    glow: [255, 250, 240],
    glowShare: 0.65,
    diameter: 2.5,
    densest: 0.4,
    thinnest: 0.02,
    ...more,
  };
}

const same = (a: Uint8ClampedArray, b: Uint8ClampedArray): boolean => Buffer.from(a).equals(Buffer.from(b));

/** The picture put together from tiles of a size. */
function assembled(points: ScenePoints, pxPerUnit: number, side: number, width: number, height: number) {
  const tiles = pointTiles(points, pxPerUnit);
  const out = new Uint8ClampedArray(width * height * 4);
  for (let top = 0; top < height; top += side)
    for (let left = 0; left < width; left += width) {
      const tile: Tile = { left, top, width, height: Math.min(side, height - top) };
      out.set(tiles.render(tile), top * width * 4);
    }
  return out;
}

it('gives the same pixels in one tile or in many, rows and columns alike', () => {
  const points = crowd(4000);
  const [width, height] = [173, 141];
  const whole = pointTiles(points, 1.37).render({ left: 0, top: 0, width, height });
  expect(whole.some((byte) => byte > 0)).toBe(true);
  fc.assert(
    fc.property(fc.integer({ min: 1, max: 150 }), (side) => {
      expect(same(assembled(points, 1.37, side, width, height), whole)).toBe(true);
    }),
    { numRuns: 12 },
  );
  const part = pointTiles(points, 1.37).render({ left: 57, top: 31, width: 40, height: 20 });
  for (let row = 0; row < 20; row++) {
    const at = 4 * ((31 + row) * width + 57);
    expect(same(part.subarray(row * 160, row * 160 + 160), whole.subarray(at, at + 160))).toBe(true);
  }
});

it('draws a galaxy where it stands, as bright at every place between pixels', () => {
  const one = (x: number, y: number) =>
    crowd(1, {
      x: Float32Array.of(x),
      y: Float32Array.of(y),
      value: Uint8Array.of(0),
      stretch: 'linear',
      densest: 0,
    });
  const sums: number[] = [];
  for (const shift of [0, 0.13, 0.37, 0.5, 0.81]) {
    const pixels = pointTiles(one(20 + shift, 10 + shift), 2).render({
      left: 0,
      top: 0,
      width: 80,
      height: 40,
    });
    let [sum, sumX, sumY] = [0, 0, 0];
    for (let i = 0; i < pixels.length / 4; i++) {
      const alpha = pixels[4 * i + 3]!;
      sum += alpha;
      sumX += alpha * ((i % 80) + 0.5);
      sumY += alpha * (Math.floor(i / 80) + 0.5);
    }
    // Places are taken to an eighth of half a pixel; bytes round the rest.
    expect(sumX / sum).toBeCloseTo(2 * (20 + shift), 0.9);
    expect(sumY / sum).toBeCloseTo(2 * (10 + shift), 0.9);
    sums.push(sum);
  }
  // Sums of bytes, some forty pixels each rounded by up to a half.
  expect((Math.max(...sums) - Math.min(...sums)) / Math.max(...sums)).toBeLessThan(0.04);
});

it('gives a clear picture for no galaxies', () => {
  const none = crowd(0, { x: new Float32Array(0), y: new Float32Array(0) });
  const pixels = pointTiles({ ...none, count: 0 }, 1).render({ left: 0, top: 0, width: 9, height: 5 });
  expect(pixels.every((byte) => byte === 0)).toBe(true);
});

it('takes a part of the light of the galaxies that have less', () => {
  const two = (light: Float32Array | null) =>
    crowd(2, {
      x: Float32Array.of(10, 30),
      y: Float32Array.of(10, 10),
      value: Uint8Array.of(0, 0),
      light,
      stretch: 'linear',
      exposureStops: -3,
    });
  const shares = (points: ScenePoints): number[] => {
    const pixels = pointTiles(points, 2).render({ left: 0, top: 0, width: 80, height: 40 });
    const sums = [0, 0];
    for (let i = 3; i < pixels.length; i += 4) sums[Math.floor(((i >> 2) % 80) / 40)]! += pixels[i]!;
    return sums;
  };
  const [a, b] = shares(two(null));
  expect(a).toBe(b);
  const [whole, half] = shares(two(Float32Array.of(1, 0.5)));
  expect(whole).toBe(a);
  // Opacity is rounded to bytes, and light to 32 steps an octave.
  expect(half! / whole!).toBeGreaterThan(0.46);
  expect(half! / whole!).toBeLessThan(0.54);
});

it('draws a galaxy round also where a large print makes it wide', () => {
  // One galaxy in the middle, some 720 points of the grid wide.
  const points = {
    ...crowd(1, { diameter: 60, densest: 0, thinnest: 0 }),
    x: Float32Array.of(50),
    y: Float32Array.of(50),
  };
  const side = 600;
  const pixels = pointTiles(points, 6).render({ left: 0, top: 0, width: side, height: side });
  const cover = (x: number, y: number): number => pixels[4 * (y * side + x) + 3]!;
  const middle = side / 2;
  // The same distance across and aslant, well inside, near the border and beyond it.
  for (const r of [50, 100, 150, 250]) {
    const aslant = Math.round(r / Math.SQRT2);
    expect(Math.abs(cover(middle + r, middle) - cover(middle + aslant, middle + aslant))).toBeLessThan(6);
  }
  expect(cover(middle + 100, middle)).toBeGreaterThan(20);
  expect(cover(middle + 250, middle)).toBe(0);
});
