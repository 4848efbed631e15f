import { describe, expect, it } from 'vitest';
import { shellColours } from '../../../renderer/colour/shellColours.ts';
import {
  colourIndex,
  palette,
  shellIndex,
  shellIndexer,
  UNKNOWN,
} from '../../../renderer/cone/points/colouring.ts';
import { EvenOrder, evenStep } from '../../../renderer/cone/points/evenOrder.ts';
import { crowding, discLight, exposure, pointSizePx } from '../../../renderer/cone/points/exposure.ts';
import { PointStore } from '../../../renderer/cone/points/pointStore.ts';
import { fillRadius, mixTables, radiusAt, radiusTable } from '../../../renderer/cone/points/radiusTable.ts';
import { PAD, softDiscs, strideOf, sumsLength } from '../../../renderer/cone/points/software/splat.ts';
import { toneRows } from '../../../renderer/cone/points/software/toneRows.ts';
import {
  LIGHT_STEPS,
  lightIndex,
  lightOfIndex,
  strength,
  type Tone,
  toneTable,
  VALUE_STEPS,
} from '../../../renderer/cone/points/tone.ts';

function build(galaxies: Parameters<typeof PointStore.build>[0], centres: number[]): PointStore {
  const table = radiusTable([0, 100], [0, 100]);
  const steps = PointStore.build(galaxies, centres, table, {
    base: 64,
    allocate: (layout) => new ArrayBuffer(layout.end),
    rows: (slots) => new Uint32Array(slots),
  });
  for (;;) {
    const step = steps.next();
    if (step.done) return step.value;
  }
}

describe('the even order', () => {
  it('gives every row one slot', () => {
    for (const count of [0, 1, 5, 2048, 2049, 100_003]) {
      const seen = new Uint8Array(count);
      new EvenOrder(count).forEach(0, count, (slot, row) => {
        expect(slot).toBeLessThan(count);
        seen[row]!++;
      });
      expect(seen.every((n) => n === 1)).toBe(true);
    }
  });

  it('makes every start an even sample', () => {
    const count = 400_000;
    const order = new EvenOrder(count);
    for (const share of [0.1, 0.25, 0.5]) {
      const tenths = new Float64Array(10);
      order.forEach(0, share * count, (_, row) => tenths[Math.floor((10 * row) / count)]!++);
      // The last of the 20 or more chunks may be cut: its rows are the only uneven ones.
      for (const n of tenths) expect(Math.abs(n / ((share * count) / 10) - 1)).toBeLessThan(0.06);
    }
  });

  it('can be asked in pieces', () => {
    const order = new EvenOrder(70_000);
    const whole: number[] = [];
    order.forEach(0, 70_000, (_, row) => whole.push(row));
    const pieces: number[] = [];
    for (let from = 0; from < 70_000; from += 9999) {
      order.forEach(from, Math.min(70_000, from + 9999), (_, row) => pieces.push(row));
    }
    expect(pieces).toEqual(whole);
  });

  it('steps by a number without common divisor', () => {
    expect(evenStep(1)).toBe(1);
    expect(evenStep(12)).toBe(7);
    expect(evenStep(31)).toBe(19);
  });
});

