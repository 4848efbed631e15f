import fc from 'fast-check';
import { describe, expect, it } from 'vitest';
import { compileRegion } from '../../../shared-core/sky/compileRegion.ts';
import { compileShape } from '../../../shared-core/sky/compileShape.ts';
import { estimateFootprint } from '../../../shared-core/sky/estimate.ts';
import type { SkyShape } from '../../../shared-core/sky/region.ts';
import { cross, dot, raDecToUnit, type Vec3 } from '../../../shared-core/sky/vectors.ts';
import { evenPositions, randomShape, region, seeded, starVertices, turned } from './sample.ts';

const compile = (parts: readonly string[], holes: readonly string[] = []) =>
  compileRegion(region(parts, holes));

describe('the boundary belongs to the region', () => {
  it('edges and corners of a box, to the last bit of the catalogue number', () => {
    const box = compile(['box:350.1,10.3,-5.7,20.2']);
    for (const ra of [350.1, 10.3, 0, 360]) {
      for (const dec of [-5.7, 20.2, 1]) expect(box.contains(ra, dec)).toBe(true);
    }
    expect(box.contains(350.1 - 1e-12, 0)).toBe(false);
    expect(box.contains(10.3 + 1e-12, 0)).toBe(false);
    expect(box.contains(0, 20.2 + 1e-12)).toBe(false);
  });

  it('rim of a cap', () => {
    const cap = compile(['cap:30,0,10']);
    expect([cap.contains(40, 0), cap.contains(20, 0), cap.contains(30, 10)]).toEqual([true, true, true]);
    // 1e-9 deg is a hundred times the edge's tolerance.
    expect([cap.contains(40 + 1e-9, 0), cap.contains(30, 10 + 1e-9)]).toEqual([false, false]);
  });

  it('vertices of any polygon, and points along its edges', () => {
    const random = seeded(3);
    for (let round = 0; round < 100; round++) {
      const vertices = starVertices(
        random,
        100 * random(),
        100 * random() - 50,
        3 + Math.floor(10 * random()),
      );
      const shape = compileShape({ kind: 'polygon', verticesDeg: vertices, side: 'smaller' });
      for (const [ra, dec] of vertices) expect(shape.side(((ra % 360) + 360) % 360, dec)).toBe(0);
    }
    const square = compile(['polygon:0,0,10,0,10,10,0,10']);
    for (let k = 0; k <= 100; k++) {
      expect(square.contains(k / 10, 0)).toBe(true);
      expect(square.contains(10, k / 10)).toBe(true);
    }
  });

  it('edges of a hole are in, the inside of the hole is not', () => {
    const ring = compile(['cap:30,0,10'], ['cap:30,0,5']);
    expect(ring.contains(35, 0)).toBe(true);
    expect(ring.contains(34.9999, 0)).toBe(false);
    expect(ring.contains(30, 0)).toBe(false);
  });

  it('a line between two holes, or between a hole and the outside, is not sky', () => {
    const rest = compile(['box:0,30,0,10'], ['box:0,10,0,10', 'box:10,20,0,10']);
    expect(rest.contains(10, 5)).toBe(false);
    expect(rest.contains(0, 5)).toBe(false);
    expect(rest.contains(20, 5)).toBe(true);
    expect(rest.contains(20, 10)).toBe(true);
  });

  it('poles are reached under every RA', () => {
    for (const ra of [0, 77, 200, 359]) {
      expect(compile(['box:0,10,80,90']).contains(ra, 90)).toBe(true);
      expect(compile(['box:0,360,80,90']).contains(ra, 90)).toBe(true);
      expect(compile(['cap:100,-85,5']).contains(ra, -90)).toBe(true);
      expect(compile(['polygon:0,80,120,80,240,80']).contains(ra, 90)).toBe(true);
      expect(compile(['polygon:0,80,90,80,180,80']).contains(ra, 90)).toBe(true);
      expect(compile(['polygon:0,60,120,60,240,60']).contains(ra, -90)).toBe(false);
    }
  });
});

