import { laneHeights, laneShare, proposeSidewaysFactor } from './arrangement.ts';
import type { PreparedField } from './preparedField.ts';
import type { Viewport } from './projection.ts';

/** Room for rulers above and below a cone seen side-on. */
const SIDE_ROOM = { top: 46, bottom: 104 };
/** A lane's cone leaves a part of the lane free. */
const LANE_SHARE = 0.86;

/** What the heights of cones seen side-on depend on. */
export interface SideOn {
  readonly fields: readonly PreparedField[];
  readonly parallel: boolean;
  readonly viewport: Viewport;
  readonly insets: { readonly leftPx: number; readonly rightPx: number };
  /** The field looked at. */
  readonly current: number;
  /** Its sideways factor, where one was chosen; those of the others are proposed. */
  readonly chosenFactor: number | null;
}

/** One sideways factor a field. */
export function sidewaysFactors(side: SideOn): number[] {
  const natural = naturalPx(side);
  const rooms = side.parallel ? lanesPx(side).map((h) => h * LANE_SHARE) : natural.map(() => roomPx(side));
  // A lane of several is opened as soon as it can be; a cone alone keeps its true shape where that fills the stage.
  const slack = side.parallel ? 1.2 : 2.5;
  const proposed = natural.map((px, i) => proposeSidewaysFactor(px, rooms[i]!, slack));
  const { current, chosenFactor } = side;
  return proposed.map((factor, i) => (i === current ? (chosenFactor ?? factor) : factor));
}

/** Heights of the parallel lanes in display units, gaps included. */
export function laneHeightsOf(side: SideOn): number[] {
  return lanesPx(side).map((px) => px * fullScale(side));
}

/** Display height at the middle of the stage for cones at rest in their room between the rulers. */
export function restingHeight(side: SideOn, unitsPerPixel: number): number {
  const { enlarged = 1 } = side.viewport;
  const shift = ((SIDE_ROOM.bottom - SIDE_ROOM.top) / 2) * enlarged * unitsPerPixel;
  const field = side.fields[side.current];
  if (!field) return -shift;
  const factors = sidewaysFactors(side);
  if (side.parallel) return middleOfLanes(side, factors) - shift;
  const factor = factors[side.current]!;
  return ((field.extent.alongMax + field.extent.alongMin) / 2) * factor - shift;
}

/** Half way from the top of the first cone to the foot of the last: a cone need not fill its lane. */
function middleOfLanes(side: SideOn, factors: readonly number[]): number {
  const heights = laneHeightsOf(side);
  const end = side.fields.length - 1;
  const free = (i: number): { above: number; below: number } => {
    const { alongMin, alongMax } = side.fields[i]!.extent;
    const share = laneShare(side.fields[i]!.extent);
    return {
      above: heights[i]! * share - alongMax * factors[i]!,
      below: heights[i]! * (1 - share) + alongMin * factors[i]!,
    };
  };
  return (free(end).below - free(0).above) / 2;
}

/** Display units of a pixel when the whole radial scale lies between the insets. */
function fullScale({ viewport, insets }: SideOn): number {
  return 1 / Math.max(1, viewport.widthPx - insets.leftPx - insets.rightPx);
}

function roomPx({ viewport }: SideOn): number {
  const { heightPx, enlarged = 1 } = viewport;
  return Math.max(60, heightPx - (SIDE_ROOM.top + SIDE_ROOM.bottom) * enlarged);
}

/** Heights of the cones at true scale. */
function naturalPx(side: SideOn): number[] {
  const scale = fullScale(side);
  return side.fields.map(({ extent }) => (extent.alongMax - extent.alongMin) / scale);
}

function lanesPx(side: SideOn): number[] {
  return side.fields.length > 0 ? laneHeights(naturalPx(side), roomPx(side)) : [];
}
