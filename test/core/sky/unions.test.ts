import { describe, expect, it } from 'vitest';
import { compileRegion } from '../../../shared-core/sky/compileRegion.ts';
import { compileShape } from '../../../shared-core/sky/compileShape.ts';
import type { SkyShape } from '../../../shared-core/sky/region.ts';
import { DEG_PER_RAD, RAD_PER_DEG, separationDeg } from '../../../shared-core/sky/vectors.ts';
import { evenPositions, randomShape, region, seeded, turned, WHOLE_DEG2 } from './sample.ts';

const areaOf = (parts: readonly string[], holes: readonly string[] = []): number =>
  compileRegion(region(parts, holes)).areaDeg2;

/**
 * Area that two caps share, by Gauss and Bonnet: 2 pi less the turns at the two crossings and the geodesic curvature
 * along the two arcs; the angles are those of the triangle of both centres and a crossing.
 */
function lensDeg2(r1: number, r2: number, apart: number): number {
  const [a, b, d] = [r1 * RAD_PER_DEG, r2 * RAD_PER_DEG, apart * RAD_PER_DEG];
  const angle = (opposite: number, s: number, t: number) =>
    Math.acos((Math.cos(opposite) - Math.cos(s) * Math.cos(t)) / (Math.sin(s) * Math.sin(t)));
  const shared = 2 * (Math.PI - angle(d, a, b) - angle(b, d, a) * Math.cos(a) - angle(a, d, b) * Math.cos(b));
  return shared * DEG_PER_RAD * DEG_PER_RAD;
}