describe('what is no position', () => {
  it('is nowhere', () => {
    const estimate = estimateFootprint([10, 11, 12], [0, 0, 0]);
    const footprints = [
      'sky',
      'box:0,360,-90,90',
      'box:350,10,-5,5',
      'cap:0,0,170',
      'polygon:0,0,50,0,0,50',
    ].map((word) => compile([word]));
    for (const footprint of [...footprints, estimate]) {
      for (const [ra, dec] of [
        [Number.NaN, 0],
        [0, Number.NaN],
        [Number.POSITIVE_INFINITY, 0],
        [0, 90.0001],
        [0, -91],
      ] as const) {
        expect(footprint.contains(ra, dec)).toBe(false);
      }
    }
    expect(() => estimateFootprint([1, Number.NaN], [1, 1])).toThrow(/row 1 is at RA NaN/);
  });
});

describe('point in polygon', () => {
  /** The plain way for convex outlines that run counter-clockwise: left of every edge. */
  const leftOfAll = (vertices: readonly Vec3[], p: Vec3): boolean =>
    vertices.every((a, i) => dot(cross(a, vertices[(i + 1) % vertices.length]!), p) > 0);

  it('agrees with "left of every edge" for convex polygons turned anywhere, also over the poles', () => {
    const random = seeded(17);
    const positions = evenPositions(3000);
    for (let round = 0; round < 60; round++) {
      const radius = 2 + 75 * random();
      const count = 3 + Math.floor(6 * random());
      const [a, b] = [round % 3 === 0 ? Math.PI / 2 : 6.3 * random(), 6.3 * random()];
      // Points of a small circle about the pole, turned away.
      const vertices = Array.from({ length: count }, (_, i) =>
        turned([((i + 0.7 * random()) * 360) / count, 90 - radius], a, b),
      );
      const vectors = vertices.map(([ra, dec]) => raDecToUnit(ra, dec));
      const middle = raDecToUnit(...turned([0, 90], a, b));
      // Vertices bunched on one side leave the middle out; then the outline runs about its own middle still.
      if (!leftOfAll(vectors, middle)) continue;
      const footprint = compileRegion({
        parts: [{ kind: 'polygon', verticesDeg: vertices, side: 'smaller' }],
        holes: [],
      });
      const wrong = positions.filter(
        ([ra, dec]) => footprint.contains(ra, dec) !== leftOfAll(vectors, raDecToUnit(ra, dec)),
      );
      expect(wrong).toEqual([]);
    }
  });

  it('a position and RA plus or minus a turn are the same', () => {
    const random = seeded(5);
    const shapes = Array.from({ length: 20 }, () => randomShape(random));
    for (const shape of shapes) {
      const footprint = compileRegion({ parts: [shape], holes: [] });
      for (const [ra, dec] of evenPositions(200)) {
        const inside = footprint.contains(ra, dec);
        expect(footprint.contains(ra - 360, dec)).toBe(inside);
        expect(footprint.contains(ra + 360, dec)).toBe(inside);
      }
    }
  });

  it('smaller and larger side share the sky', () => {
    fc.assert(
      fc.property(fc.nat(), (seed) => {
        const random = seeded(seed);
        const verticesDeg = starVertices(random, 50, 20, 7);
        const [small, large] = (['smaller', 'larger'] as const).map((side) =>
          compileShape({ kind: 'polygon', verticesDeg, side }),
        );
        for (const [ra, dec] of evenPositions(300)) {
          expect(small!.side(ra, dec) + large!.side(ra, dec)).toBe(0);
        }
      }),
      { numRuns: 30 },
    );
  });
});

describe('many shapes', () => {
  it('an index over hundreds of holes changes no answer', () => {
    const random = seeded(21);
    const holes: SkyShape[] = Array.from({ length: 300 }, () => ({
      kind: 'cap',
      raDeg: 360 * random(),
      decDeg: 180 * random() - 90,
      radiusDeg: 0.1 + 6 * random(),
    }));
    const footprint = compileRegion({ parts: [{ kind: 'wholeSky' }], holes });
    const single = holes.map(compileShape);
    const positions = [...evenPositions(5000), [0, 90] as const, [12, -90] as const];
    const wrong = positions.filter(
      ([ra, dec]) => footprint.contains(ra, dec) !== single.every((hole) => hole.side(ra, dec) <= 0),
    );
    expect(wrong).toEqual([]);
  });
});
