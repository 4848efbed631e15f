import { project } from '../geometry/projection.ts';
import type { Vec3 } from '../geometry/vector.ts';
import type { Pen, Point } from './pen.ts';
import { drawRuler } from './ruler.ts';
import type { OverlayScene, PaintedLane } from './scene.ts';

/** Where a distance stands on an edge of a cone, in pixels. */
export const onEdge =
  (scene: OverlayScene, { matrix }: PaintedLane, [x, y, z]: Vec3) =>
  (mpc: number): Point | null =>
    project(matrix, x, y, z, scene.radius(mpc));

/** A ruler along an edge. */
export function paintEdge(
  pen: Pen,
  scene: OverlayScene,
  lane: PaintedLane,
  edge: Vec3,
  which: 'lookback' | 'redshift',
  awayFrom: Point = axisMiddle(pen, scene, lane),
): void {
  const ticks = scene.scale.rulers[which];
  drawRuler(pen, {
    title: scene.scale.titles[which],
    // In a free view three rulers meet at the observer: the 0 of the comoving one speaks for all.
    ticks: scene.aligned ? ticks : ticks.filter(({ comovingMpc }) => comovingMpc > 0),
    at: onEdge(scene, lane, edge),
    fromMpc: 0,
    toMpc: scene.farMpc,
    awayFrom,
  });
}

/** The middle of a cone's axis, in pixels. */
export const axisMiddle = (pen: Pen, scene: OverlayScene, lane: PaintedLane): Point => {
  const [x, y, z] = lane.shape.centre;
  return project(lane.matrix, x, y, z, scene.radius(scene.farMpc) / 2) ?? [pen.width / 2, pen.height / 2];
};
