import type { OutlineRing } from '../../shared-core/sky/region.ts';

/** Right ascension and declination in degrees. */
export type Place = [raDeg: number, decDeg: number];

/** Lines and areas as the drawing library takes them (GeoJSON, RFC 7946). */
export interface SkyLines {
  readonly type: 'MultiLineString';
  coordinates: Place[][];
}
export interface SkyArea {
  readonly type: 'Polygon';
  coordinates: Place[][];
}

/** Closed lines along the rings. */
export function outlineLines(rings: readonly OutlineRing[]): SkyLines {
  return { type: 'MultiLineString', coordinates: rings.map((ring) => closedRing(ring)) };
}

/**
 * The area that the rings bound, to be filled. The rings have their interior to the left seen from outside; the
 * drawing library wants it to the right (d3-geo: exterior rings clockwise), so they are turned around.
 */
export function outlineArea(rings: readonly OutlineRing[]): SkyArea {
  return { type: 'Polygon', coordinates: rings.map((ring) => closedRing(ring).reverse()) };
}

function closedRing({ raDeg, decDeg }: OutlineRing): Place[] {
  const points: Place[] = Array.from(raDeg, (ra, i) => [ra, decDeg[i]!]);
  const [first, last] = [points[0], points.at(-1)];
  if (first !== undefined && last !== undefined && (first[0] !== last[0] || first[1] !== last[1]))
    points.push(first);
  return points;
}
