import type { Region } from '../../../shared-core/sky/region.ts';
import { change } from '../../../shared-core/study/edits.ts';
import type { Study } from '../../../shared-core/study/schema.ts';
import type { App } from '../../state/app.ts';

const CHANGED_MEANWHILE = 'The region was changed in the meantime: look at it and do this again.';

/** A region that is to take the place of another. */
interface RegionEdit {
  readonly from: Region | null;
  readonly next: Region | null;
  readonly label: string;
}

/**
 * Takes a region into the study once the engine has found that it can be.
 *
 * @param signal raised when it is not wanted any more: then nothing is changed
 * @returns why it was not taken, or null when it was, or is not wanted any more
 */
export async function putRegion(
  { studyState, engine }: Pick<App, 'studyState' | 'engine'>,
  { from, next, label }: RegionEdit,
  signal?: AbortSignal,
): Promise<string | null> {
  const why = next === null ? null : await engine.client.checkRegions([next]).catch(sentence);
  if (signal?.aborted) return null;
  // Another region has come in the meantime: these shapes are not of it.
  if (studyState.study.peek().region !== from) return CHANGED_MEANWHILE;
  if (why === null) studyState.perform(change(label, { region: next as Study['region'] }));
  return why;
}

const sentence = (error: unknown): string => (error instanceof Error ? error.message : String(error));
