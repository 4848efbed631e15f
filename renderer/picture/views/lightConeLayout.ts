import { direction } from '../../cone/geometry/vector.ts';
import type { Point } from '../../cone/overlay/pen.ts';
import type { PictureNumbers } from '../numbers.ts';
import type { ViewBox } from './view.ts';

/** How far the cone is tilted toward the reader: the height of its circles over their width. */
const TILT = 0.13;
/** Where the middle of the largest field stands on the cone: in front, to the right of the middle. */
const FIELD_AT = Math.PI * 0.34;
const ROOM = { side: 118, top: 34, bottom: 62 };
const ARC_STEPS = 180;
/** Where there is no beginning the diagram ends at this redshift. */
const DEEPEST_WITHOUT_HORIZON = 20;

/** Where things of the light cone stand in the box. Distances are comoving Mpc, which is also c times conformal time. */
export interface ConeOfLight {
  /** Conformal time now: the particle horizon, where there is one. */
  readonly depthMpc: number;
  readonly horizon: boolean;
  readonly unitsPerMpc: number;
  /** On the cone, at a right ascension in radians. */
  readonly at: (raRad: number, comovingMpc: number) => Point;
  /** On the cone's left (-1) or right (1) outline. */
  readonly edge: (side: -1 | 1, comovingMpc: number) => Point;
  /** In the plane of the paper: comoving distance to the right, and conformal time before now. */
  readonly flat: (comovingMpc: number, beforeNowMpc: number) => Point;
  /** Half of the circle of one distance, from the left to the right outline. */
  readonly arc: (comovingMpc: number, half: 'front' | 'back') => Point[];
}

export function layLightCone(numbers: PictureNumbers, box: ViewBox): ConeOfLight {
  const { cosmology, footprint } = numbers;
  const found = cosmology.particleHorizonMpc();
  const horizon = Number.isFinite(found);
  const depthMpc = horizon
    ? found
    : cosmology.comovingMpc(Math.max(DEEPEST_WITHOUT_HORIZON, 1.5 * numbers.deepestRedshift));
  const s = Math.max(
    1e-6,
    Math.min(
      (box.height - ROOM.top - ROOM.bottom) / (depthMpc * (1 + TILT)),
      (box.width - 2 * ROOM.side) / (2 * depthMpc),
    ),
  );
  const x0 = box.width / 2;
  const spare = box.height - ROOM.top - ROOM.bottom - s * depthMpc * (1 + TILT);
  const y0 = ROOM.top + Math.max(0, spare / 2);
  const field = footprint?.fields[0];
  const [cx, cy] = direction(field?.centreRaDeg ?? 0, 0);
  const turn = FIELD_AT - Math.atan2(cy, cx);
  const onCone = (angle: number, mpc: number): Point => [
    x0 + s * mpc * Math.cos(angle),
    y0 + s * mpc * (1 + TILT * Math.sin(angle)),
  ];
  // Where a tilted cone's outline touches its circles.
  const touch = Math.asin(-TILT);
  return {
    depthMpc,
    horizon,
    unitsPerMpc: s,
    at: (ra, mpc) => onCone(ra + turn, mpc),
    edge: (side, mpc) => onCone(side > 0 ? touch : Math.PI - touch, mpc),
    flat: (mpc, beforeNowMpc) => [x0 + s * mpc, y0 + s * beforeNowMpc],
    arc(mpc, half) {
      const from = Math.PI - touch;
      const to = half === 'front' ? touch : 2 * Math.PI + touch;
      return Array.from({ length: ARC_STEPS + 1 }, (_, i) =>
        onCone(from + ((to - from) * i) / ARC_STEPS, mpc),
      );
    },
  };
}
