import { computed, type ReadonlySignal, signal } from '@preact/signals';
import { Refusal } from '../../shared-core/base/refusal.ts';
import type { Edit } from '../../shared-core/study/edits.ts';
import { type History, perform, redo, startHistory, undo } from '../../shared-core/study/history.ts';
import type { Study } from '../../shared-core/study/schema.ts';
import type { Notices } from './notices.ts';

/** The open study, its history, and whether it differs from what was saved. */
export interface StudyState {
  readonly study: ReadonlySignal<Study>;
  readonly unsaved: ReadonlySignal<boolean>;
  /** What undo and redo would take back or do again; null when there is nothing. */
  readonly undoLabel: ReadonlySignal<string | null>;
  readonly redoLabel: ReadonlySignal<string | null>;
  /**
   * Applies an edit; where it is refused the study stays.
   * @param onRefused takes the refusal's sentence; a notice if not given
   * @returns whether it was applied
   */
  perform(edit: Edit, onRefused?: (sentence: string) => void): boolean;
  /** The latest earlier state that fits; null when none does. */
  earlier(fits: (study: Study) => boolean): Study | null;
  /** Takes back every step since that state; redo brings them again. */
  backTo(study: Study): void;
  undo(): void;
  redo(): void;
  /** Opens another study, with a history of its own. */
  replace(study: Study, saved: boolean): void;
  /** The present state has been saved. */
  markSaved(study: Study): void;
  /** Records a fact that nobody did and nobody undoes (a fingerprint read from the file). */
  amend(change: (study: Study) => Study): void;
}

export function createStudyState(initial: Study, notices: Notices): StudyState {
  const history = signal<History>(startHistory(initial));
  const saved = signal<Study | null>(initial);
  const study = computed(() => history.value.present);
  return {
    study,
    unsaved: computed(() => study.value !== saved.value),
    undoLabel: computed(() => history.value.past.at(-1)?.label ?? null),
    redoLabel: computed(() => history.value.future.at(-1)?.label ?? null),
    perform(edit, onRefused = (sentence) => notices.tell(sentence)) {
      try {
        history.value = perform(history.value, edit);
        return true;
      } catch (error) {
        if (!(error instanceof Refusal)) throw error;
        onRefused(error.message);
        return false;
      }
    },
    earlier: (fits) => history.value.past.findLast((step) => fits(step.study))?.study ?? null,
    backTo(earlier) {
      let back = history.value;
      while (back.present !== earlier && back.past.length > 0) back = undo(back);
      if (back.present === earlier) history.value = back;
    },
    undo: () => void (history.value = undo(history.value)),
    redo: () => void (history.value = redo(history.value)),
    replace(next, isSaved) {
      history.value = startHistory(next);
      saved.value = isSaved ? next : null;
    },
    markSaved: (which) => void (saved.value = which),
    amend(change) {
      const before = history.value.present;
      const present = change(before);
      if (saved.value === before) saved.value = present;
      history.value = { ...history.value, present };
    },
  };
}
