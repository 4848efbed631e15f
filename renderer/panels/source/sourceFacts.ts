import { type RowAccount, SET_ASIDE_REASONS } from '../../../shared-core/catalogue/catalogue.ts';
import { reasonText } from '../../../shared-core/catalogue/reasons.ts';
import type { StudySource } from '../../../shared-core/study/schema.ts';
import type { Loaded } from '../../engine/protocol.ts';

/** Whether the file that was read is another than the one that the study was made with. */
export function sourceChanged(source: StudySource | null, loaded: Loaded | null): boolean {
  if (source?.kind !== 'file' || loaded === null) return false;
  // Without a fingerprint (saved before the file was read whole) the size is all that is known.
  return source.sha256 === null ? loaded.sizeBytes !== source.sizeBytes : loaded.sha256 !== source.sha256;
}

/** Why rows were set aside, in the order of the tests, only what occurred. */
export function setAsideLines(
  account: RowAccount,
): readonly { readonly count: number; readonly text: string }[] {
  return SET_ASIDE_REASONS.flatMap((reason) => {
    const count = account.reasons[reason] ?? 0;
    return count === 0 ? [] : [{ count, text: reasonText(reason) }];
  });
}
