import { useLayoutEffect, useMemo } from 'preact/hooks';
import type { PictureFacts } from '../../picture/numbers.ts';
import type { App } from '../../state/app.ts';
import type { EngineState } from '../../state/engineState.ts';
import { notAtHand } from '../notAtHand.ts';
import type { PictureClient } from './pictureClient.ts';

/**
 * Gives the worker what the window has made of the study.
 * @returns `facts`: new ones whenever they change, null while they are being made; `waiting`: what is waited for
 */
export function usePictureFacts(
  { engine, studyState, files }: App,
  client: PictureClient,
): { readonly facts: Omit<PictureFacts, 'fingerprint'> | null; readonly waiting: string | null } {
  const study = studyState.study.value;
  const [selected, background, density, columns] = [
    engine.selected.value,
    engine.background.value,
    engine.density.value,
    engine.columns.value,
  ];
  const waiting = whyNoPicture({ engine, files });
  // A picture depends on the study whole: its name stands over it, its fingerprint within.
  const facts = useMemo(
    () => ({ study, selected, background, density, columns }),
    [study, selected, background, density, columns],
  );
  useLayoutEffect(() => {
    if (waiting === null) client.setFacts(facts);
  }, [client, facts, waiting]);
  return { facts: waiting === null ? facts : null, waiting };
}

/** Why nothing can be drawn of the study as it is now: galaxies of an earlier one must never stand under its numbers. */
export function whyNoPicture({ engine, files }: Pick<App, 'engine' | 'files'>): string | null {
  const failure = engine.failure.value;
  if (failure !== null) return failureText(failure);
  const missing = notAtHand({ files });
  if (missing !== null) return missing;
  return engine.settled.value ? null : 'The catalogue is still being read: the picture follows.';
}

/** A colour that cannot be made is no fault of the catalogue: its sentence says all. */
const failureText = ({ stage, sentence }: NonNullable<EngineState['failure']['value']>): string =>
  stage === 'columns' || stage === 'density'
    ? sentence
    : `The catalogue could not be used, so there is no picture of it: ${sentence}`;
