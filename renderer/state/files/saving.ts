import { computed, type ReadonlySignal } from '@preact/signals';
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
import type { StudyFile, StudyFiles } from './studyFiles.ts';

export interface SavingOptions {
  readonly bridge: Bridge;
  readonly notices: Notices;
  readonly studyState: StudyState;
  readonly files: StudyFiles;
  readonly guarded: Guarded;
  readonly exportFile: ExportFile;
  /** Asks whether a file changed by somebody else may be replaced. */
  readonly askReplace: (sentence: string) => Promise<'replace' | 'saveAs' | 'stay'>;
  /** Asks what becomes of a file whose study is of another catalogue than the open one. */
  readonly askOther: (question: {
    readonly file: string;
    readonly catalogue: string;
  }) => Promise<'replace' | 'saveAs' | 'stay'>;
  readonly onSaved: () => Promise<void>;
}

/** Saving the study in its own file. */
export interface Saving {
  /** Where the study is saved; null when it never was, with the catalogue that it has now. */
  readonly target: ReadonlySignal<SaveTarget | null>;
  save(): Promise<boolean>;
  saveAs(): Promise<boolean>;
  /** Another study is open, with the file that it was read from. */
  startAt(file: StudyFile | null): void;
}

/**
 * Saves one after another: a second must expect what the first has written. What is saved is the study that was open
 * when saving was asked for; another one opened meanwhile keeps its own place.
 */
export function createSaving(options: SavingOptions): Saving {
  const { bridge, notices, studyState, files, guarded, exportFile, askReplace, askOther, onSaved } = options;
  const { study } = studyState;
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
          files.wrote(written, to, outcome.stamp);
          studyState.markSaved(written);
          tellApart(written, to);
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
  const told = new Set<string>();
  /** A browser does not say where the catalogue lies, so the study cannot either. */
  const tellApart = ({ source }: Study, { folder }: SaveTarget): void => {
    if (source?.kind !== 'file' || source.path !== null || told.has(source.name)) return;
    told.add(source.name);
    notices.tell(
      `“${source.name}” is not within the study: to be found when the study is opened again it must lie in ${folder} too, or be pointed at.`,
      { tone: 'fact' },
    );
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
      const to = await bridge.chooseSaveTarget(study.value.name, files.own.value?.stamp?.sha256 ?? null);
      return to === null ? false : write(to, to.existing);
    }, false);

  /** Another catalogue makes another study: it never goes over the one that was saved without a question. */
  const saveBesides = async ({ target, stamp }: StudyFile): Promise<boolean> => {
    const { source } = study.value;
    const catalogue =
      source === null ? 'no catalogue' : source.kind === 'demo' ? 'the invented demo survey' : source.name;
    switch (await askOther({ file: target.name, catalogue })) {
      case 'saveAs':
        return saveByName();
      case 'replace':
        return write(target, stamp);
      case 'stay':
        return false;
    }
  };
  const saveNow = async (): Promise<boolean> => {
    const [own, last] = [files.own.value, files.last.value];
    if (own !== null) return write(own.target, own.stamp);
    return last === null ? saveByName() : saveBesides(last);
  };

  return {
    target: computed(() => files.own.value?.target ?? null),
    save: () => inTurn(() => guarded(saveNow, false)),
    saveAs,
    startAt(file) {
      opened++;
      files.startAt(file);
    },
  };
}
