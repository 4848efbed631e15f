import type { StripSize } from './stripModel.ts';

/** Heights, from the top of the drawing, of what stands one below the other. */
export interface StripRows {
  readonly plotTop: number;
  readonly plotBottom: number;
  readonly railBottom: number;
  /** Top of each of the three axes, the linear one first. */
  readonly axisTops: readonly [number, number, number];
  readonly axisHeight: number;
}

const LEAST_PLOT_PX = 20;
/** The rail under the plot, on which the handles of the edges run. */
const RAIL_PX = 14;

export function stripRows({ heightPx, fontPx }: StripSize): StripRows {
  const axisHeight = Math.round(fontPx * 1.5) + 1;
  const plotTop = Math.round(fontPx * 1.45);
  const plotBottom = Math.max(plotTop + LEAST_PLOT_PX, Math.floor(heightPx - 3 * axisHeight - RAIL_PX - 2));
  const railBottom = plotBottom + RAIL_PX;
  return {
    plotTop,
    plotBottom,
    railBottom,
    axisHeight,
    axisTops: [railBottom, railBottom + axisHeight, railBottom + 2 * axisHeight],
  };
}
