import { niceFactor } from '../../cone/geometry/arrangement.ts';
import type { Point } from '../../cone/overlay/pen.ts';
import type { ViewBox } from './view.ts';

const DEGREE = Math.PI / 180;
/** Room for the rulers along the edges, and for the angles at the outer arc. */
const EDGE_ROOM = 74;
const ARC_ROOM = 52;
/** In a lying wedge the rulers' titles stand beyond their ends. */
const LYING_ARC_ROOM = 150;
const TIP_ROOM = 26;
/** Angles are opened only when it makes a difference. */
const LEAST_FACTOR = 1.5;
/** Wedges wider than this stand upright, the tip below. */
const UPRIGHT_FROM_DEG = 110;

export interface WedgeLayout {
  readonly range: readonly [number, number];
  /** By how much angles are opened. */
  readonly factor: number;
  readonly full: boolean;
  /** Length of the radius in units. */
  readonly radiusUnits: number;
  /** Place in the box of an angle (degrees from the middle) and a radius, 0..1. */
  readonly at: (angleDeg: number, radius: number) => Point;
}

/** A wedge as large as the box allows, lying in a wide box and upright in a high one. */
export function layWedge(range: readonly [number, number], box: ViewBox): WedgeLayout {
  const span = range[1] - range[0];
  const full = span >= 360;
  const lying = box.width > box.height && span < UPRIGHT_FROM_DEG;
  const [long, wide] = lying ? [box.width, box.height] : [box.height, box.width];
  const arcRoom = lying ? LYING_ARC_ROOM : ARC_ROOM;
  const room = (wide - 2 * EDGE_ROOM) / (2 * (long - arcRoom - TIP_ROOM));
  const target = (2 * Math.asin(Math.min(1, Math.max(0.05, room)))) / DEGREE;
  const wanted = target / span;
  const factor = wanted >= LEAST_FACTOR && !full ? niceFactor(Math.min(wanted, 1000)) : 1;
  const middle = (range[0] + range[1]) / 2;
  const turn = (angle: number): number => ((angle - middle) * factor + (lying ? 0 : 90)) * DEGREE;
  const arm = (angle: number): Point => [Math.cos(turn(angle)), -Math.sin(turn(angle))];

  let [left, right, top, bottom] = [0, 0, 0, 0];
  for (let i = 0; i <= 256; i++) {
    const [x, y] = arm(range[0] + (span * i) / 256);
    left = Math.min(left, x);
    right = Math.max(right, x);
    top = Math.min(top, y);
    bottom = Math.max(bottom, y);
  }
  const roomX = lying ? TIP_ROOM + arcRoom : full ? 2 * ARC_ROOM : 2 * EDGE_ROOM;
  const roomY = lying ? 2 * EDGE_ROOM : full ? 2 * ARC_ROOM : TIP_ROOM + ARC_ROOM;
  const radiusUnits = Math.max(
    20,
    Math.min((box.width - roomX) / (right - left), (box.height - roomY) / (bottom - top)),
  );
  const spareX = box.width - roomX - radiusUnits * (right - left);
  const spareY = box.height - roomY - radiusUnits * (bottom - top);
  const tipX = (lying ? TIP_ROOM : roomX / 2) + spareX / 2 - radiusUnits * left;
  const tipY = (lying || full ? roomY / 2 : ARC_ROOM) + spareY / 2 - radiusUnits * top;
  return {
    range,
    factor,
    full,
    radiusUnits,
    at(angle, radius) {
      const [x, y] = arm(angle);
      return [tipX + radiusUnits * radius * x, tipY + radiusUnits * radius * y];
    },
  };
}