describe('the store of points', () => {
  const raDeg = Float64Array.from([10, 200, 11, 201, 12, 10.5]);
  const decDeg = Float64Array.from([0, 5, 1, 6, -1, 0.5]);
  const comovingMpc = Float64Array.from([10, 20, 30, 40, 50, 60]);
  const galaxies = { count: 6, directions: { raDeg, decDeg }, comovingMpc };
  const centres = [0.98, 0.17, 0, -0.94, -0.34, 0.09];

  it('puts each galaxy into the field whose centre is nearest, and remembers its row', () => {
    const store = build(galaxies, centres);
    expect(store.ranges.map((range) => range.count)).toEqual([4, 2]);
    const rows = store.ranges.map(({ start, count }) =>
      [...store.rows.subarray(start, start + count)].sort(),
    );
    expect(rows).toEqual([
      [0, 2, 4, 5],
      [1, 3],
    ]);
    for (const { start, count } of store.ranges) {
      for (let s = start; s < start + count; s++) {
        expect(store.arrays.comoving[s]).toBe(comovingMpc[store.rows[s]!]);
        expect(store.arrays.radius[s]).toBeCloseTo(comovingMpc[store.rows[s]!]! / 100, 6);
        const { x, y, z } = store.arrays;
        expect(Math.hypot(x[s]!, y[s]!, z[s]!)).toBeCloseTo(1, 6);
      }
    }
  });

  it('starts fields at groups of four and fills the gaps with nothing', () => {
    const store = build(galaxies, centres);
    expect(store.layout.slots).toBe(8);
    expect([...store.arrays.radius.subarray(6, 8)].every(Number.isNaN)).toBe(true);
  });

  it('takes unit vectors as they are', () => {
    const unit = { x: Float32Array.of(1), y: Float32Array.of(0), z: Float32Array.of(0) };
    const store = build({ count: 1, directions: unit, comovingMpc: Float32Array.of(50) }, []);
    expect(store.arrays.x[0]).toBe(1);
    expect(store.arrays.radius[0]).toBeCloseTo(0.5, 6);
  });
});

describe('the table of radii', () => {
  // z against comoving distance is bent: a square root stands in for it here.
  const mpc = Float64Array.from({ length: 400 }, (_, i) => (i / 399) ** 2 * 5000);
  const radius = mpc.map((d) => Math.sqrt(d + 1) - 1);
  const table = radiusTable(mpc, radius);

  it('reads the given table, scaled to 1 at its end', () => {
    expect(radiusAt(table, 0)).toBe(0);
    expect(radiusAt(table, 5000)).toBeCloseTo(1, 6);
    for (const d of [100, 777, 3000]) {
      // Straight pieces of a grid of 4096: a few parts in 100 000 on this curve.
      expect(radiusAt(table, d)).toBeCloseTo((Math.sqrt(d + 1) - 1) / radius[399]!, 4);
    }
  });

  it('rises, and fills arrays as it reads single values', () => {
    const comoving = Float32Array.from([5, 50, 500, 4999, Number.NaN]);
    const out = new Float32Array(5);
    fillRadius(table, comoving, out, 0, 5);
    for (let i = 0; i < 4; i++) expect(out[i]).toBeCloseTo(radiusAt(table, comoving[i]!), 6);
    expect(out[4]).toBeNaN();
    for (let i = 1; i < table.values.length; i++) {
      expect(table.values[i]!).toBeGreaterThanOrEqual(table.values[i - 1]!);
    }
  });

  it('mixes with another, also one that ends elsewhere', () => {
    const other = radiusTable([0, 6000], [0, 6000]);
    const half = mixTables(table, other, 0.5);
    for (const d of [10, 1000, 4000]) {
      expect(radiusAt(half, d)).toBeCloseTo((radiusAt(table, d) + radiusAt(other, d)) / 2, 3);
    }
    expect(mixTables(table, other, 0)).toBe(table);
    expect(mixTables(table, other, 1)).toBe(other);
  });
});

