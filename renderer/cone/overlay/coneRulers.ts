import { sidewaysText } from '../caption.ts';
import { project } from '../geometry/projection.ts';
import type { Vec3 } from '../geometry/vector.ts';
import { paintAlignedRulers } from './alignedRulers.ts';
import { onEdge } from './edgeRuler.ts';
import { paintFreeRulers } from './freeRulers.ts';
import { paintObserver } from './observer.ts';
import type { Pen, Point } from './pen.ts';
import type { OverlayScene, PaintedLane } from './scene.ts';

/** From the edge of a cone to the middle of its name. */
const NAME_ROOM_PX = 11;
const NAME_GAP_PX = 4;

/** Rulers along the edges of cones, the observer, and the names of lanes. */
export function paintCone(pen: Pen, scene: OverlayScene): void {
  const first = scene.lanes[0]!;
  const last = scene.lanes.at(-1)!;
  const parallel = scene.view === 'parallel' && scene.lanes.length > 1;
  for (const lane of parallel ? scene.lanes : [first]) paintObserver(pen, scene, lane, !parallel);
  if (scene.aligned) {
    if (parallel) paintPlainEdges(pen, scene);
    paintAlignedRulers(pen, scene, first, last);
  } else paintFreeRulers(pen, scene, first);
  if (scene.lanes.length > 1) for (const lane of scene.lanes) paintLaneName(pen, scene, lane);
}

/** Edges of parallel cones that carry no ruler. */
function paintPlainEdges(pen: Pen, scene: OverlayScene): void {
  for (const lane of scene.lanes) {
    for (const edge of [lane.shape.upper, lane.shape.lower]) {
      const at = onEdge(scene, lane, edge);
      pen.line([at(0), at(scene.farMpc)], pen.theme.line, 1);
    }
  }
}

function paintLaneName(pen: Pen, scene: OverlayScene, lane: PaintedLane): void {
  const name = lane.shape.name === '' ? `field ${lane.field + 1}` : lane.shape.name;
  if (scene.view !== 'parallel') {
    const p = behindEnd(pen, lane, name);
    if (p) pen.text(name, p[0], p[1], pen.theme.ink);
    return;
  }
  const start = project(scene.pixels, 0, lane.lift, 0);
  if (!start) return;
  const text = lane.sidewaysFactor === 1 ? name : `${name} · ${sidewaysText(lane.sidewaysFactor)}`;
  const left = Math.max(start[0], 10) + 12;
  const width = pen.measure(text);
  // Clear of the edge that opens away under the text: what counts is the text's far end.
  const beside = (edge: Vec3, outward: number): number => {
    const end = onEdge(scene, lane, edge)(scene.farMpc) ?? start;
    const slope = end[0] > start[0] ? (end[1] - start[1]) / (end[0] - start[0]) : 0;
    return start[1] + slope * (left + width - start[0]) + outward * NAME_ROOM_PX;
  };
  for (const y of [beside(lane.shape.upper, -1), beside(lane.shape.lower, 1)])
    if (pen.text(text, left + width / 2, y, pen.theme.ink)) return;
}

/** Where a cone's name stands clear behind its far end, seen from the observer. */
function behindEnd(pen: Pen, lane: PaintedLane, name: string): Point | null {
  const [x, y, z] = lane.shape.centre;
  const apex = project(lane.matrix, 0, 0, 0);
  const end = project(lane.matrix, x, y, z, 1.04);
  if (!apex || !end) return null;
  const [dx, dy] = [end[0] - apex[0], end[1] - apex[1]];
  const length = Math.hypot(dx, dy);
  if (!(length > 0)) return end;
  const room = (Math.abs(dx) * pen.measure(name)) / 2 + Math.abs(dy) * NAME_ROOM_PX;
  const share = 1 + (room / length + NAME_GAP_PX) / length;
  return [apex[0] + share * dx, apex[1] + share * dy];
}
