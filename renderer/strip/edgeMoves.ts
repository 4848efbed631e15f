import { DEEPEST_REDSHIFT } from '../../shared-core/shells/edges.ts';
import type { RadialPixel } from './layout.ts';
import type { Reading } from './readings.ts';
import { roundStepAbove, toMultiple } from './roundValues.ts';

/** Where an edge may stand: strictly between its neighbours. */
export interface EdgeLimits {
  readonly low: number;
  readonly high: number;
}

const SNAP_PX = 5;
/** Fine steps of the keyboard for one step of snapping. */
const FINE_PER_SNAP = 10;
const COARSE_STEPS = 5;

/**
 * The redshifts between which an edge moves. It stops about a pixel before its neighbours, or at a quarter of their
 * distance where they are closer than a few pixels; at a redshift of few digits.
 * @param zPerPx redshift in a pixel at that edge
 */
export function edgeLimits(edges: readonly number[], index: number, zPerPx: number): EdgeLimits {
  const below = edges[index - 1];
  const above = edges[index + 1];
  const gap = Math.min(zPerPx, ((above ?? Number.POSITIVE_INFINITY) - (below ?? 0)) / 4);
  const step = 10 ** -decimalsFor(gap);
  return {
    low: below === undefined ? 0 : toMultiple(below + gap, step, Math.ceil),
    high: above === undefined ? DEEPEST_REDSHIFT : toMultiple(above - gap, step, Math.floor),
  };
}

/** Redshift in a pixel around a redshift. */
export function redshiftPerPixel(scale: RadialPixel, z: number): number {
  const px = scale.at(z);
  return Math.abs(scale.redshiftAt(px + 0.5) - scale.redshiftAt(px - 0.5));
}

/** The round step, in the shown reading, that edges jump by when they snap: at least 5 px wide. */
export function snapStep(scale: RadialPixel, factor: number): number {
  return roundStepAbove((((scale.high - scale.low) * factor) / (scale.rightPx - scale.leftPx)) * SNAP_PX);
}

/** A redshift with no more decimals than the pixel that it was pointed at can tell. */
export function tidyRedshift(z: number, zPerPx: number): number {
  return Number(z.toFixed(decimalsFor(zPerPx)));
}

// Decimals whose last one is worth at most half a pixel.
function decimalsFor(zPerPx: number): number {
  return Math.min(12, Math.max(0, Math.ceil(-Math.log10(zPerPx / 2))));
}

/** Where an edge dragged to a pixel column comes to stand. It stops at its limits and at the ends of the plot. */
export function draggedTo(
  px: number,
  limits: EdgeLimits,
  scale: RadialPixel,
  reading: Reading,
  snap: boolean,
): number {
  const inside = Math.min(scale.rightPx, Math.max(scale.leftPx, px));
  const pointed = scale.redshiftAt(inside);
  if (!snap) return within(tidyRedshift(pointed, redshiftPerPixel(scale, pointed)), limits);
  return snapped(scale.readingAt(inside) * reading.factor, snapStep(scale, reading.factor), limits, reading);
}

/** What a key asks of an edge, as a redshift; null for a key that moves nothing. */
export function movedByKey(
  key: string,
  coarse: boolean,
  z: number,
  limits: EdgeLimits,
  scale: RadialPixel,
  reading: Reading,
  snap: boolean,
): number | null {
  if (key === 'Home') return limits.low;
  // Behind the last edge there is no neighbour: it goes to the end of what is in view.
  if (key === 'End')
    return limits.high < DEEPEST_REDSHIFT ? limits.high : Math.max(z, scale.redshiftAt(scale.rightPx));
  const direction = { ArrowRight: 1, ArrowUp: 1, ArrowLeft: -1, ArrowDown: -1 }[key];
  if (direction === undefined) return null;
  const wide = snapStep(scale, reading.factor);
  const fine = snap ? wide : wide / FINE_PER_SNAP;
  const step = coarse ? (snap ? wide * COARSE_STEPS : wide) : fine;
  // To the next multiple, so that a few presses lead to round numbers.
  const shown = reading.shownAt(z) / step;
  const next = direction > 0 ? Math.floor(shown + 1 + 1e-6) : Math.ceil(shown - 1 - 1e-6);
  return within(redshiftOf(Math.max(0, next * step), step, reading), limits);
}

function snapped(shown: number, step: number, limits: EdgeLimits, reading: Reading): number {
  const [low, high] = [reading.shownAt(limits.low), reading.shownAt(limits.high)];
  let round = toMultiple(shown, step);
  if (round < low) round = toMultiple(low, step, Math.ceil);
  if (round > high) round = toMultiple(high, step, Math.floor);
  return within(redshiftOf(Math.max(0, round), step, reading), limits);
}

function redshiftOf(shown: number, step: number, reading: Reading): number {
  const round = toMultiple(shown, step);
  if (reading.shownAt(DEEPEST_REDSHIFT) <= round) return DEEPEST_REDSHIFT;
  return reading.exactRedshiftAt(round);
}

function within(z: number, { low, high }: EdgeLimits): number {
  return Math.min(high, Math.max(low, z));
}