describe('light and tone', () => {
  const tone: Tone = {
    background: [12, 16, 22],
    colours: Uint8Array.from({ length: 768 }, (_, i) => (i * 7) % 256),
    stretch: 'asinh',
    full: 50,
    single: 1,
    glow: [255, 250, 240],
    glowShare: 0.65,
  };
  const table = toneTable(tone, new Uint32Array(VALUE_STEPS * LIGHT_STEPS));

  it('indexes light by its float so that the step holds it', () => {
    const floats = new Float32Array(1);
    const bits = new Uint32Array(floats.buffer);
    for (let light = 0.002; light < 4e6; light *= 1.31) {
      floats[0] = light;
      const middle = lightOfIndex(lightIndex(bits[0]!));
      // 32 steps an octave: the middle is within half a step.
      expect(Math.abs(middle / floats[0]! - 1)).toBeLessThan(1 / 60);
    }
    expect(lightIndex(0)).toBe(0);
  });

  it.each(['linear', 'squareRoot', 'logarithmic', 'asinh'] as const)(
    'rises from 0 to 1 in the %s stretch',
    (stretch) => {
      expect(strength(0, stretch, 1, 50)).toBe(0);
      expect(strength(50, stretch, 1, 50)).toBeCloseTo(1, 12);
      expect(strength(5000, stretch, 1, 50)).toBe(1);
      for (let light = 0.1; light < 50; light *= 1.3) {
        expect(strength(light * 1.3, stretch, 1, 50)).toBeGreaterThanOrEqual(strength(light, stretch, 1, 50));
      }
    },
  );

  it('leaves bare ground where there is no light', () => {
    expect(table[0]! >>> 0).toBe(0xff16100c);
    expect(table[5 * LIGHT_STEPS]! >>> 0).toBe(0xff16100c);
  });

  it('tones the sums of all workers pixel by pixel', () => {
    const [width, height] = [6, 4];
    const sums = [0, 1].map(() => new Float32Array(sumsLength(width, height)));
    const at = (x: number, y: number): number => 2 * ((y + PAD) * strideOf(width) + x + PAD);
    sums[0]![at(2, 1)] = 3;
    sums[0]![at(2, 1) + 1] = 3 * 0.5;
    sums[1]![at(2, 1)] = 5;
    sums[1]![at(2, 1) + 1] = 5 * 1;
    sums[1]![at(5, 3)] = 7;
    const image = new Uint32Array(width * height);
    toneRows(sums, table, image, width, 0, height);
    const bits = (v: number): number => new Uint32Array(Float32Array.of(v).buffer)[0]!;
    const mean = Math.floor(((1.5 + 5) / 8) * (VALUE_STEPS - 1) + 0.5);
    expect(image[1 * width + 2]).toBe(table[mean * LIGHT_STEPS + lightIndex(bits(8))]);
    expect(image[3 * width + 5]).toBe(table[lightIndex(bits(7))]);
    expect(image.filter((pixel) => pixel === table[0])).toHaveLength(width * height - 2);
  });

  it('draws round discs, however wide they are wished', () => {
    for (const diameter of [9, 32, 79, 300]) {
      const { side, discs } = softDiscs(diameter);
      expect(side).toBeLessThanOrEqual(PAD);
      // Where the square ends there is next to no light: e^-4.5 is 0.011, and a quarter of a pixel more.
      const first = discs.slice(0, side * side);
      const border = first.filter((_, i) => i < side || i % side === 0);
      expect(Math.max(...border)).toBeLessThan(0.03);
      expect(Math.max(...first)).toBeGreaterThan(0.9);
    }
  });

  it('knows the light of a disc', () => {
    // To the widest: a few galaxies at four times their size, on a screen of two pixels a CSS pixel.
    for (const diameter of [2.4, 4, 9, 16, 32, 80]) {
      const { discs } = softDiscs(diameter);
      const mean = discs.reduce((a, b) => a + b, 0) / 16;
      // Mean over the places between pixels; the square holds a little more than the circle, e^-4.5 of the light.
      expect(Math.abs(mean / discLight(diameter) - 1)).toBeLessThan(0.03);
    }
    expect(discLight(1)).toBe(1);
  });

  it('counts how crowded the stage is, and exposes for it', () => {
    const raDeg = Float64Array.from({ length: 3000 }, (_, i) => (i % 100) * 0.1);
    const galaxies = {
      count: 3000,
      directions: { raDeg, decDeg: raDeg.map((_, i) => Math.floor(i / 100) * 0.1) },
      comovingMpc: new Float64Array(3000).fill(100),
    };
    const store = build(galaxies, []);
    const matrix = Float64Array.from([0, 2000, 0, 100, 0, 0, 2000, 100, 0, 0, 0, 1]);
    const parts = [{ matrix, range: store.ranges[0]!, depth: null }];
    const crowd = crowding(store.arrays, parts, { widthPx: 800, heightPx: 400 });
    expect(crowd.onStage).toBe(3000);
    // A grid of 3.49 pixels: one galaxy in 12.2 square pixels.
    expect(crowd.densestPerPixel).toBeGreaterThan(0.08);
    expect(crowd.densestPerPixel).toBeLessThan(0.16);
    const { full, single } = exposure(crowd, 1, 3);
    expect(single).toBe(1);
    expect(full).toBeGreaterThanOrEqual(1.6);
    const sizes = [12, 4000, 60_000, 1e6, 1e7].map((n) => pointSizePx(n, { widthPx: 1280, heightPx: 500 }));
    for (let i = 1; i < sizes.length; i++) expect(sizes[i]!).toBeLessThanOrEqual(sizes[i - 1]!);
    expect(sizes.at(-1)).toBe(1);
    // Crowded together on a part of the stage they are drawn smaller, sparse ones are not.
    const stage = { widthPx: 1280, heightPx: 500 };
    expect(pointSizePx(60_000, stage, 1)).toBeLessThan(pointSizePx(60_000, stage));
    expect(pointSizePx(60_000, stage, 0.01)).toBe(pointSizePx(60_000, stage));
  });
});

