import { project } from '../geometry/projection.ts';
import type { Vec3 } from '../geometry/vector.ts';
import { axisMiddle, onEdge, paintEdge } from './edgeRuler.ts';
import type { Pen, Point } from './pen.ts';
import { drawRuler } from './ruler.ts';
import type { OverlayScene, PaintedLane } from './scene.ts';

/** Room beside the lower edge for the redshifts, their title and the comoving ruler's numbers, in pixels. */
const FREE_DROP_PX = 58;

/** In a free view the rulers stand on the two edges that make the cone's outline on the screen. */
export function paintFreeRulers(pen: Pen, scene: OverlayScene, lane: PaintedLane): void {
  const apex = project(scene.pixels, 0, 0, 0);
  const axis = axisMiddle(pen, scene, lane);
  if (!apex) return;
  const edges = outlineEdges(lane, apex, axis);
  if (!edges) {
    // Seen along the line of sight: one ruler on a corner says how deep each outline stands.
    const corner = lane.shape.corners[0];
    if (corner) paintEdge(pen, scene, lane, corner, 'redshift', axis);
    return;
  }
  const [upper, lower] = edges;
  paintEdge(pen, scene, lane, upper, 'lookback', axis);
  paintEdge(pen, scene, lane, lower, 'redshift', axis);
  const at = onEdge(scene, lane, lower);
  const end = at(scene.farMpc);
  if (!end) return;
  // The comoving ruler lies beside the lower edge, clear of the redshifts.
  const length = Math.hypot(end[0] - apex[0], end[1] - apex[1]);
  let normal: Point = [-(end[1] - apex[1]) / length, (end[0] - apex[0]) / length];
  if (normal[0] * (axis[0] - apex[0]) + normal[1] * (axis[1] - apex[1]) > 0)
    normal = [-normal[0], -normal[1]];
  const beside = (mpc: number): Point | null => {
    const p = at(mpc);
    return p ? [p[0] + FREE_DROP_PX * normal[0], p[1] + FREE_DROP_PX * normal[1]] : null;
  };
  drawRuler(pen, {
    title: scene.scale.titles.comoving,
    ticks: scene.scale.rulers.comoving,
    inline: true,
    at: beside,
    fromMpc: 0,
    toMpc: scene.farMpc,
    awayFrom: axis,
  });
}

/** The corner directions with the least and greatest angle on the screen about the axis; null when they surround it. */
function outlineEdges(lane: PaintedLane, apex: Point, axis: Point): [upper: Vec3, lower: Vec3] | null {
  const ax = axis[0] - apex[0];
  const ay = axis[1] - apex[1];
  if (Math.hypot(ax, ay) < 30) return null;
  let least = 0;
  let greatest = 0;
  let [low, high]: [Vec3 | null, Vec3 | null] = [null, null];
  for (const corner of [...lane.shape.corners, lane.shape.upper, lane.shape.lower]) {
    const p = project(lane.matrix, corner[0], corner[1], corner[2], 1);
    if (!p) return null;
    const [x, y] = [p[0] - apex[0], p[1] - apex[1]];
    const angle = Math.atan2(ax * y - ay * x, ax * x + ay * y);
    if (Math.abs(angle) > 1.4) return null;
    if (angle < least || !low) [least, low] = [angle, corner];
    if (angle > greatest || !high) [greatest, high] = [angle, corner];
  }
  if (!low || !high) return null;
  // Screen angles grow clockwise: with the axis to the right the least is the upper edge.
  return ax >= 0 ? [low, high] : [high, low];
}
