import { effect, type ReadonlySignal, signal } from '@preact/signals';
import { utf8Bytes } from '../../../shared-core/base/textCoding.ts';
import type { Bridge } from '../../../shared-core/bridge/contract.ts';
import type { UnsavedWork } from '../../../shared-core/bridge/messages.ts';
import { readStudy, writeStudy } from '../../../shared-core/study/document.ts';
import type { Study } from '../../../shared-core/study/schema.ts';
import type { StudyState } from '../studyState.ts';
import type { Guarded } from './guard.ts';

const KEEP_AFTER_MS = 1500;
const KEEP_AT_LEAST_MS = 5000;

/** Copies of what is not saved, for the next window if this one ends. */
interface UnsavedWorkState {
  /** Work from a window that ended without saving. */
  readonly offered: ReadonlySignal<readonly UnsavedWork[]>;
  /** Reads an offer, which stays one: a Refusal where it holds no study. */
  look(workId: string): Promise<Study>;
  /** Opens the study of an offer: from then on it is this window's work. */
  takeOver(workId: string, open: (next: Study) => Promise<void>): Promise<void>;
  dropOffered(workId: string): Promise<void>;
  /** This window's work is saved or given up: nothing is to be offered back. */
  forget(): Promise<void>;
}

/** Work is kept a moment after a change, and now and then while changes go on; it is forgotten once it is saved. */
export function keepUnsavedWork(
  bridge: Bridge,
  { study, unsaved }: StudyState,
  guarded: Guarded,
): UnsavedWorkState {
  const workId = newWorkId();
  const offered = signal<readonly UnsavedWork[]>([]);
  const withdraw = (id: string): void =>
    void (offered.value = offered.value.filter((work) => work.workId !== id));
  let timer: ReturnType<typeof setTimeout> | undefined;
  let keeping: Promise<unknown> = Promise.resolve();
  let kept = false;
  let waitingSince = 0;

  const keep = (now: Study): Promise<void> =>
    bridge.keepUnsaved(workId, now.name, utf8Bytes(writeStudy(now)));
  // One after the other, so that an old copy never comes after a newer one.
  const later = (work: () => Promise<unknown>): void => {
    keeping = keeping.then(() => guarded(work, undefined));
  };
  const keepNow = (): void => {
    waitingSince = 0;
    if (!unsaved.peek()) return;
    kept = true;
    const now = study.peek();
    later(() => keep(now));
  };
  const forget = (): void => {
    clearTimeout(timer);
    waitingSince = 0;
    if (kept) later(() => bridge.dropUnsaved(workId));
    kept = false;
  };
  effect(() => {
    void study.value;
    if (!unsaved.value) return forget();
    const now = performance.now();
    if (waitingSince === 0) waitingSince = now;
    clearTimeout(timer);
    timer = setTimeout(keepNow, Math.max(0, Math.min(KEEP_AFTER_MS, waitingSince + KEEP_AT_LEAST_MS - now)));
  });
  void guarded(async () => void (offered.value = await bridge.listUnsaved()), undefined);

  return {
    offered,
    look: async (id) => studyIn(await bridge.lookAtUnsaved(id)),
    async takeOver(id, open) {
      const next = studyIn(await bridge.takeUnsaved(id));
      withdraw(id);
      await open(next);
      // Kept under this window's name before the old copy goes: at no moment is there none.
      await keep(next);
      kept = true;
      await bridge.dropUnsaved(id);
    },
    async dropOffered(id) {
      await bridge.dropUnsaved(id);
      withdraw(id);
    },
    async forget() {
      forget();
      await keeping;
    },
  };
}

const studyIn = (bytes: Uint8Array): Study => readStudy(new TextDecoder().decode(bytes));

function newWorkId(): string {
  const bytes = crypto.getRandomValues(new Uint8Array(18));
  return btoa(String.fromCharCode(...bytes))
    .replaceAll('+', '-')
    .replaceAll('/', '_');
}