describe('colour indices', () => {
  it('read values between two ends', () => {
    expect(colourIndex(0.5, 0, 1)).toBe(2 + Math.round(253 / 2));
    expect(colourIndex(-3, 0, 1)).toBe(2);
    expect(colourIndex(7, 0, 1)).toBe(255);
    expect(colourIndex(18, 20, 10)).toBe(2 + Math.round(253 / 5));
  });

  it('keep what is not known apart, grey', () => {
    expect(colourIndex(Number.NaN, 0, 1)).toBe(UNKNOWN);
    const bytes = palette(
      { kind: 'values', values: Float32Array.of(), from: 0, to: 1, map: 'harbour' },
      0,
      'dark',
    );
    const [r, g, b] = bytes.subarray(3 * UNKNOWN, 3 * UNKNOWN + 3);
    expect(Math.max(r!, g!, b!) - Math.min(r!, g!, b!)).toBeLessThan(16);
    // The lowest value's step of the tone table is not the unknown's.
    expect(Math.round((colourIndex(0, 0, 1) / 255) * (VALUE_STEPS - 1))).toBeGreaterThan(0);
  });

  it('find the shell of a distance, its far edge outside but for the last', () => {
    const shell = (comovingMinMpc: number, comovingMaxMpc: number) => ({
      comovingMinMpc,
      comovingMaxMpc,
      label: '',
    });
    const index = shellIndexer([shell(10, 20), shell(20, 30), shell(40, 50)]);
    expect(index(5)).toBe(0);
    expect(index(10)).toBe(shellIndex(0, 3));
    expect(index(20)).toBe(shellIndex(1, 3));
    expect(index(49)).toBe(shellIndex(2, 3));
    expect(index(50)).toBe(shellIndex(2, 3));
    expect(index(51)).toBe(255);
    const gap = index(35);
    expect(gap).toBeGreaterThan(shellIndex(1, 3));
    expect(gap).toBeLessThan(shellIndex(2, 3));
  });

  it("have the shells' own colours", () => {
    const bytes = palette({ kind: 'shell' }, 4, 'dark');
    for (const [i, colour] of shellColours(4, 'dark').entries()) {
      const at = 3 * shellIndex(i, 4);
      expect([...bytes.subarray(at, at + 3)]).toEqual([...colour]);
    }
  });

  it('turn round when the map is reversed', () => {
    const plain = palette({ kind: 'radius', map: 'heath' }, 0, 'dark');
    const back = palette({ kind: 'radius', map: 'heath', reversed: true }, 0, 'dark');
    expect([...back.subarray(3 * 55, 3 * 56)]).toEqual([...plain.subarray(3 * 200, 3 * 201)]);
    expect([...back.subarray(765)]).not.toEqual([...plain.subarray(765)]);
  });
});
