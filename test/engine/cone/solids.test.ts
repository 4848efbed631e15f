import { describe, expect, it } from 'vitest';
import {
  depthInside,
  pointOutside,
  ringDirections,
  simplerRing,
} from '../../../renderer/cone/geometry/rings.ts';
import { shellMesh } from '../../../renderer/cone/geometry/shellMesh.ts';
import { type SphereMesh, triangulateRings } from '../../../renderer/cone/geometry/triangulate.ts';
import { direction } from '../../../renderer/cone/geometry/vector.ts';
import { boxRing, capRing, DEG2_PER_STERADIAN, reversed, triangleSteradian } from './skies.ts';

function areaDeg2({ directions, triangles }: SphereMesh): { sum: number; least: number } {
  let sum = 0;
  let least = Number.POSITIVE_INFINITY;
  for (let t = 0; t < triangles.length; t += 3) {
    const s = triangleSteradian(directions, triangles[t]!, triangles[t + 1]!, triangles[t + 2]!);
    sum += s;
    least = Math.min(least, s);
  }
  return { sum: sum * DEG2_PER_STERADIAN, least };
}

// Areas by closed form: check values of the project, section 6 (computed).
const SKIES = [
  { name: 'a cap of 30 degrees', rings: [capRing(40, 20, 30)], deg2: 2763.424413 },
  { name: 'a cap of 1 degree', rings: [capRing(200, -70, 1)], deg2: 3.1415129057 },
  { name: 'a cap about the pole', rings: [capRing(0, 90, 30)], deg2: 2763.424413 },
  { name: 'a box of 10 by 10 degrees', rings: [boxRing(150, 160, 0, 10)], deg2: 99.493077005 },
  { name: 'a box across RA 0', rings: [boxRing(355, 365, 50, 60)], deg2: 57.284870778 },
  { name: 'an octant', rings: [boxRing(0, 90, 0, 89.999999)], deg2: 5156.620156 },
  {
    name: 'all but two caps (|b| > 20 turned to the equator)',
    rings: [capRing(0, 90, 70), capRing(0, -90, 70)],
    deg2: 27143.61753,
  },
  {
    name: 'a belt between two caps',
    rings: [capRing(0, 90, 70, true), capRing(0, -90, 70, true)],
    deg2: 41252.96125 - 27143.61753,
  },
  { name: 'the sky without a cap', rings: [capRing(123, 45, 30, true)], deg2: 41252.96125 - 2763.424413 },
  {
    name: 'a box with a hole',
    rings: [boxRing(150, 160, 0, 10), capRing(155, 5, 1, true)],
    deg2: 99.493077005 - 3.1415129057,
  },
  {
    name: 'two fields far apart',
    rings: [capRing(10, 0, 1), capRing(190, 10, 1)],
    deg2: 2 * 3.1415129057,
  },
  { name: 'the whole sky', rings: [], deg2: 41252.96125 },
] as const;

describe.each(SKIES)('triangles over $name', ({ rings, deg2 }) => {
  const directions = rings.map(ringDirections);
  const mesh = triangulateRings(directions, 4);

  it('have its area', () => {
    const { sum } = areaDeg2(mesh);
    // The outline of 720 points is inscribed in its circle: short by 2e-5 at most; boxes of half degrees likewise.
    expect(Math.abs(sum / deg2 - 1)).toBeLessThan(1e-4);
  });

  it('do not fold over', () => {
    // A straight piece of the plane is an arc on the sphere: along 4 degrees it may bulge over a sliver beside it by
    // two thirds of length times sagitta, 3e-5 sr at unit curvature.
    expect(areaDeg2(mesh).least).toBeGreaterThan(-6e-5);
  });

  it('are short enough to follow the sphere', () => {
    const limit = Math.cos((4.2 * Math.PI) / 180);
    const d = mesh.directions;
    const t = mesh.triangles;
    for (let i = 0; i < t.length; i++) {
      const a = 3 * t[i]!;
      const b = 3 * t[i - (i % 3) + ((i + 1) % 3)]!;
      const cosine = d[a]! * d[b]! + d[a + 1]! * d[b + 1]! + d[a + 2]! * d[b + 2]!;
      expect(cosine).toBeGreaterThan(limit);
    }
  });

  it('close a shell with the volume between its radii', () => {
    const [inner, outer] = [2, 3];
    const shell = shellMesh(mesh, directions);
    const p = (i: number): number[] => {
      const r = shell.ends[i] === 1 ? outer : inner;
      return [0, 1, 2].map((k) => r * shell.directions[3 * i + k]!);
    };
    let volume = 0;
    const open = new Map<string, number>();
    const name = (v: readonly number[]): string => v.map((x) => String(x)).join();
    for (let t = 0; t < shell.triangles.length; t += 3) {
      const [a, b, c] = [0, 1, 2].map((k) => p(shell.triangles[t + k]!)) as [number[], number[], number[]];
      volume +=
        (a[0]! * (b[1]! * c[2]! - b[2]! * c[1]!) +
          a[1]! * (b[2]! * c[0]! - b[0]! * c[2]!) +
          a[2]! * (b[0]! * c[1]! - b[1]! * c[0]!)) /
        6;
      for (const [u, v] of [
        [a, b],
        [b, c],
        [c, a],
      ] as const) {
        const [from, to] = [name(u), name(v)];
        if (from === to) continue;
        open.set(`${from}|${to}`, (open.get(`${from}|${to}`) ?? 0) + 1);
        open.set(`${to}|${from}`, (open.get(`${to}|${from}`) ?? 0) - 1);
      }
    }
    const expected = ((deg2 / DEG2_PER_STERADIAN) * (outer ** 3 - inner ** 3)) / 3;
    // Flat triangles of 4 degrees stand below the sphere by (2 degrees)^2/2: under 2e-3 of the volume.
    expect(Math.abs(volume / expected - 1)).toBeLessThan(2.5e-3);
    // Every edge is met by its opposite: the solid has no gap.
    expect([...open.values()].every((n) => n === 0)).toBe(true);
  });
});

