import { sidewaysText } from '../caption.ts';
import { project } from '../geometry/projection.ts';
import { paintAlignedRulers } from './alignedRulers.ts';
import { onEdge } from './edgeRuler.ts';
import { paintFreeRulers } from './freeRulers.ts';
import { paintObserver } from './observer.ts';
import type { Pen } from './pen.ts';
import type { OverlayScene, PaintedLane } from './scene.ts';

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
  const { name } = lane.shape;
  if (scene.view !== 'parallel') {
    const [x, y, z] = lane.shape.centre;
    const p = project(lane.matrix, x, y, z, 1.06);
    if (p && name !== '') pen.text(name, p[0], p[1], pen.theme.ink);
    return;
  }
  const start = project(scene.pixels, 0, lane.lift, 0);
  const factor = lane.sidewaysFactor === 1 ? '' : sidewaysText(lane.sidewaysFactor);
  const text = [name, factor].filter((part) => part !== '').join(' · ');
  if (!start || text === '') return;
  const x = Math.max(start[0], 10) + pen.measure(text) / 2 + 12;
  for (const dy of [-20, 20, -34, 34]) {
    if (pen.text(text, x, start[1] + dy, pen.theme.ink)) return;
  }
}
