import type { Edit } from './edits.ts';
import type { Study } from './schema.ts';

interface Step {
  readonly study: Study;
  /** What led away from this state. */
  readonly label: string;
  readonly merge: string | null;
}

/** The study and the way back and forth. Values are immutable, so a step costs only what it changed. */
export interface History {
  readonly present: Study;
  readonly past: readonly Step[];
  readonly future: readonly Step[];
}

/** More steps than anybody takes back, few enough to bound memory. */
const MOST_STEPS = 10_000;

export function startHistory(study: Study): History {
  return { present: study, past: [], future: [] };
}

/** Applies an edit. An edit that changes nothing leaves the history as it is. @throws what the edit throws */
export function perform(history: History, edit: Edit): History {
  const present = edit.apply(history.present);
  if (same(present, history.present)) return history;
  const merge = edit.merge ?? null;
  const last = history.past.at(-1);
  if (merge !== null && last?.merge === merge) return { present, past: history.past, future: [] };
  const past = [...history.past, { study: history.present, label: edit.label, merge }];
  return { present, past: past.length > MOST_STEPS ? past.slice(-MOST_STEPS) : past, future: [] };
}

/** One step back; the same history when there is none. */
export function undo(history: History): History {
  const step = history.past.at(-1);
  if (step === undefined) return history;
  return {
    present: step.study,
    past: history.past.slice(0, -1),
    future: [...history.future, { ...step, study: history.present, merge: null }],
  };
}

/** One step forth again; the same history when there is none. */
export function redo(history: History): History {
  const step = history.future.at(-1);
  if (step === undefined) return history;
  return {
    present: step.study,
    past: [...history.past, { ...step, study: history.present, merge: null }],
    future: history.future.slice(0, -1),
  };
}

// Parts that an edit did not touch are the same objects, so only what it touched is compared by content.
function same(a: Study, b: Study): boolean {
  return (Object.keys(a) as (keyof Study)[]).every(
    (k) => a[k] === b[k] || JSON.stringify(a[k]) === JSON.stringify(b[k]),
  );
}