describe('the inside of rings', () => {
  const rings = [boxRing(150, 160, 0, 10), capRing(155, 5, 1, true)].map(ringDirections);

  it('is to the left', () => {
    expect(depthInside(rings, direction(151, 1))).toBeGreaterThan(0);
    expect(depthInside(rings, direction(155, 5))).toBeLessThan(0);
    expect(depthInside(rings, direction(149, 5))).toBeLessThan(0);
    expect(depthInside(rings, direction(335, -5))).toBeLessThan(0);
  });

  it('changes side when the rings turn round', () => {
    const turned = [reversed(boxRing(150, 160, 0, 10))].map(ringDirections);
    expect(depthInside(turned, direction(155, 5))).toBeLessThan(0);
    expect(depthInside(turned, direction(335, -5))).toBeGreaterThan(0);
  });

  it('is decided at corners too', () => {
    const box = [boxRing(150, 160, 0, 10)].map(ringDirections);
    expect(depthInside(box, direction(149.9, -0.1))).toBeLessThan(0);
    expect(depthInside(box, direction(160.1, 10.1))).toBeLessThan(0);
    expect(depthInside(box, direction(159.9, 9.9))).toBeGreaterThan(0);
  });
});

describe('a simpler ring', () => {
  it.each([
    ['a box', boxRing(150, 170, 40, 50)],
    ['a box on the equator', boxRing(150, 170, -1, 9)],
    ['a cap', capRing(20, 30, 12)],
    ['a wide cap', capRing(20, 30, 70)],
  ])('of %s has fewer points and the same outline', (_, ring) => {
    const full = ringDirections(ring);
    const simple = simplerRing(full, 0.03, 2.5);
    expect(simple.length).toBeLessThan(0.6 * full.length);
    // Every point that was left out lies within the tolerance of the new outline (chords of radians).
    for (let i = 0; i < full.length; i += 3) {
      const depth = depthInside([simple], [full[i]!, full[i + 1]!, full[i + 2]!]);
      expect(Math.abs(depth)).toBeLessThan((0.0301 * Math.PI) / 180);
    }
    const limit = Math.cos((2.51 * Math.PI) / 180);
    for (let i = 0; i < simple.length; i += 3) {
      const j = (i + 3) % simple.length;
      const cosine =
        simple[i]! * simple[j]! + simple[i + 1]! * simple[j + 1]! + simple[i + 2]! * simple[j + 2]!;
      expect(cosine).toBeGreaterThan(limit);
    }
  });

  it('keeps corners', () => {
    const box = boxRing(0, 10, 0, 10);
    const simple = simplerRing(ringDirections(box), 0.03, 2.5);
    for (const [ra, dec] of [
      [0, 0],
      [10, 0],
      [10, 10],
      [0, 10],
    ] as const) {
      const [x, y, z] = direction(ra, dec);
      let nearest = 9;
      for (let i = 0; i < simple.length; i += 3) {
        nearest = Math.min(nearest, Math.hypot(simple[i]! - x, simple[i + 1]! - y, simple[i + 2]! - z));
      }
      expect(nearest).toBeLessThan(1e-12);
    }
  });
});

describe('a point outside', () => {
  it.each(SKIES.filter((sky) => sky.rings.length > 0))('of $name is outside', ({ rings }) => {
    const directions = rings.map(ringDirections);
    expect(depthInside(directions, pointOutside(directions))).toBeLessThan(0);
  });
});
