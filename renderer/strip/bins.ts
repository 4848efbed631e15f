import { roundTo } from '../../shared-core/base/roundTo.ts';
import { DEEPEST_REDSHIFT } from '../../shared-core/shells/edges.ts';
import { rankBelow, type SortedSample } from '../../shared-core/shells/sample.ts';
import type { RadialPixel, RedshiftWindow } from './layout.ts';
import { roundStepAbove } from './roundValues.ts';

/** Bins of the histogram: equal in the radial reading, at round numbers, so that they stand still while one pans. */
export interface Bins {
  readonly zEdges: Float64Array;
  /** Edges in the shown reading; multiples of `step`. */
  readonly shownEdges: Float64Array;
  readonly step: number;
  /** Bins before `first` and from `end` on lie out of view; they are there for the smooth curve. */
  readonly first: number;
  readonly end: number;
}

const NARROWEST_PX = 4;
const FEWEST = 12;
/** Standard deviation of the smoothing, in bins. */
export const SMOOTHING_BINS = 1.5;
const REACH = Math.ceil(4 * SMOOTHING_BINS);

/**
 * How finely to count: twice the cube root of the galaxies in view (the Rice rule: common practice, no source),
 * doubled since the curve smooths the bins again; never narrower than 4 px.
 */
export function binsWanted(galaxiesInView: number, plotPx: number): number {
  const most = Math.max(1, Math.floor(plotPx / NARROWEST_PX));
  return Math.min(most, Math.max(FEWEST, Math.round(4 * Math.cbrt(galaxiesInView))));
}

/** @param factor shown reading = reading of the axis x factor */
export function binsOf(
  scale: RadialPixel,
  window: RedshiftWindow,
  factor: number,
  sample: SortedSample,
): Bins {
  const { axis, low, high } = scale;
  const inView = rankBelow(sample, window[1], true) - rankBelow(sample, window[0]);
  const span = (high - low) * factor;
  const step = roundStepAbove(span / binsWanted(inView, scale.rightPx - scale.leftPx));
  const deepest = axis.at(DEEPEST_REDSHIFT) * factor;
  const firstSeen = Math.max(0, Math.floor((low * factor) / step + 1e-9));
  const lastSeen = Math.max(firstSeen + 1, Math.ceil((high * factor) / step - 1e-9));
  const from = Math.max(0, firstSeen - REACH);
  // Where the axis ends, the last bin is cut short rather than running past the deepest redshift.
  const to = Math.min(lastSeen + REACH, Math.max(firstSeen + 1, Math.ceil(deepest / step - 1e-9)));
  const count = to - from;
  const shownEdges = new Float64Array(count + 1);
  const zEdges = new Float64Array(count + 1);
  for (let i = 0; i <= count; i++) {
    const shown = roundTo((from + i) * step, 12);
    const isDeepest = shown >= deepest;
    shownEdges[i] = isDeepest ? deepest : shown;
    zEdges[i] = isDeepest ? DEEPEST_REDSHIFT : axis.redshiftAt(shown / factor);
  }
  return { zEdges, shownEdges, step, first: firstSeen - from, end: Math.min(lastSeen, to) - from };
}
