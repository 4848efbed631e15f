import { Refusal } from '../base/refusal.ts';
import { reverseArc } from './arc.ts';
import { bothSides, ringArea } from './area.ts';
import { checkedEdges } from './polygonChecks.ts';
import { compilePolygonSide } from './polygonSide.ts';
import type { SkyShape } from './region.ts';
import { boundingRadius, type CompiledShape, SMALLEST_AREA_SR } from './shape.ts';
import { norm, normaliseRaDeg, SPREAD_DIRECTIONS, unit, unitToRaDec, type Vec3 } from './vectors.ts';

/** The vertices' mean direction, or any when they balance around the sky. */
function middleOf(points: readonly Vec3[]): Vec3 {
  let sum: Vec3 = [0, 0, 0];
  for (const p of points) sum = [sum[0] + p[0], sum[1] + p[1], sum[2] + p[2]];
  return norm(sum) > 1e-3 * points.length ? unit(sum) : SPREAD_DIRECTIONS[0]!;
}

/**
 * A polygon with great-circle edges, vertices in either order around it: the smaller of the two sides, or the larger.
 * (Of two halves of exactly equal area, the one on the left of the outline as given.)
 * @throws Refusal for an outline that is none (see checkedEdges) or that encloses no area.
 */
export function compilePolygon(polygon: Extract<SkyShape, { kind: 'polygon' }>): CompiledShape {
  const { vertices, edges } = checkedEdges(polygon.verticesDeg);
  const { leftSr, rightSr } = bothSides(ringArea(edges));
  if (Math.min(leftSr, rightSr) < SMALLEST_AREA_SR) {
    throw new Refusal(
      `The polygon of ${vertices.length} vertices encloses no area: give vertices that do not lie on one great circle.`,
      'use',
    );
  }
  const keepLeft = leftSr <= rightSr === (polygon.side === 'smaller');
  const arcs = keepLeft ? edges : edges.map(reverseArc).reverse();
  const ras = polygon.verticesDeg.map((vertex) => normaliseRaDeg(vertex[0]));
  // Reversed, the edges start at vertices 0, n - 1, ..., 1: the last edge ended at vertex 0.
  const startRas = keepLeft ? ras : [ras[0]!, ...ras.slice(1).reverse()];
  const side = compilePolygonSide(arcs, startRas);

  const centre = middleOf(vertices);
  const antipode = unitToRaDec([-centre[0], -centre[1], -centre[2]]);
  return {
    arcs,
    areaSr: keepLeft ? leftSr : rightSr,
    centre,
    radiusRad: boundingRadius(centre, arcs, side(antipode.raDeg, antipode.decDeg) >= 0),
    side,
  };
}
