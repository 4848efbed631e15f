import { type ReadonlySignal, signal } from '@preact/signals';
import { utf8Bytes } from '../../../shared-core/base/textCoding.ts';
import type { Bridge } from '../../../shared-core/bridge/contract.ts';
import { STUDY_ENDING } from '../../../shared-core/bridge/fileNames.ts';
import type { FileStamp, SaveTarget } from '../../../shared-core/bridge/messages.ts';
import { writeStudy } from '../../../shared-core/study/document.ts';
import type { Study } from '../../../shared-core/study/schema.ts';
import type { Notices } from '../notices.ts';
import type { StudyState } from '../studyState.ts';
import type { ExportFile } from './exporting.ts';
import type { Guarded } from './guard.ts';

export interface SavingOptions {
  readonly bridge: Bridge;
  readonly notices: Notices;
  readonly studyState: StudyState;
  readonly guarded: Guarded;
  readonly exportFile: ExportFile;
  /** Asks whether a file changed by somebody else may be replaced. */
  readonly askReplace: (sentence: string) => Promise<'replace' | 'saveAs' | 'stay'>;
  readonly onSaved: () => Promise<void>;
}

/** The study's own file. */
export interface Saving {
  /** Where the study is saved; null when it never was. */
  readonly target: ReadonlySignal<SaveTarget | null>;
  save(): Promise<boolean>;
  saveAs(): Promise<boolean>;
  /** Another study is open, read from this file as it was then; null for none. */
  startAt(target: SaveTarget | null, stamp: FileStamp | null): void;
  /** From now on the study is another than the one of this file: saving asks for a name. */
  leaveFile(): void;
}

/**
 * Saves one after another: a second must expect what the first has written. What is saved is the study that was open
 * when saving was asked for; another one opened meanwhile keeps its own place.
 */
export function createSaving(options: SavingOptions): Saving {
  const { bridge, notices, studyState, guarded, exportFile, askReplace, onSaved } = options;
  const { study } = studyState;
  const target = signal<SaveTarget | null>(null);
  /** The file as it was when it was last read or written. */
  let stamp: FileStamp | null = null;
  let opened = 0;
  let saving: Promise<unknown> = Promise.resolve();
  const inTurn = <T>(work: () => Promise<T>): Promise<T> => {
    const turn = saving.then(work);
    saving = turn.catch(() => undefined);
    return turn;
  };

  const write = async (to: SaveTarget, expected: FileStamp | null): Promise<boolean> => {
    const written = study.value;
    const openedThen = opened;
    const outcome = await bridge.saveStudy(to.id, utf8Bytes(writeStudy(written)), expected);
    switch (outcome.kind) {
      case 'saved':
        if (openedThen === opened) {
          target.value = to;
          stamp = outcome.stamp;
          studyState.markSaved(written);
        }
        await onSaved();
        return true;
      case 'conflict':
        switch (await askReplace(outcome.sentence)) {
          case 'replace':
            return write(to, outcome.found);
          case 'saveAs':
            return saveByName();
          case 'stay':
            return false;
        }
        return false;
      case 'failed':
        notices.tell(outcome.sentence, { actions: [rescue(written)] });
        return false;
    }
  };
  // The browser's host saves in one folder only; a download goes elsewhere, and the study stays "not saved".
  const rescue = (written: Study) =>
    bridge.hostKind === 'desktop'
      ? { label: 'Save elsewhere', run: () => void saveAs() }
      : { label: 'Download a copy', run: () => void downloadCopy(written) };
  const downloadCopy = (written: Study): Promise<void> =>
    exportFile(`${written.name}${STUDY_ENDING}`, 'application/json', utf8Bytes(writeStudy(written)));
  const saveAs = (): Promise<boolean> => inTurn(saveByName);
  const saveByName = (): Promise<boolean> =>
    guarded(async () => {
      const to = await bridge.chooseSaveTarget(study.value.name, stamp?.sha256 ?? null);
      return to === null ? false : write(to, to.existing);
    }, false);

  return {
    target,
    save: () =>
      inTurn(() =>
        guarded(async () => (target.value === null ? saveByName() : write(target.value, stamp)), false),
      ),
    saveAs,
    startAt(at, was) {
      opened++;
      target.value = at;
      stamp = was;
    },
    leaveFile() {
      target.value = null;
      stamp = null;
    },
  };
}
