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
/** From this height on the axes are given room; WCAG 2.2 (2.5.8) asks for targets of 24 px. */
const ROOMY_PX = 190;
const TARGET_PX = 24;
/** The rail under the plot, on which the handles of the edges run, over the size of its type. */
const RAIL_IN_TYPE = 14 / 12;

export function stripRows({ heightPx, fontPx }: StripSize): StripRows {
  // Each axis has its name as a button before it: as tall as a target should be, where there is room.
  const tight = Math.round(fontPx * 1.5) + 1;
  const axisHeight = heightPx >= ROOMY_PX ? Math.max(TARGET_PX, tight) : tight;
  const plotTop = Math.round(fontPx * 1.45);
  const railPx = Math.round(fontPx * RAIL_IN_TYPE);
  const plotBottom = Math.max(plotTop + LEAST_PLOT_PX, Math.floor(heightPx - 3 * axisHeight - railPx - 2));
  const railBottom = plotBottom + railPx;
  return {
    plotTop,
    plotBottom,
    railBottom,
    axisHeight,
    axisTops: [railBottom, railBottom + axisHeight, railBottom + 2 * axisHeight],
  };
}
