import { sidewaysText } from '../caption.ts';
import { project } from '../geometry/projection.ts';
import type { Vec3 } from '../geometry/vector.ts';
import type { RadialReading } from '../types.ts';
import type { Pen, Point } from './pen.ts';
import { drawRuler } from './ruler.ts';
import type { OverlayScene, PaintedLane } from './scene.ts';

/** Room between the lower edge of the cone and the comoving ruler, in pixels. */
export const COMOVING_DROP_PX = 42;
/** The same beside the lower edge of a free view, where the redshifts' title stands in between. */
const FREE_DROP_PX = 58;

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

const onEdge =
  (scene: OverlayScene, { matrix }: PaintedLane, [x, y, z]: Vec3) =>
  (mpc: number): Point | null =>
    project(matrix, x, y, z, scene.radius(mpc));

function paintEdge(
  pen: Pen,
  scene: OverlayScene,
  lane: PaintedLane,
  edge: Vec3,
  which: 'lookback' | 'redshift',
  awayFrom: Point = axisMiddle(pen, scene, lane),
): void {
  drawRuler(pen, {
    title: scene.scale.titles[which],
    ticks: scene.scale.rulers[which],
    at: onEdge(scene, lane, edge),
    fromMpc: 0,
    toMpc: scene.farMpc,
    awayFrom,
  });
}

const axisMiddle = (pen: Pen, scene: OverlayScene, lane: PaintedLane): Point => {
  const [x, y, z] = lane.shape.centre;
  return project(lane.matrix, x, y, z, scene.radius(scene.farMpc) / 2) ?? [pen.width / 2, pen.height / 2];
};

/** Heights at which rulers stay when the cone is zoomed so far that its edges leave the stage, from top or bottom. */
export const PINNED_TOP_PX = 30;
const PINNED_REDSHIFT_PX = 62;
const PINNED_COMOVING_PX = 30;
/** Room beside a ruler for its numbers. */
const NUMBERS_PX = 24;

/**
 * Side-on: lookback on the upper edge, redshift on the lower one, comoving distance straight below everything, parallel
 * to the axis. What has left the stage is drawn straight along its border instead: distances are read on the axis.
 */
function paintAlignedRulers(pen: Pen, scene: OverlayScene, first: PaintedLane, last: PaintedLane): void {
  const upper = !upperIsPinned(pen, scene);
  const lower = shareOnStage(pen, scene, last, last.shape.lower) > 0.4;
  const comovingAt = comovingRulerY(pen, scene);
  const below = comovingAt < pen.height - PINNED_COMOVING_PX;
  if (!upper) pen.veil(0, PINNED_TOP_PX + 6);
  if (!below) pen.veil(pen.height - (lower ? PINNED_COMOVING_PX : PINNED_REDSHIFT_PX) - 6, pen.height);
  straight(pen, scene, last, 'comoving', comovingAt, pen.height / 2);
  if (upper) paintEdge(pen, scene, first, first.shape.upper, 'lookback');
  else straight(pen, scene, first, 'lookback', PINNED_TOP_PX, pen.height / 2);
  if (lower) paintEdge(pen, scene, last, last.shape.lower, 'redshift');
  else straight(pen, scene, last, 'redshift', pen.height - PINNED_REDSHIFT_PX, pen.height / 2);
}

/** Height of the straight comoving ruler, side-on: below the cone, or along the border when the cone has left the stage. */
export function comovingRulerY(pen: Pen, scene: OverlayScene): number {
  const pinned = pen.height - PINNED_COMOVING_PX;
  const last = scene.lanes.at(-1);
  if (!last || shareOnStage(pen, scene, last, last.shape.lower) <= 0.4) return pinned;
  const low = last.lift + last.shape.extent.alongMin * last.sidewaysFactor;
  const y = project(scene.pixels, 0, low, 0)?.[1] ?? pen.height;
  return Math.min(pinned, y + COMOVING_DROP_PX);
}

