import { computed, effect, type ReadonlySignal, signal } from '@preact/signals';
import type { OpenedFile, RecentStudy, UnsavedWork } from '../../shared-core/bridge/messages.ts';
import { emptyStudy, readStudy } from '../../shared-core/study/document.ts';
import type { Study } from '../../shared-core/study/schema.ts';
import { demoStudy } from './demoStudy.ts';
import { createExportFile, type ExportFile } from './files/exporting.ts';
import { guard } from './files/guard.ts';
import { createSaving, type Saving, type SavingOptions } from './files/saving.ts';
import { createStudyFiles, type StudyFile } from './files/studyFiles.ts';
import { catalogueTitle, createStudySource, type StudySourceState } from './files/studySource.ts';
import { keepUnsavedWork } from './files/unsavedWork.ts';

/** Opening, saving and keeping: everything between the study and the machine's files. */
export interface FileState extends StudySourceState, Pick<Saving, 'target' | 'save' | 'saveAs'> {
  readonly recent: ReadonlySignal<readonly RecentStudy[]>;
  /** Work from a window that ended without saving. */
  readonly offered: ReadonlySignal<readonly UnsavedWork[]>;
  newStudy(): Promise<void>;
  openDemo(): Promise<void>;
  /** Dialog for a study or a catalogue. */
  open(purpose: 'catalogue' | 'study'): Promise<void>;
  /** Files dropped or named on the command line: studies open, catalogues become the source. */
  openFiles(files: readonly OpenedFile[]): Promise<void>;
  openRecent(id: string): Promise<void>;
  /** Lets the person point at the file that the study names. */
  pointAtSource(): Promise<void>;
  takeOffered(workId: string): Promise<void>;
  dropOffered(workId: string): Promise<void>;
  readonly exportFile: ExportFile;
}

interface FileStateOptions
  extends Pick<SavingOptions, 'bridge' | 'notices' | 'studyState' | 'askReplace' | 'askOther'> {
  /** Asks "save, leave without saving, or stay". */
  readonly askLeave: (name: string) => Promise<'save' | 'leave' | 'stay'>;
}

export function createFileState(options: FileStateOptions): FileState {
  const { bridge, notices, studyState, askLeave } = options;
  const { study, unsaved } = studyState;
  const guarded = guard(notices);
  const recent = signal<readonly RecentStudy[]>([]);
  const refreshRecent = (): Promise<void> =>
    guarded(async () => void (recent.value = await bridge.recentStudies()), undefined);
  const exportFile = createExportFile(bridge, notices, guarded);
  const files = createStudyFiles(study);
  const source = createStudySource(bridge, studyState, files.carry);
  const saving = createSaving({ ...options, files, guarded, exportFile, onSaved: refreshRecent });
  const unsavedWork = keepUnsavedWork(bridge, studyState, guarded);

  /** True when nothing would be lost by leaving the study, or the person agreed. */
  const mayLeave = async (): Promise<boolean> => {
    if (!unsaved.value) return true;
    switch (await askLeave(study.value.name)) {
      case 'save':
        return saving.save();
      case 'leave':
        return true;
      case 'stay':
        return false;
    }
  };
  /** The name that the study came with, where that was not typed since it was saved. */
  let givenName: string | null = study.value.name;
  const show = async (
    next: Study,
    saved: boolean,
    from: { readonly id: string; readonly file: StudyFile | null } | null = null,
  ): Promise<void> => {
    studyState.replace(next, saved);
    saving.startAt(from?.file ?? null);
    givenName = saved ? next.name : null;
    await source.locate(next, from?.id ?? null);
  };
  /** A name that somebody typed and that is in no file yet is kept, whatever is opened. */
  const isTypedName = ({ name, source: of }: Study): boolean =>
    name !== givenName && !files.isNamed(name) && !(of?.kind === 'file' && name === catalogueTitle(of.name));
  const showNew = (next: Study): Promise<void> =>
    guarded(async () => {
      if (await mayLeave()) await show(next, true);
    }, undefined);

  const openStudyFile = async (file: OpenedFile): Promise<void> => {
    const { bytes, target, stamp } = await bridge.readStudy(file);
    const next = readStudy(new TextDecoder().decode(bytes));
    if (!(await mayLeave())) return;
    const at = target === null ? null : { target, stamp, name: next.name, sources: [next.source] };
    await show(next, true, { id: file.id, file: at });
    await refreshRecent();
  };
  const openFiles = async (files: readonly OpenedFile[]): Promise<void> => {
    for (const file of files)
      await guarded(async () => {
        if (isStudy(file)) await openStudyFile(file);
        else source.openCatalogue(file, isTypedName(study.value));
      }, undefined);
    const catalogues = files.filter((file) => !isStudy(file));
    if (catalogues.length > 1)
      notices.tell(
        `${catalogues.length} catalogues came, a study holds one: ${catalogues.at(-1)?.name} is open.`,
        { tone: 'fact' },
      );
  };

  // Of all edits, the host is told only those that it shows.
  const name = computed(() => study.value.name);
  effect(() => {
    const title = `${name.value}${unsaved.value ? ' (not saved)' : ''} - Conewright`;
    void guarded(() => bridge.setWindowState({ title, unsaved: unsaved.value }), undefined);
  });
  bridge.onCloseRequest(async () => {
    if (!(await mayLeave())) return 'stay';
    await unsavedWork.forget();
    return 'close';
  });
  void refreshRecent();

  return {
    ...source,
    target: saving.target,
    save: saving.save,
    saveAs: saving.saveAs,
    recent,
    offered: unsavedWork.offered,
    newStudy: () => showNew(emptyStudy()),
    openDemo: () => showNew(demoStudy()),
    open: (purpose) => guarded(async () => openFiles(await bridge.chooseFiles(purpose)), undefined),
    openFiles,
    openRecent: (id) => guarded(async () => openStudyFile(await bridge.openRecent(id)), undefined),
    pointAtSource: () =>
      guarded(async () => {
        const [file] = await bridge.chooseFiles('catalogue');
        if (file !== undefined) source.place(file);
      }, undefined),
    takeOffered: (id) =>
      guarded(async () => {
        // It stays on offer until the person agreed to leave what is open: whoever stays has claimed nothing.
        await unsavedWork.look(id);
        if (await mayLeave()) await unsavedWork.takeOver(id, (next) => show(next, false));
      }, undefined),
    dropOffered: (id) => guarded(() => unsavedWork.dropOffered(id), undefined),
    exportFile,
  };
}

function isStudy({ name }: OpenedFile): boolean {
  return /\.json$/i.test(name);
}
