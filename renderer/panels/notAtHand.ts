import type { App } from '../state/app.ts';

/** That the study's catalogue is not at hand, as it is said everywhere; null when it is, or when there is none. */
export function notAtHand({ files }: Pick<App, 'files'>): string | null {
  const missing = files.missingSource.value;
  return missing === null ? null : `The catalogue “${missing.name}” is not at hand.`;
}

/** Why the ledger is not given out; null when it is. A plan has its volumes to give. */
export function whyWithheld(app: App): string | null {
  const { engine, derived, studyState } = app;
  const missing = notAtHand(app);
  if (missing !== null) return `${missing} Point at it to have the numbers of its galaxies.`;
  if (
    studyState.study.value.source !== null &&
    engine.selected.value === null &&
    engine.failure.value !== null
  )
    return 'The catalogue could not be read, so there are no numbers of its galaxies.';
  if (!engine.fresh.value)
    return engine.failure.value === null
      ? 'The catalogue is still being read.'
      : 'The numbers are not those of the study as it is now: see Source.';
  return derived.shells.value.length === 0 ? 'There are no shells yet.' : null;
}
