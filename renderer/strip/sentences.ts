import { roundTo } from '../../shared-core/base/roundTo.ts';
import type { App } from '../state/app.ts';
import type { ShownProfile } from './stripModel.ts';
import type { ProfileWords } from './words.ts';

/** Why there is no histogram, and what to do while there are no shells; null where there is nothing to say. */
export function stripSentence({ studyState, engine, derived, files }: App): {
  readonly empty: string | null;
  readonly hint: string | null;
} {
  const { source, edges } = studyState.study.value;
  const missing = files.missingSource.value !== null;
  return {
    empty:
      derived.sample.value.count > 0
        ? null
        : missing
          ? NOT_AT_HAND
          : emptySentence(source === null, edges.length > 1, engine),
    hint:
      edges.length === 0
        ? 'No shells yet: double-click to set an edge, or choose equal shells above.'
        : edges.length === 1
          ? 'One edge: set a second to make a shell.'
          : null,
  };
}

const NOT_AT_HAND = 'The catalogue is not at hand: no galaxies to count.';

function emptySentence(noSource: boolean, hasShells: boolean, { progress, loaded }: App['engine']): string {
  if (noSource)
    return hasShells
      ? 'No catalogue yet: the shells are a plan.'
      : 'No catalogue yet: open one to see its density.';
  if (progress.value !== null) return 'The catalogue is being read.';
  if (loaded.value === null) return 'The catalogue could not be read: no galaxies to count.';
  if (loaded.value.account.rowsRead === 0)
    return 'The catalogue has a header and no rows: no galaxies to count.';
  if (loaded.value.account.kept === 0)
    return 'No row of the catalogue can be used: see Source for the reasons.';
  return 'No galaxy is left inside the region and the cuts.';
}

/** What a sentence about the histogram needs to know of it: the part in view. */
export function profileWords({ bins, count, smooth, power }: ShownProfile): ProfileWords {
  let galaxies = 0;
  let best = -1;
  let above: [number, number] | null = null;
  for (let i = bins.first; i < bins.end; i++) {
    galaxies += count[i]!;
    if (count[i]! > 0 && (best < 0 || smooth[i]! > smooth[best]!)) best = i;
    if (power === null || !(power[i]! > 1)) continue;
    above ??= [bins.shownEdges[i]!, 0];
    above[1] = bins.shownEdges[i + 1]!;
  }
  const middle = (i: number) => (bins.shownEdges[i]! + bins.shownEdges[i + 1]!) / 2;
  return {
    galaxies,
    peak: best < 0 ? null : { at: roundTo(middle(best), 10), density: smooth[best]! },
    above: power === null ? 'unknown' : above,
  };
}
