import { project } from '../geometry/projection.ts';
import type { Vec3 } from '../geometry/vector.ts';
import type { RadialReading } from '../types.ts';
import { onEdge, paintEdge } from './edgeRuler.ts';
import type { Pen } from './pen.ts';
import { drawRuler } from './ruler.ts';
import type { OverlayScene, PaintedLane } from './scene.ts';

/** Room between the lower edge of the cone and the comoving ruler, in pixels. */
export const COMOVING_DROP_PX = 42;
/** Heights at which rulers stay when the cone is zoomed so far that its edges leave the stage, from top or bottom. */
export const PINNED_TOP_PX = 30;
const PINNED_REDSHIFT_PX = 62;
const PINNED_COMOVING_PX = 30;
/** Room beside a ruler for its numbers. */
const NUMBERS_PX = 24;
/** Above a veil's ruler, its own line and marks. */
const VEIL_PX = 6;
/** What an edge with numbers keeps free at the bottom: the comoving ruler's veil and the room of its own numbers. */
const ROOM_BELOW_PX = PINNED_COMOVING_PX + VEIL_PX + NUMBERS_PX;
/** So much of the lower edge must have room, or redshift is told along the border. */
const LOWER_SHARE = 0.7;

/**
 * Side-on: lookback on the upper edge, redshift on the lower one, comoving distance straight below everything, parallel
 * to the axis. What has left the stage is drawn straight along its border instead: distances are read on the axis.
 */
export function paintAlignedRulers(
  pen: Pen,
  scene: OverlayScene,
  first: PaintedLane,
  last: PaintedLane,
): void {
  const upper = !upperIsPinned(pen, scene);
  const lower = shareOnStage(pen, scene, last, last.shape.lower) > LOWER_SHARE;
  const comovingAt = comovingRulerY(pen, scene);
  const below = comovingAt < pen.height - PINNED_COMOVING_PX;
  const veilTo = PINNED_TOP_PX + VEIL_PX;
  const veilFrom = pen.height - (lower ? PINNED_COMOVING_PX : PINNED_REDSHIFT_PX) - VEIL_PX;
  if (!upper) pen.veil(0, veilTo);
  if (!below) pen.veil(veilFrom, pen.height);
  straight(pen, scene, last, 'comoving', comovingAt, pen.height / 2);
  if (upper) paintEdge(pen, scene, first, first.shape.upper, 'lookback');
  else straight(pen, scene, first, 'lookback', PINNED_TOP_PX, pen.height / 2);
  if (!lower) straight(pen, scene, last, 'redshift', pen.height - PINNED_REDSHIFT_PX, pen.height / 2);
  // Texts that are still to come keep off the veils.
  if (!upper) pen.labels.reserve({ x: 0, y: 0, width: pen.width, height: veilTo });
  if (!below) pen.labels.reserve({ x: 0, y: veilFrom - 4, width: pen.width, height: pen.height });
  if (lower) paintEdge(pen, scene, last, last.shape.lower, 'redshift');
}

/** Height of the straight comoving ruler, side-on: below the cone, or along the border when the cone has left the stage. */
export function comovingRulerY(pen: Pen, scene: OverlayScene): number {
  const pinned = pen.height - PINNED_COMOVING_PX;
  const last = scene.lanes.at(-1);
  if (!last || shareOnStage(pen, scene, last, last.shape.lower) <= LOWER_SHARE) return pinned;
  const low = last.lift + last.shape.extent.alongMin * last.sidewaysFactor;
  const y = project(scene.pixels, 0, low, 0)?.[1] ?? pen.height;
  return Math.min(pinned, y + COMOVING_DROP_PX);
}

/** Whether the upper edge has left the stage, so that its ruler runs along the border. */
export function upperIsPinned(pen: Pen, scene: OverlayScene): boolean {
  const first = scene.lanes[0];
  return scene.aligned && first !== undefined && shareOnStage(pen, scene, first, first.shape.upper) <= 0.4;
}

/** How much of an edge that lies between the sides of the stage also lies where its numbers have room. */
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
    if (hasRoom(pen, y)) shown++;
  }
  if (between > 0) return shown / between;
  // Zoomed in between two steps: the middle of the stage decides.
  const y = start[1] + ((end[1] - start[1]) * (pen.width / 2 - start[0])) / (end[0] - start[0]);
  return hasRoom(pen, y) ? 1 : 0;
}

const hasRoom = (pen: Pen, y: number): boolean => y > NUMBERS_PX && y < pen.height - ROOM_BELOW_PX;

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
