import fc from 'fast-check';
import { describe, expect, it } from 'vitest';
import { pickNear } from '../../../renderer/cone/geometry/pickNear.ts';
import { pickPoint } from '../../../renderer/cone/geometry/pickPoint.ts';
import { pickShell } from '../../../renderer/cone/geometry/pickShell.ts';
import { FRONT, sideOnPose, turned } from '../../../renderer/cone/geometry/poses.ts';
import { prepareField } from '../../../renderer/cone/geometry/preparedField.ts';
import {
  compose,
  modelMatrix,
  type Pose,
  pixelMatrix,
  project,
} from '../../../renderer/cone/geometry/projection.ts';
import { separation } from '../../../renderer/cone/geometry/separation.ts';
import { direction } from '../../../renderer/cone/geometry/vector.ts';
import { pickIndex } from '../../../renderer/cone/points/pickIndex.ts';
import { pointLayout, pointViews } from '../../../renderer/cone/points/pointArrays.ts';
import { boxRing } from './skies.ts';

const VIEWPORT = { widthPx: 800, heightPx: 400 };

describe('picking a galaxy', () => {
  const count = 2000;
  const layout = pointLayout(count, 0);
  const points = pointViews(new ArrayBuffer(layout.end), layout);
  for (let s = 0; s < count; s++) {
    const [x, y, z] = direction(20 * Math.sin(7.1 * s), 10 * Math.cos(3.3 * s));
    points.x[s] = x;
    points.y[s] = y;
    points.z[s] = z;
    points.radius[s] = s % 50 === 0 ? Number.NaN : (s % 97) / 97;
  }
  const pose: Pose = { axes: turned(0.4, 0.2), target: [0.5, 0, 0], unitsPerPixel: 0.002, perspective: 0.4 };
  const matrix = pixelMatrix(pose, VIEWPORT);

  it('finds the nearest of all, as a plain search does', () => {
    for (const [x, y] of [
      [400, 200],
      [300, 180],
      [520, 260],
      [10, 10],
    ] as const) {
      let best = -1;
      let least = 30;
      for (let s = 0; s < count; s++) {
        const r = points.radius[s]!;
        if (Number.isNaN(r)) continue;
        const p = project(matrix, points.x[s]!, points.y[s]!, points.z[s]!, r);
        const d = p ? Math.hypot(p[0] - x, p[1] - y) : Number.POSITIVE_INFINITY;
        if (d < least) [best, least] = [s, d];
      }
      const half = pickPoint(points, matrix, 0, count / 2, x, y, 30);
      const hit = pickPoint(points, matrix, count / 2, count, x, y, 30, half);
      expect(hit?.slot ?? -1).toBe(best);
      if (hit) expect(Math.sqrt(hit.distance2)).toBeCloseTo(least, 4);
    }
  });
});

describe('picking by an index', () => {
  const count = 30_000;
  const layout = pointLayout(count, 0);
  const points = pointViews(new ArrayBuffer(layout.end), layout);
  for (let s = 0; s < count; s++) {
    // Half of them in a field, half on the whole sky; every slot another distance.
    const wide = s % 2 === 0;
    const [x, y, z] = wide
      ? direction((360 * s * 0.618) % 360, 90 * Math.sin(3.1 * s))
      : direction(10 * Math.sin(7.1 * s), 6 * Math.cos(3.3 * s));
    points.x[s] = x;
    points.y[s] = y;
    points.z[s] = z;
    points.comoving[s] = s % 500 === 1 ? Number.NaN : (s * 7919) % count;
    points.radius[s] = points.comoving[s]! / count;
  }
  const steps = pickIndex(points, { start: 0, count }, (length) => new Uint32Array(length));
  let made = steps.next();
  while (!made.done) made = steps.next();
  const index = made.value;

  it('holds every slot once, near to far in its cell', () => {
    expect(Uint32Array.from(index.slots).sort()).toEqual(Uint32Array.from({ length: count }, (_, s) => s));
    expect(index.starts.length - 1).toBeGreaterThan(20);
    for (let cell = 0; cell + 1 < index.starts.length; cell++) {
      const own = index.slots.subarray(index.starts[cell]!, index.starts[cell + 1]!);
      const known = Array.from(own, (s) => points.comoving[s]!).filter((mpc) => !Number.isNaN(mpc));
      expect(known).toEqual(known.toSorted((a, b) => a - b));
    }
  });

  it('finds what a search among all finds', () => {
    // Seeded by the rule of the tests; a pose, a pixel and a reach.
    fc.assert(
      fc.property(
        fc.double({ min: -3, max: 3, noNaN: true }),
        fc.double({ min: -1.5, max: 1.5, noNaN: true }),
        fc.double({ min: 0, max: 0.9, noNaN: true }),
        fc.double({ min: 0, max: 800, noNaN: true }),
        fc.double({ min: 0, max: 400, noNaN: true }),
        fc.double({ min: 0.5, max: 30, noNaN: true }),
        (a, b, perspective, xPx, yPx, reachPx) => {
          const pose: Pose = { axes: turned(a, b), target: [0.4, 0, 0], unitsPerPixel: 0.003, perspective };
          const matrix = pixelMatrix(pose, VIEWPORT);
          const all = pickPoint(points, matrix, 0, count, xPx, yPx, reachPx);
          const near = pickNear(points, index, matrix, xPx, yPx, reachPx);
          expect(near === null).toBe(all === null);
          // The two sum in another order: the same place to a thousandth of a pixel.
          if (all && near)
            expect(Math.abs(Math.sqrt(near.distance2) - Math.sqrt(all.distance2))).toBeLessThan(1e-3);
        },
      ),
      { numRuns: 200 },
    );
  });
});

