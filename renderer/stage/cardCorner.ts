/** A place on the stage, CSS pixels from its top left. */
export interface StagePoint {
  readonly xPx: number;
  readonly yPx: number;
}

interface Size {
  readonly widthPx: number;
  readonly heightPx: number;
}

/** Corners of the stage, the one that is taken where nothing stands against it first. */
const CORNERS = ['bottom-right', 'top-right', 'bottom-left', 'top-left'] as const;
export type Corner = (typeof CORNERS)[number];

/** Room around a point: its ring, and a little. */
const CLEAR_PX = 16;
/** The label of a measured line stands this far above its middle. */
const LABEL_UP_PX = 20;
const STEPS_ALONG = 8;

/**
 * The corner for a card that must not lie on the points: the present one while it is clear of them, or else the one
 * that is farthest from the nearest of them. A measured line is as many points.
 */
export function cardCorner(points: readonly StagePoint[], stage: Size, card: Size, now: Corner): Corner {
  const clearance = (corner: Corner): number =>
    Math.min(Number.POSITIVE_INFINITY, ...points.map((point) => distance(point, corner, stage, card)));
  if (clearance(now) > CLEAR_PX) return now;
  const far = CORNERS.map(clearance);
  return CORNERS[far.indexOf(Math.max(...far))]!;
}

/** Everything that a measured pair shows: the two, the line between them, and where its label stands. */
export function pairPoints(picked: readonly StagePoint[]): readonly StagePoint[] {
  const [a, b] = picked;
  if (a === undefined || b === undefined) return picked;
  const at = (share: number) => ({
    xPx: a.xPx + share * (b.xPx - a.xPx),
    yPx: a.yPx + share * (b.yPx - a.yPx),
  });
  const middle = at(0.5);
  return [
    ...Array.from({ length: STEPS_ALONG + 1 }, (_, i) => at(i / STEPS_ALONG)),
    { ...middle, yPx: middle.yPx - LABEL_UP_PX },
  ];
}

/** From a point to the nearest side of the card in a corner; 0 inside of it. */
function distance({ xPx, yPx }: StagePoint, corner: Corner, stage: Size, card: Size): number {
  const left = corner.endsWith('left') ? 0 : stage.widthPx - card.widthPx;
  const top = corner.startsWith('top') ? 0 : stage.heightPx - card.heightPx;
  const dx = Math.max(left - xPx, 0, xPx - left - card.widthPx);
  const dy = Math.max(top - yPx, 0, yPx - top - card.heightPx);
  return Math.hypot(dx, dy);
}
