import { DEEPEST_REDSHIFT } from '../../shared-core/shells/edges.ts';
import type { RadialAxis } from '../../shared-core/shells/radial.ts';

/**
 * Insets, in CSS pixels, of the strip's plot within its width. The cone above keeps the same ones, so that one
 * redshift lies in one pixel column in both.
 */
export const STRIP_LEFT_PX = 64;
export const STRIP_RIGHT_PX = 64;

/** The part of the radial axis in view. */
export type RedshiftWindow = readonly [zLow: number, zHigh: number];

/** Room behind the deepest thing shown, as a share of the reading. */
const ROOM_BEHIND = 0.04;

/** The straight line between the reading of the radial axis and the pixel column. */
export interface RadialPixel {
  readonly leftPx: number;
  readonly rightPx: number;
  /** Readings at the two ends. */
  readonly low: number;
  readonly high: number;
  readonly axis: RadialAxis;
  /** Pixel column of a redshift; outside the plot for one that is out of view. */
  at(z: number): number;
  atReading(reading: number): number;
  readingAt(px: number): number;
  /** The redshift under a pixel column, within 0..1100. */
  redshiftAt(px: number): number;
}

/**
 * Where redshifts lie across a strip of a given width.
 * @param window redshifts at the left and right end of the plot
 * @param widthPx of the whole strip, insets included; a plot narrower than a pixel counts as one
 */
export function radialPixel(axis: RadialAxis, window: RedshiftWindow, widthPx: number): RadialPixel {
  const leftPx = STRIP_LEFT_PX;
  const rightPx = Math.max(leftPx + 1, widthPx - STRIP_RIGHT_PX);
  const [low, high] = [axis.at(window[0]), axis.at(window[1])];
  const pxPerReading = (rightPx - leftPx) / (high - low);
  const deepest = axis.at(DEEPEST_REDSHIFT);
  const atReading = (reading: number) => leftPx + (reading - low) * pxPerReading;
  const readingAt = (px: number) => low + (px - leftPx) / pxPerReading;
  return {
    leftPx,
    rightPx,
    low,
    high,
    axis,
    at: (z) => atReading(axis.at(z)),
    atReading,
    readingAt,
    redshiftAt(px) {
      const reading = readingAt(px);
      if (reading <= 0) return 0;
      return reading >= deepest ? DEEPEST_REDSHIFT : axis.redshiftAt(reading);
    },
  };
}

/**
 * The window that shows everything: from the observer to a little behind the deepest galaxy or edge.
 * @param deepestRedshift above 0 and at most 1100
 */
export function wholeWindow(axis: RadialAxis, deepestRedshift: number): RedshiftWindow {
  const reading = axis.at(deepestRedshift) * (1 + ROOM_BEHIND);
  return [0, reading >= axis.at(DEEPEST_REDSHIFT) ? DEEPEST_REDSHIFT : axis.redshiftAt(reading)];
}

/** What cone and strip show: the window that was chosen, or else everything. */
export function shownWindow(
  chosen: RedshiftWindow | null,
  axis: RadialAxis,
  deepestRedshift: number,
): RedshiftWindow {
  return chosen !== null && chosen[1] > chosen[0] ? chosen : wholeWindow(axis, deepestRedshift);
}