describe('unions and holes against closed forms', () => {
  it.each([
    [10, 8, 12],
    [60, 50, 40],
    [5, 5, 9.999],
  ])('two caps of radius %d and %d, %d degrees apart', (r1, r2, apart) => {
    const [first, second] = [`cap:20,-10,${r1}`, `cap:20,${-10 + apart},${r2}`];
    const lens = lensDeg2(r1, r2, apart);
    const [a1, a2] = [areaOf([first]), areaOf([second])];
    // acos loses some eight of the sixteen digits where its argument is near 1.
    const digits = 1e-8 * Math.max(a1, a2);
    expect(Math.abs(areaOf([first, second]) - (a1 + a2 - lens))).toBeLessThan(digits);
    expect(Math.abs(areaOf([first], [second]) - (a1 - lens))).toBeLessThan(digits);
    expect(Math.abs(areaOf(['sky'], [first, second]) - (WHOLE_DEG2 - a1 - a2 + lens))).toBeLessThan(
      digits + 1e-7,
    );
  });

  it('small caps keep their digits: the flat lens, short of curvature', () => {
    const [r1, r2, apart] = [0.01, 0.02, 0.015];
    const x = (apart * apart + r1 * r1 - r2 * r2) / (2 * apart);
    const segment = (r: number, d: number) => r * r * Math.acos(d / r) - d * Math.sqrt(r * r - d * d);
    const lens = segment(r1, x) + segment(r2, apart - x);
    const words = [`cap:20,10,${r1}`, `cap:20,${10 + apart},${r2}`] as const;
    // Curvature changes areas of this size by 1e-8 of themselves.
    expect((areaOf([words[0]]) + areaOf([words[1]]) - areaOf(words)) / lens).toBeCloseTo(1, 6);
  });

  it('boxes that share edges and corners: exact sums over the cells of their grid', () => {
    const random = seeded(4);
    const pick = (n: number): number => Math.floor(random() * n);
    for (let round = 0; round < 400; round++) {
      const step = [10, 30, 7.3][round % 3]!;
      // Odd rounds reach both poles.
      const dec = (k: number): number => (round % 2 === 1 ? Math.min(90, 36 * k - 90) : (k * step) / 2 - 20);
      const make = () => ({ i: pick(6), j: pick(4), width: 1 + pick(4), height: 1 + pick(2) });
      const parts = Array.from({ length: 1 + pick(4) }, make);
      const holes = Array.from({ length: pick(3) }, make);
      const holds = (i: number, j: number) => (b: ReturnType<typeof make>) =>
        i >= b.i && i < b.i + b.width && j >= b.j && j < b.j + b.height;
      let expected = 0;
      for (let i = 0; i < 10; i++) {
        for (let j = 0; j < 6; j++) {
          if (!parts.some(holds(i, j)) || holes.some(holds(i, j))) continue;
          expected +=
            step * (Math.sin(dec(j + 1) * RAD_PER_DEG) - Math.sin(dec(j) * RAD_PER_DEG)) * DEG_PER_RAD;
        }
      }
      const shape = (b: ReturnType<typeof make>): SkyShape => ({
        kind: 'box',
        raMinDeg: b.i * step,
        raMaxDeg: (b.i + b.width) * step,
        decMinDeg: dec(b.j),
        decMaxDeg: dec(b.j + b.height),
      });
      const compile = () => compileRegion({ parts: parts.map(shape), holes: holes.map(shape) });
      if (expected < 1e-9) expect(compile).toThrow(/leave nothing/);
      else expect(compile().areaDeg2).toBeCloseTo(expected, 9);
    }
  });

  it('triangles of a turned mesh, edges shared both ways: the areas add up', () => {
    const random = seeded(11);
    for (let round = 0; round < 25; round++) {
      const [a, b] = [6 * random(), 6 * random()];
      const node = (i: number, j: number) => turned([i * 4, j * 4 + ((i * 7 + j * 3) % 5) * 0.3], a, b);
      const all: SkyShape[] = [];
      for (let i = 0; i < 4; i++) {
        for (let j = 0; j < 4; j++) {
          const corners = [node(i, j), node(i + 1, j), node(i + 1, j + 1), node(i, j + 1)] as const;
          all.push({ kind: 'polygon', verticesDeg: [corners[0], corners[1], corners[2]], side: 'smaller' });
          all.push({ kind: 'polygon', verticesDeg: [corners[3], corners[2], corners[0]], side: 'smaller' });
        }
      }
      const some = all.filter(() => random() < 0.6);
      const each = some.map((shape) => compileRegion({ parts: [shape], holes: [] }).areaDeg2);
      const together = compileRegion({ parts: some, holes: [] });
      expect(together.areaDeg2).toBeCloseTo(
        each.reduce((x, y) => x + y, 0),
        8,
      );
      // Taking one away again leaves the rest.
      if (some.length > 1) {
        const less = compileRegion({ parts: some, holes: [some[0]!] }).areaDeg2;
        expect(less).toBeCloseTo(together.areaDeg2 - each[0]!, 8);
      }
    }
  });

  it.each([
    ['the same shape twice', ['cap:5,5,5', 'cap:5,5,5'], [], 78.4899860817814],
    ['caps that touch from inside', ['cap:5,0,5'], ['cap:7,0,3'], 78.4899860817814 - 28.26787483],
    ['halves that make the whole sky', ['box:0,180,-90,90', 'box:180,360,-90,90'], [], WHOLE_DEG2],
    ['a hemisphere taken from the sky', ['sky'], ['cap:0,90,90'], WHOLE_DEG2 / 2],
    [
      'a band taken from the sky',
      ['sky'],
      ['box:0,360,-20,20'],
      WHOLE_DEG2 * (1 - Math.sin(20 * RAD_PER_DEG)),
    ],
    [
      'a polygon along a box',
      ['polygon:0,-10,10,0,0,10', 'box:-10,0,-10,10'],
      [],
      areaOf(['polygon:0,-10,10,0,0,10']) + areaOf(['box:-10,0,-10,10']),
    ],
  ] as const)('%s', (_, parts, holes, expected) => {
    expect(areaOf(parts, holes)).toBeCloseTo(expected, 5);
  });

  it('edges that nearly coincide, 4 milliarcseconds to 4 nanoarcseconds apart', () => {
    const both = areaOf(['box:0,20,0,10']);
    for (const gap of [1e-6, 1e-8, 1e-9, 1e-10, 1e-12]) {
      expect(areaOf(['box:0,10,0,10', `box:${10 + gap},20,0,10`])).toBeCloseTo(both - gap * 9.95, 7);
    }
  });
});

