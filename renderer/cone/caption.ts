import { roundTo } from '../../shared-core/base/roundTo.ts';
import type { RadialReading, ViewName } from './types.ts';

export interface CaptionFacts {
  readonly view: ViewName;
  readonly reading: RadialReading;
  /** Name (may be empty) and factor of each lane drawn. */
  readonly lanes: readonly { readonly name: string; readonly sidewaysFactor: number }[];
  readonly field: number;
  readonly fieldCount: number;
  readonly fieldName: string;
  readonly perspective: boolean;
  readonly estimated: boolean;
}

/** A factor as it is said: "sideways × 12". */
export const sidewaysText = (factor: number): string => `sideways × ${roundTo(factor, 3)}`;

/** What a reader must know to judge the picture: what is stretched, what is not to scale, what is left out. */
export function captionLines(facts: CaptionFacts): string[] {
  const lines: string[] = [];
  const single = facts.view !== 'parallel' && facts.lanes.length === 1;
  const oneOfMany = single && facts.fieldCount > 1;
  if (oneOfMany) {
    const name = facts.fieldName === '' ? '' : `: ${facts.fieldName}`;
    lines.push(`field ${facts.field + 1} of ${facts.fieldCount}${name}`);
  }
  if (facts.view === 'parallel' && facts.fieldCount > 1) {
    lines.push('fields side by side on one radial axis, not in their true directions');
  }
  const factor = facts.lanes[0]?.sidewaysFactor ?? 1;
  // Parallel lanes carry their own factors beside them.
  if (facts.view !== 'parallel' && factor !== 1) lines.push(sidewaysText(factor));
  if (facts.reading === 'redshift') lines.push('radius is redshift: lengths and shapes are not to scale');
  if (facts.reading === 'lookback')
    lines.push('radius is lookback time: lengths and shapes are not to scale');
  if (facts.perspective) lines.push('in perspective');
  if (facts.estimated) lines.push('outline estimated from the catalogue, and smoothed');
  return lines;
}
