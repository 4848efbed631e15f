import { Refusal } from '../base/refusal.ts';
import type { Cut } from './catalogue.ts';

/** Is this position in the region? Null where there is no region: every position is. */
export type Contains = ((raDeg: number, decDeg: number) => boolean) | null;

/** Which of the usable rows are wanted. */
export interface Choice {
  readonly contains: Contains;
  readonly cuts: readonly Cut[];
}

/** What `whyLeftOut` answers for a row that stays and for one outside the region; else it is the cut that failed. */
export const STAYS = -1;
export const OUTSIDE_REGION = -2;

/**
 * Why a usable row is left out: OUTSIDE_REGION, the index of the first cut that it fails, or STAYS. `values` holds
 * the number of each cut's column, NaN where there is none.
 *
 * Both ways of selecting, while loading and afterwards in memory, ask this one function, so that they cannot differ.
 */
export function whyLeftOut(
  raDeg: number,
  decDeg: number,
  contains: Contains,
  cuts: readonly Cut[],
  values: ArrayLike<number>,
): number {
  if (contains !== null && !contains(raDeg, decDeg)) return OUTSIDE_REGION;
  for (let i = 0; i < cuts.length; i++) {
    const { min, max } = cuts[i]!;
    const value = values[i]!;
    // Written so that NaN fails a bound; a cut without bounds asks for nothing.
    if ((min !== null && !(value >= min)) || (max !== null && !(value <= max))) return i;
  }
  return STAYS;
}

/** Throws Refusal ('use') for a cut whose bounds are not numbers or the wrong way round. */
export function checkCuts(cuts: readonly Cut[]): void {
  for (const { column, min, max } of cuts) {
    if (Number.isNaN(min) || Number.isNaN(max)) {
      throw new Refusal(
        `The cut on "${column}" has a bound that is not a number: give numbers or leave that end open.`,
        'use',
      );
    }
    if (min !== null && max !== null && min > max) {
      throw new Refusal(
        `The cut on "${column}" keeps from ${min} to ${max}, where the first bound must not be above the second: swap them.`,
        'use',
      );
    }
  }
}

/** The value that failed a cut, for the list of rows set aside; null where there was no number. */
export function cutText(value: number): string | null {
  return Number.isNaN(value) ? null : String(value);
}
