import { DEEPEST_REDSHIFT } from '../../shared-core/shells/edges.ts';
import type { RadialPixel, RedshiftWindow } from './layout.ts';
import { wholeWindow } from './layout.ts';

/** Closer than this share of the whole there is nothing more to see. */
const CLOSEST = 1e-4;
/** How far one may step back to place shells behind the deepest galaxy. */
const FARTHEST = 4;
/** A window this near to the whole counts as the whole. */
const SAME = 0.004;

/**
 * The window after zooming around a pixel column, which keeps its redshift as far as the ends of the axis allow.
 * @param factor below 1 comes closer, above 1 steps back
 * @returns null where that shows everything again
 */
export function zoomAround(
  scale: RadialPixel,
  px: number,
  factor: number,
  deepestRedshift: number,
): RedshiftWindow | null {
  const { axis, low, high } = scale;
  const whole = axis.at(wholeWindow(axis, deepestRedshift)[1]);
  const limit = Math.min(axis.at(DEEPEST_REDSHIFT), whole * FARTHEST);
  const span = Math.min(limit, Math.max(whole * CLOSEST, (high - low) * factor));
  const around = Math.max(scale.leftPx, Math.min(scale.rightPx, px));
  const share = (around - scale.leftPx) / (scale.rightPx - scale.leftPx);
  const held = scale.readingAt(around);
  return windowFrom(scale, held - share * span, span, limit, whole);
}

/** The window after dragging the axis by pixels to the right; it stops at the observer and at the far end. */
export function panBy(scale: RadialPixel, byPx: number, deepestRedshift: number): RedshiftWindow | null {
  const { axis, low, high } = scale;
  const whole = axis.at(wholeWindow(axis, deepestRedshift)[1]);
  const limit = Math.max(high, Math.min(axis.at(DEEPEST_REDSHIFT), whole * FARTHEST));
  const span = high - low;
  const start = low - (byPx * span) / (scale.rightPx - scale.leftPx);
  return windowFrom(scale, start, span, limit, whole);
}

/** The window that shows the shells with a little room around; null without shells. */
export function windowOfShells(scale: RadialPixel, edges: readonly number[]): RedshiftWindow | null {
  const [first, last] = [edges[0], edges.at(-1)];
  if (first === undefined || last === undefined || !(last > first)) return null;
  const { axis } = scale;
  const [near, far] = [axis.at(first), axis.at(last)];
  const room = 0.05 * (far - near);
  const end = Math.min(axis.at(DEEPEST_REDSHIFT), far + room);
  return [near - room <= 0 ? 0 : axis.redshiftAt(near - room), redshiftAt(scale, end)];
}

function windowFrom(
  scale: RadialPixel,
  start: number,
  span: number,
  limit: number,
  whole: number,
): RedshiftWindow | null {
  const low = Math.max(0, Math.min(start, limit - span));
  const high = low + span;
  if (low <= SAME * whole && Math.abs(high - whole) <= SAME * whole) return null;
  return [redshiftAt(scale, low), redshiftAt(scale, high)];
}

function redshiftAt({ axis }: RadialPixel, reading: number): number {
  if (reading <= 0) return 0;
  return reading >= axis.at(DEEPEST_REDSHIFT) ? DEEPEST_REDSHIFT : axis.redshiftAt(reading);
}
