import { roundTo } from '../../../shared-core/base/roundTo.ts';
import type { ViewName } from '../types.ts';
import { type LateralExtent, SKY_FRAME } from './fieldFrame.ts';
import { modelMatrix } from './projection.ts';
import type { Frame } from './vector.ts';

/** What the arrangement needs to know of a field. */
export interface ArrangedField {
  readonly surrounds?: boolean;
  readonly frame: Frame;
  readonly extent: LateralExtent;
}

/** A field that is drawn: its matrix from sky direction times radius into display space. */
export interface Lane {
  readonly field: number;
  readonly model: Float64Array;
  readonly sidewaysFactor: number;
  /** Height of the cone's axis in display space. */
  readonly lift: number;
}

/** Sideways factors that are easy to say. */
const NICE = [1, 1.2, 1.5, 2, 2.5, 3, 4, 5, 6, 7, 8, 9, 10];

/** The greatest easily said factor that is not above x. */
export function niceFactor(x: number): number {
  const power = 10 ** Math.floor(Math.log10(x));
  const lead = x / power;
  let best = 1;
  for (const nice of NICE) if (nice <= lead * (1 + 1e-9)) best = nice;
  return roundTo(best * power, 3);
}

/**
 * The sideways factor to offer for a cone that would be `naturalPx` high at true scale where there is room for
 * `availablePx`: 1 where that fits and filling the room would take no more than `slack`, else the easily said factor that fills it.
 */
export function proposeSidewaysFactor(naturalPx: number, availablePx: number, slack = 2.5): number {
  if (!(naturalPx > 0) || !(availablePx > 0)) return 1;
  const fit = availablePx / naturalPx;
  if (fit >= 1 && fit <= slack) return 1;
  return niceFactor(Math.min(fit, 1000));
}

/**
 * The view that fits a region: around the observer for a wide one, its cones parallel on one axis for several fields,
 * else side-on.
 */
export function fittingView(fieldCount: number, wide: boolean): ViewName {
  if (wide || fieldCount === 0) return 'aroundTheObserver';
  return fieldCount > 1 ? 'parallel' : 'sideOn';
}

/**
 * Heights of parallel lanes in pixels: each field gets what it needs at true scale when there is room; narrow ones
 * get at least an equal share of two fifths of the room so that they can be opened, wide ones share the rest by need.
 */
export function laneHeights(naturalPx: readonly number[], availablePx: number): number[] {
  const least = Math.min(
    availablePx / naturalPx.length,
    Math.max(60, availablePx / (2.5 * naturalPx.length)),
  );
  const wanted = naturalPx.map((h) => Math.max(h, least));
  const total = wanted.reduce((sum, h) => sum + h, 0);
  if (total <= availablePx) {
    const extra = (availablePx - total) / naturalPx.length;
    return wanted.map((h) => h + extra);
  }
  const above = wanted.map((h) => h - least);
  const aboveTotal = above.reduce((sum, h) => sum + h, 0);
  const room = availablePx - least * naturalPx.length;
  return above.map((h) => least + (aboveTotal > 0 ? (h * room) / aboveTotal : 0));
}

/** How much of a lane is above its axis. The lane's middle is that of the cone at its far end, which need not be the axis. */
export function laneShare({ alongMin, alongMax }: LateralExtent): number {
  return alongMax - alongMin > 0 ? alongMax / (alongMax - alongMin) : 0.5;
}

/** The frame in which all fields are shown in their true directions: a single field's own, else that of the sky. */
export function commonFrame(fields: readonly ArrangedField[]): Frame {
  const only = fields.length === 1 ? fields[0]! : undefined;
  return only && !only.surrounds ? only.frame : SKY_FRAME;
}

/**
 * The lanes of a view. `factors` has one sideways factor a field; it does not act where fields are shown in their
 * true directions, unless there is only one.
 *
 * @param far displayed radius of the far end
 * @param heights lane heights in display units for the parallel view
 */
export function lanes(
  view: ViewName,
  fields: readonly ArrangedField[],
  current: number,
  wide: boolean,
  factors: readonly number[],
  heights: readonly number[],
): Lane[] {
  const lane = (field: number, frame: Frame, sidewaysFactor: number, lift: number): Lane => ({
    field,
    model: modelMatrix(frame, sidewaysFactor, lift),
    sidewaysFactor,
    lift,
  });
  if (view === 'parallel' && fields.length > 1) {
    const total = heights.reduce((sum, h) => sum + h, 0);
    let top = total / 2;
    return fields.map((field, i) => {
      const factor = factors[i]!;
      const height = heights[i]!;
      const lift = top - height * laneShare(field.extent);
      top -= height;
      return lane(i, field.frame, factor, lift);
    });
  }
  if (view === 'whole' || view === 'aroundTheObserver') {
    const frame = commonFrame(fields);
    const factor = frame === SKY_FRAME || wide ? 1 : factors[0]!;
    return fields.map((_, i) => lane(i, frame, factor, 0));
  }
  const field = fields[current];
  return field ? [lane(current, field.frame, factors[current]!, 0)] : [];
}
