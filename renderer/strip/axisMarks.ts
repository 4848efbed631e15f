import { roundTo } from '../../shared-core/base/roundTo.ts';
import type { RadialPixel } from './layout.ts';
import type { Reading } from './readings.ts';
import { roundValues } from './roundValues.ts';

interface AxisMark {
  readonly value: number;
  readonly px: number;
  /** Null on a mark between two labelled ones. */
  readonly text: string | null;
}

/** Width of a digit over the size of the type, of the tabular figures in use. */
export const DIGIT_WIDTH = 0.62;
const DIGITS_BETWEEN = 2;
const LEAST_MARK_GAP_PX = 6;

/**
 * Marks of one reading along the strip, at its own round values, wherever the radial axis puts them. Labels keep two
 * digits' room between them.
 */
export function axisMarks(
  reading: Reading,
  scale: RadialPixel,
  window: readonly [number, number],
  fontPx: number,
) {
  const [low, high] = [reading.shownAt(window[0]), reading.shownAt(window[1])];
  const own = reading.kind === scale.axis.kind;
  const pxOf = own
    ? (value: number) => scale.atReading(value / reading.factor)
    : (value: number) => scale.at(reading.redshiftAt(value));
  const digits = String(Math.floor(high)).length;
  const labelGap = (step: number) => (digits + fractionLength(step) + DIGITS_BETWEEN) * DIGIT_WIDTH * fontPx;
  const labelled = roundValues(low, high, pxOf, labelGap);
  const all = roundValues(low, high, pxOf, () => LEAST_MARK_GAP_PX);
  const texts = new Set(labelled);
  const marks: AxisMark[] = labelled.map((value) => ({ value, px: pxOf(value), text: markText(value) }));
  for (const value of all) if (!texts.has(value)) marks.push({ value, px: pxOf(value), text: null });
  return marks;
}

/** A round number on an axis: no digits beyond its own, thousands parted by a narrow space from 10 000 on. */
export function markText(value: number): string {
  const text = String(roundTo(value, 10));
  if (Math.abs(value) < 10_000 || text.includes('e')) return text;
  return text.replace(/\B(?=(\d{3})+$)/g, '\u202f');
}

/** Characters of the point and what follows it. */
function fractionLength(step: number): number {
  return step >= 1 ? 0 : 1 + Math.ceil(-Math.log10(step) - 1e-9);
}
