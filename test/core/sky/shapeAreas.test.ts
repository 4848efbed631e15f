import { geoArea } from 'd3-geo';
import fc from 'fast-check';
import { describe, expect, it } from 'vitest';
import { compileRegion } from '../../../shared-core/sky/compileRegion.ts';
import { region, seeded, starVertices, turned, WHOLE_DEG2 } from './sample.ts';

const areaOf = (...parts: string[]): number => compileRegion(region(parts)).areaDeg2;
const polygonArea = (
  vertices: readonly (readonly [number, number])[],
  side: 'smaller' | 'larger' = 'smaller',
) => compileRegion({ parts: [{ kind: 'polygon', verticesDeg: vertices, side }], holes: [] }).areaDeg2;

describe('areas of single shapes against closed forms', () => {
  // Computed from 2 pi (1 - cos r) and dRA (sin Dec2 - sin Dec1); as many digits as were given.
  it.each([
    ['sky', 41252.96125, 5],
    ['cap:12,34,1', 3.1415129057, 9],
    ['cap:0,-90,30', 2763.424413, 5],
    ['box:40,50,0,10', 99.493077005, 8],
    ['box:355,5,50,60', 57.284870778, 8],
    ['box:0,90,0,90', 5156.620156, 5],
    ['polygon:0,0,90,0,0,90', 5156.620156, 5],
  ] as const)('%s', (word, area, digits) => {
    expect(areaOf(word)).toBeCloseTo(area, digits);
  });

  it('|b| > 20 degrees of the Galaxy as two caps about its poles', () => {
    const [ra, dec] = [192.85948, 27.12825];
    expect(areaOf(`cap:${ra},${dec},70`, `cap:${ra + 180 - 360},${-dec},70`)).toBeCloseTo(27143.61753, 5);
  });

  it('keeps its digits in small shapes: the flat area, short of curvature', () => {
    // 0.001 deg: curvature changes the area by 1e-10; the numbers must be good to better than that.
    const size = 0.001;
    const flat = Math.PI * size * size;
    expect(areaOf(`cap:77,-33,${size}`) / flat).toBeCloseTo(1, 9);
    expect(areaOf(`polygon:77,0,77.001,0,77.001,0.001,77,0.001`) / (size * size)).toBeCloseTo(1, 9);
  });

  it('a cap and the cap around its antipode share the sky', () => {
    fc.assert(
      fc.property(fc.double({ min: 0.01, max: 179.9, noNaN: true }), (radius) => {
        expect(areaOf(`cap:10,20,${radius}`) + areaOf(`cap:190,-20,${180 - radius}`)).toBeCloseTo(
          WHOLE_DEG2,
          7,
        );
      }),
    );
  });

  it('the larger side of a polygon is what the smaller leaves', () => {
    const triangle = [[10, 0], [40, 5], [20, 30]] as const; // biome-ignore format: one line reads best
    expect(polygonArea(triangle) + polygonArea(triangle, 'larger')).toBeCloseTo(WHOLE_DEG2, 7);
  });
});

describe('polygons', () => {
  const outline = fc
    .record({
      seed: fc.nat(),
      ra: fc.double({ min: 0, max: 359, noNaN: true }),
      count: fc.integer({ min: 3, max: 12 }),
    })
    .map(({ seed, ra, count }) => {
      const random = seeded(seed);
      return starVertices(random, ra, 60 * random() - 30, count).map(
        ([a, d]) => [((a % 360) + 360) % 360, d] as [number, number],
      );
    });

  it('agree with d3-geo, whose outlines run clockwise, to its 1e-8', () => {
    fc.assert(
      fc.property(outline, (vertices) => {
        // starVertices runs counter-clockwise with RA to the left as on the sky, so counter-clockwise seen from outside.
        const ring = [...vertices].reverse();
        const theirs = geoArea({ type: 'Polygon', coordinates: [[...ring, ring[0]!]] });
        const deg2 = (theirs * WHOLE_DEG2) / (4 * Math.PI);
        expect(polygonArea(vertices) / Math.min(deg2, WHOLE_DEG2 - deg2)).toBeCloseTo(1, 7);
      }),
    );
  });

  it('have an area that depends neither on winding nor on the first vertex', () => {
    fc.assert(
      fc.property(outline, fc.nat(), (vertices, shift) => {
        const area = polygonArea(vertices);
        const k = shift % vertices.length;
        expect(polygonArea([...vertices].reverse()) / area).toBeCloseTo(1, 11);
        expect(polygonArea([...vertices.slice(k), ...vertices.slice(0, k)]) / area).toBeCloseTo(1, 11);
      }),
    );
  });

  it('have an area that does not change when the sky is turned', () => {
    const angle = fc.double({ min: 0, max: 6.28, noNaN: true });
    fc.assert(
      fc.property(outline, angle, angle, (vertices, a, b) => {
        const moved = vertices.map((vertex) => turned(vertex, a, b));
        // Turning rounds vertices by 1e-16 rad, which an outline of degrees feels at 1e-14.
        expect(polygonArea(moved) / polygonArea(vertices)).toBeCloseTo(1, 10);
      }),
    );
  });

  it('may hold a pole, have a corner on it or an edge through it', () => {
    // A square about the pole: four triangles with a right angle at the pole and two sides of 10 degrees.
    const q = Math.tan((5 * Math.PI) / 180) ** 2;
    const square = 4 * 2 * Math.atan(q) * (180 / Math.PI) ** 2;
    expect(areaOf('polygon:0,80,90,80,180,80,270,80')).toBeCloseTo(square, 9);
    expect(areaOf('polygon:0,80,90,80,180,80')).toBeCloseTo(square / 2, 9);
    expect(areaOf('polygon:0,80,90,80,0,90')).toBeCloseTo(square / 4, 9);
    expect(areaOf('polygon:0,-80,90,-80,180,-80,270,-80')).toBeCloseTo(square, 9);
  });
});
