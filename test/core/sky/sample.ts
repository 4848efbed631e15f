import type { Region, SkyShape } from '../../../shared-core/sky/region.ts';
import { parseRegionShape } from '../../../shared-core/sky/regionText.ts';
import { RAD_PER_DEG, raDecToUnit, unitToRaDec, type Vec3 } from '../../../shared-core/sky/vectors.ts';

export const WHOLE_DEG2 = 41252.96124941928;

export function region(parts: readonly string[], holes: readonly string[] = []): Region {
  return { parts: parts.map(parseRegionShape), holes: holes.map(parseRegionShape) };
}

/** A small seeded generator (mulberry32), so that a failing case can be run again. */
export function seeded(seed: number): () => number {
  let state = seed >>> 0;
  return () => {
    state = (state + 0x6d2b79f5) >>> 0;
    let t = Math.imul(state ^ (state >>> 15), 1 | state);
    t = (t + Math.imul(t ^ (t >>> 7), 61 | t)) ^ t;
    return ((t ^ (t >>> 14)) >>> 0) / 4294967296;
  };
}

/** `count` positions spread evenly over the sphere: a spiral with the golden angle. */
export function evenPositions(count: number): (readonly [number, number])[] {
  return Array.from({ length: count }, (_, i) => {
    const z = 1 - (2 * i + 1) / count;
    return [(i * 137.50776405003785) % 360, Math.asin(z) / RAD_PER_DEG] as const;
  });
}

/** Turns positions about x by a, then about z by b (radians). */
export function turned(position: readonly [number, number], a: number, b: number): readonly [number, number] {
  const [x, y, z] = raDecToUnit(position[0], position[1]);
  const [y1, z1] = [y * Math.cos(a) - z * Math.sin(a), y * Math.sin(a) + z * Math.cos(a)];
  const v: Vec3 = [x * Math.cos(b) - y1 * Math.sin(b), x * Math.sin(b) + y1 * Math.cos(b), z1];
  const { raDeg, decDeg } = unitToRaDec(v);
  return [raDeg, decDeg];
}

/** A shape of any kind in a part of the sky some 100 degrees across, now and then with a pole or all RA. */
export function randomShape(random: () => number): SkyShape {
  const kind = random();
  const ra = random() * 60;
  const dec = random() * 60 - 30;
  if (kind < 0.35) return { kind: 'cap', raDeg: ra, decDeg: dec, radiusDeg: 1 + 25 * random() };
  if (kind < 0.65) {
    const full = random() < 0.1;
    return {
      kind: 'box',
      raMinDeg: full ? 0 : ra - 30,
      raMaxDeg: full ? 360 : ra - 28 + random() * 50,
      decMinDeg: random() < 0.1 ? -90 : dec - 20 * random(),
      decMaxDeg: random() < 0.1 ? 90 : dec + 1 + 20 * random(),
    };
  }
  const verticesDeg = starVertices(random, ra, dec, 3 + Math.floor(random() * 8));
  if (random() < 0.5) verticesDeg.reverse();
  return { kind: 'polygon', verticesDeg, side: random() < 0.9 ? 'smaller' : 'larger' };
}

/** Vertices around a middle, in order, at distances of 3 to 23 degrees: an outline that never crosses itself. */
export function starVertices(
  random: () => number,
  raDeg: number,
  decDeg: number,
  count: number,
): [number, number][] {
  return Array.from({ length: count }, (_, i) => {
    const angle = ((i + 0.8 * random()) / count) * 2 * Math.PI;
    const distance = 3 + 20 * random();
    return [
      raDeg + (distance * Math.cos(angle)) / Math.cos(decDeg * RAD_PER_DEG),
      decDeg + distance * Math.sin(angle),
    ];
  });
}
