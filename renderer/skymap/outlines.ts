import type { MultiLineString, Polygon, Position } from 'geojson';
import type { OutlineRing } from '../../shared-core/sky/region.ts';

/** Closed lines along the rings. */
export function outlineLines(rings: readonly OutlineRing[]): MultiLineString {
  return { type: 'MultiLineString', coordinates: rings.map((ring) => closedRing(ring)) };
}

/**
 * The area that the rings bound, to be filled. The rings have their interior to the left seen from outside; the
 * drawing library wants it to the right (d3-geo: exterior rings clockwise), so they are turned around.
 */
export function outlineArea(rings: readonly OutlineRing[]): Polygon {
  return { type: 'Polygon', coordinates: rings.map((ring) => closedRing(ring).reverse()) };
}

function closedRing({ raDeg, decDeg }: OutlineRing): Position[] {
  const points: Position[] = Array.from(raDeg, (ra, i) => [ra, decDeg[i]!]);
  const [first, last] = [points[0], points.at(-1)];
  if (first !== undefined && last !== undefined && (first[0] !== last[0] || first[1] !== last[1]))
    points.push(first);
  return points;
}
