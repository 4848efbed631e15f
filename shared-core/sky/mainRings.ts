import { cos, sin, square } from '../numerics/elementary/elementary.ts';
import type { OutlineRing } from './region.ts';

const RADIAN = Math.PI / 180;

/**
 * The rings of an outline that show its form: those around at least a share of what the largest goes around. The
 * outline of an estimate from galaxies has many rings around single cells, which hide it. For drawing alone: areas count
 * every ring.
 *
 * @param leastShare 0..1
 * @returns in the order given; all of them where none is larger than nothing
 */
export function mainRings(rings: readonly OutlineRing[], leastShare: number): readonly OutlineRing[] {
  const sizes = rings.map(roughSize);
  const least = leastShare * Math.max(0, ...sizes);
  return rings.filter((_, i) => sizes[i]! >= least);
}

/** What a ring goes around, in square degrees as if it were flat about its first point: good enough to compare. */
function roughSize({ raDeg, decDeg }: OutlineRing): number {
  const n = raDeg.length;
  if (n < 3) return 0;
  const dec0 = decDeg[0]! * RADIAN;
  const east: number[] = [];
  const north: number[] = [];
  for (let i = 0; i < n; i++) {
    const dec = decDeg[i]! * RADIAN;
    const ra = (raDeg[i]! - raDeg[0]!) * RADIAN;
    east.push(cos(dec) * sin(ra));
    north.push(sin(dec) * cos(dec0) - cos(dec) * sin(dec0) * cos(ra));
  }
  let twice = 0;
  for (let i = 0; i < n; i++) {
    const k = (i + 1) % n;
    twice += east[i]! * north[k]! - east[k]! * north[i]!;
  }
  return Math.abs(twice) / 2 / square(RADIAN);
}