describe('invariants on shapes with round numbers, which touch, share corners and lie along each other', () => {
  const snappedShape = (random: () => number, scale: number): SkyShape => {
    const snap = (x: number): number => Math.round(x / 5) * 5 * scale;
    const shape = randomShape(random);
    if (shape.kind === 'cap') {
      const { raDeg, decDeg, radiusDeg } = shape;
      return { ...shape, raDeg: snap(raDeg), decDeg: snap(decDeg), radiusDeg: snap(radiusDeg) || 5 * scale };
    }
    if (shape.kind === 'polygon') {
      return { ...shape, verticesDeg: shape.verticesDeg.map(([ra, dec]) => [snap(ra), snap(dec)]) };
    }
    if (shape.kind !== 'box' || shape.raMaxDeg === 360) return shape;
    return {
      kind: 'box',
      raMinDeg: snap(shape.raMinDeg),
      raMaxDeg: snap(shape.raMaxDeg),
      decMinDeg: Math.max(-90, snap(shape.decMinDeg)),
      decMaxDeg: Math.min(90, snap(shape.decMaxDeg)),
    };
  };
  /** Snapping makes some outlines cross themselves or vanish: those are not meant here. */
  const isShape = (shape: SkyShape): boolean => {
    try {
      compileShape(shape);
      return true;
    } catch {
      return false;
    }
  };

  it.each([1, 0.01, 0.0002])('P less H = (P or H) less H, in any order; scale %d', (scale) => {
    const random = seeded(1000 * scale + 1);
    let tried = 0;
    for (let round = 0; round < 120; round++) {
      const make = (count: number) =>
        Array.from({ length: count }, () => snappedShape(random, scale)).filter(isShape);
      const parts = make(2 + Math.floor(5 * random()));
      const holes = make(1 + Math.floor(3 * random()));
      if (parts.length === 0 || holes.length === 0) continue;
      const together = compileRegion({ parts: [...parts, ...holes], holes: [] }).areaDeg2;
      const taken = compileRegion({ parts: holes, holes: [] }).areaDeg2;
      // Edges may be taken for the same within 1e-11 rad: that times the edges' length, some 20 times the scale in degrees.
      const tolerance = 1e-13 * together + 1e-8 * scale;
      if (together - taken < 10 * tolerance) continue;
      tried++;
      const left = compileRegion({ parts, holes }).areaDeg2;
      expect(Math.abs(left - (together - taken))).toBeLessThan(tolerance);
      const turnedRound = compileRegion({ parts: [...parts].reverse(), holes: [...holes].reverse() });
      expect(Math.abs(turnedRound.areaDeg2 - left)).toBeLessThan(tolerance);
    }
    expect(tried).toBeGreaterThan(70);
  });

  it.each([
    ['a cap inscribed in a box', ['box:0,20,-10,10'], ['cap:10,0,10']],
    ['a cap that touches a box from outside', ['box:0,20,-10,10', 'cap:10,15,5'], []],
    ['three caps that touch at one point', ['cap:30,10,10', 'cap:30,-10,10'], ['cap:30,5,5']],
    ['caps in a row that touch', ['cap:0,0,5', 'cap:10,0,5', 'cap:20,0,5'], []],
  ] as const)('%s: the areas add up', (_, parts, holes) => {
    const sum = (words: readonly string[]): number =>
      words.reduce((total, word) => total + areaOf([word]), 0);
    expect(areaOf(parts, holes)).toBeCloseTo(sum(parts) - sum(holes), 8);
  });
});

describe('unions and holes against counts', () => {
  it('random regions of one to six shapes, by evenly spread positions', () => {
    const positions = evenPositions(20_000);
    const random = seeded(2026);
    let compiled = 0;
    for (let round = 0; round < 150; round++) {
      const parts = Array.from({ length: 1 + Math.floor(random() * 4) }, () => randomShape(random));
      const holes = Array.from({ length: Math.floor(random() * 3) }, () => randomShape(random));
      let footprint: ReturnType<typeof compileRegion>;
      try {
        footprint = compileRegion({ parts, holes });
      } catch (error) {
        expect(String(error)).toMatch(/leave nothing/);
        continue;
      }
      compiled++;
      const counted = positions.filter(([ra, dec]) => footprint.contains(ra, dec)).length;
      // A position stands for 2.06 deg2; some 300 lie on a border as long as these have, and err by their root.
      expect(Math.abs((counted * WHOLE_DEG2) / 20_000 - footprint.areaDeg2)).toBeLessThan(2.06 * 17.5);
    }
    expect(compiled).toBeGreaterThan(130);
  });

  it('a cap holds what lies within its radius', () => {
    const random = seeded(8);
    const wrong: unknown[] = [];
    for (let round = 0; round < 5000; round++) {
      const [ra, dec] = [random() * 360, Math.asin(2 * random() - 1) * DEG_PER_RAD];
      const [raDeg, decDeg, radiusDeg] = [random() * 360, 180 * random() - 90, 0.1 + 179 * random()];
      const cap = compileShape({ kind: 'cap', raDeg, decDeg, radiusDeg });
      const inside = separationDeg(ra, dec, raDeg, decDeg) <= radiusDeg;
      if (cap.side(ra, dec) >= 0 !== inside) wrong.push([ra, dec, raDeg, decDeg, radiusDeg]);
    }
    expect(wrong).toEqual([]);
  });
});