describe('picking a shell', () => {
  const field = prepareField({
    centreRaDeg: 160,
    centreDecDeg: 4,
    radiusDeg: 11.2,
    positionAngleDeg: 90,
    rings: [boxRing(150, 170, -1, 9)],
  });
  const radii = [
    [0.3, 0.5],
    [0.5, 0.7],
  ] as const;
  const model = modelMatrix(field.frame, 1, 0);
  const pose = sideOnPose(0, 1, VIEWPORT, { leftPx: 0, rightPx: 0 }, 0);
  const pixels = compose(pixelMatrix(pose, VIEWPORT), model);
  const back = compose([...FRONT[2], 0, 0, 0, 0, 0, 0, 0, 0, 0], model);
  const at = (x: number, y: number) => pickShell(field.mesh, pixels, back, radii, x, y)?.shell ?? null;

  it('follows the radius along the axis and misses beside the cone', () => {
    expect(at(0.4 * 800, 200)).toBe(0);
    expect(at(0.6 * 800, 200)).toBe(1);
    expect(at(0.2 * 800, 200)).toBeNull();
    expect(at(0.8 * 800, 200)).toBeNull();
    expect(at(0.6 * 800, 330)).toBeNull();
  });

  it('takes the one in front where they overlap', () => {
    const down: Pose = { ...pose, axes: turned(-Math.PI / 2, 0) };
    const seen = compose(pixelMatrix(down, VIEWPORT), model);
    const nearness = compose([...down.axes[2], 0, 0, 0, 0, 0, 0, 0, 0, 0], model);
    expect(pickShell(field.mesh, seen, nearness, radii, 400, 200)?.shell).toBe(0);
  });
});

describe('the separation of two galaxies', () => {
  it('is across for two at one distance, along for two in one direction', () => {
    const across = separation(
      { raDeg: 10, decDeg: 0, comovingMpc: 1000 },
      { raDeg: 12, decDeg: 0, comovingMpc: 1000 },
    );
    expect(across.totalMpc).toBeCloseTo(2000 * Math.sin(Math.PI / 180), 9);
    expect(across.alongMpc).toBeLessThan(1e-9);
    expect(across.acrossMpc).toBeCloseTo(across.totalMpc, 9);
    expect(across.angleDeg).toBeCloseTo(2, 12);
    const along = separation(
      { raDeg: 77, decDeg: -20, comovingMpc: 900 },
      { raDeg: 77, decDeg: -20, comovingMpc: 1000 },
    );
    expect(along.alongMpc).toBeCloseTo(100, 9);
    // A difference of vectors 1000 Mpc long: rounding of 1e-13 Mpc, under a root.
    expect(along.acrossMpc).toBeLessThan(1e-4);
  });

  it('agrees with the law of cosines, and its parts with its whole', () => {
    const place = fc.record({
      raDeg: fc.double({ min: 0, max: 360, noNaN: true }),
      decDeg: fc.double({ min: -90, max: 90, noNaN: true }),
      comovingMpc: fc.double({ min: 1, max: 9000, noNaN: true }),
    });
    fc.assert(
      fc.property(place, place, (a, b) => {
        const s = separation(a, b);
        const { comovingMpc: p } = a;
        const { comovingMpc: q } = b;
        const law = Math.sqrt((p - q) ** 2 + 4 * p * q * Math.sin((s.angleDeg * Math.PI) / 360) ** 2);
        expect(Math.abs(s.totalMpc - law)).toBeLessThan(1e-6);
        expect(Math.abs(Math.hypot(s.alongMpc, s.acrossMpc) - s.totalMpc)).toBeLessThan(1e-6);
        const other = separation(b, a);
        expect(other.alongMpc).toBeCloseTo(s.alongMpc, 6);
      }),
      { seed: 4 },
    );
  });
});