/** Whether the upper edge has left the stage, so that its ruler runs along the border. */
export function upperIsPinned(pen: Pen, scene: OverlayScene): boolean {
  const first = scene.lanes[0];
  return scene.aligned && first !== undefined && shareOnStage(pen, scene, first, first.shape.upper) <= 0.4;
}

/** How much of an edge that lies between the sides of the stage also lies between its top and bottom. */
function shareOnStage(pen: Pen, scene: OverlayScene, lane: PaintedLane, edge: Vec3): number {
  const at = onEdge(scene, lane, edge);
  const [start, end] = [at(0), at(scene.farMpc)];
  if (!start || !end || !(end[0] > start[0])) return 1;
  const steps = 24;
  let between = 0;
  let shown = 0;
  for (let i = 0; i <= steps; i++) {
    const x = start[0] + ((end[0] - start[0]) * i) / steps;
    if (x < 0 || x > pen.width) continue;
    between++;
    const y = start[1] + ((end[1] - start[1]) * i) / steps;
    if (y > NUMBERS_PX && y < pen.height - NUMBERS_PX) shown++;
  }
  if (between > 0) return shown / between;
  // Zoomed in between two steps: the middle of the stage decides.
  const y = start[1] + ((end[1] - start[1]) * (pen.width / 2 - start[0])) / (end[0] - start[0]);
  return y > NUMBERS_PX && y < pen.height - NUMBERS_PX ? 1 : 0;
}

/** A ruler parallel to the axis at a height of the stage, its marks away from another height. */
function straight(
  pen: Pen,
  scene: OverlayScene,
  lane: PaintedLane,
  which: RadialReading,
  yPx: number,
  awayFromY: number,
): void {
  drawRuler(pen, {
    title: scene.scale.titles[which],
    ticks: scene.scale.rulers[which],
    inline: true,
    at: (mpc) => {
      const p = project(scene.pixels, scene.radius(mpc), lane.lift, 0);
      return p ? [p[0], yPx] : null;
    },
    fromMpc: 0,
    toMpc: scene.farMpc,
    awayFrom: [pen.width / 2, awayFromY],
  });
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

/** In a free view the rulers stand on the two edges that make the cone's outline on the screen. */
function paintFreeRulers(pen: Pen, scene: OverlayScene, lane: PaintedLane): void {
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

/** The observer: a small eye at the apex. */
export function paintObserver(
  pen: Pen,
  scene: OverlayScene,
  lane: { readonly lift: number },
  named: boolean,
): void {
  const p = project(scene.pixels, 0, lane.lift, 0);
  if (!p || p[0] < -20 || p[0] > pen.width + 20 || p[1] < -20 || p[1] > pen.height + 20) return;
  pen.disc(p, 4.7, pen.theme.background);
  pen.ring(p, 4, pen.theme.ink, 1.4);
  pen.disc(p, 1.4, pen.theme.ink);
  pen.labels.reserve({ x: p[0] - 5, y: p[1] - 5, width: 10, height: 10 });
  if (!named) return;
  const half = pen.measure('observer') / 2;
  const places = [
    [half + 8, -24],
    [half + 8, 24],
    [-half - 12, 0],
    [0, 18],
    [0, -18],
  ] as const;
  for (const [dx, dy] of places) if (pen.text('observer', p[0] + dx, p[1] + dy, pen.theme.inkMuted)) return;
}

/** Which way the sky lies when one looks down the cone from the observer's seat. */
export function compassOf(pen: Pen): void {
  const [x, y] = [pen.width - 46, 62];
  const colour = pen.theme.inkMuted;
  pen.line(
    [
      [x, y],
      [x, y - 26],
    ],
    colour,
    1.2,
  );
  pen.line(
    [
      [x, y],
      [x - 26, y],
    ],
    colour,
    1.2,
  );
  pen.text('N', x, y - 35, colour);
  pen.text('E', x - 35, y, colour);
}
