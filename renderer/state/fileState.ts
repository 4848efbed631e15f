import { computed, effect, type ReadonlySignal, signal } from '@preact/signals';
import type { Bridge } from '../../shared-core/bridge/contract.ts';
import { STUDY_ENDING } from '../../shared-core/bridge/fileNames.ts';
import type {
  FileStamp,
  OpenedFile,
  RecentStudy,
  SaveTarget,
  UnsavedWork,
} from '../../shared-core/bridge/messages.ts';
import { emptyStudy, readStudy, writeStudy } from '../../shared-core/study/document.ts';
import { change } from '../../shared-core/study/edits.ts';
import type { Study, StudySource } from '../../shared-core/study/schema.ts';
import { loadKey } from '../engine/loadKey.ts';
import type { EngineSource } from '../engine/protocol.ts';
import { demoStudy } from './demoStudy.ts';
import { createFilesAtHand, type FileSource } from './filesAtHand.ts';
import type { Notices } from './notices.ts';
import type { StudyState } from './studyState.ts';

const KEEP_AFTER_MS = 1500;
const KEEP_AT_LEAST_MS = 5000;

/** Opening, saving and keeping: everything between the study and the machine's files. */
export interface FileState {
  /** What the engine should read; null when the study has no source or its file is not at hand. */
  readonly engineSource: ReadonlySignal<EngineSource | null>;
  /** The study names a file that is not at hand: the person must point at it. */
  readonly missingSource: ReadonlySignal<FileSource | null>;
  /** The study as it was before its present catalogue was opened; null when it came with it. */
  readonly beforeOpening: ReadonlySignal<Study | null>;
  /** The latest earlier study that asked for a reading with this loadKey; null when none did. */
  askedBefore(readFor: string): Study | null;
  /** The source was read whole for the first time: from now on a change of the file is told. */
  noteFingerprint(sha256: string): void;
  /** Takes the changed file, as it was read, for the study's source. */
  acceptChanged(read: { readonly sizeBytes: number; readonly sha256: string }): void;
  /** Where the study is saved; null when it never was. */
  readonly target: ReadonlySignal<SaveTarget | null>;
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
  save(): Promise<boolean>;
  saveAs(): Promise<boolean>;
  takeOffered(workId: string): Promise<void>;
  dropOffered(workId: string): Promise<void>;
  /** True when nothing would be lost by leaving the study, or the person agreed. */
  mayLeave(): Promise<boolean>;
  exportFile(name: string, mimeType: string, content: Uint8Array | AsyncIterable<Uint8Array>): Promise<void>;
}

export interface FileStateOptions {
  readonly bridge: Bridge;
  readonly notices: Notices;
  readonly studyState: StudyState;
  /** Asks "save, leave without saving, or stay". */
  readonly askLeave: (name: string) => Promise<'save' | 'leave' | 'stay'>;
  /** Asks whether a file changed by somebody else may be replaced. */
  readonly askReplace: (sentence: string) => Promise<'replace' | 'saveAs' | 'stay'>;
}

export function createFileState({
  bridge,
  notices,
  studyState,
  askLeave,
  askReplace,
}: FileStateOptions): FileState {
  const { study, unsaved } = studyState;
  const atHand = createFilesAtHand();
  const target = signal<SaveTarget | null>(null);
  const stamp = signal<FileStamp | null>(null);
  const studyFileId = signal<string | null>(null);
  const recent = signal<readonly RecentStudy[]>([]);
  const offered = signal<readonly UnsavedWork[]>([]);
  const workId = newWorkId();

  const source = computed(() => study.value.source);
  const readable = (named: StudySource | null): EngineSource | null => {
    if (named === null || named.kind === 'demo') return named;
    const file = atHand.of(named);
    return file === null ? null : { kind: 'url', url: file.url, name: file.name, sizeBytes: file.sizeBytes };
  };
  const engineSource = computed(() => readable(source.value));
  const missingSource = computed(() =>
    source.value?.kind === 'file' && engineSource.value === null ? source.value : null,
  );
  const beforeOpening = computed(() => {
    const now = JSON.stringify(engineSource.value);
    return studyState.earlier((before) => JSON.stringify(readable(before.source)) !== now);
  });

  /** Runs what a button does; a Refusal, or anything else that went wrong, becomes a sentence. */
  const guarded = async <T>(work: () => Promise<T>, otherwise: T): Promise<T> => {
    try {
      return await work();
    } catch (error) {
      notices.tell(error instanceof Error ? error.message : String(error));
      return otherwise;
    }
  };
  const refreshRecent = () =>
    guarded(async () => void (recent.value = await bridge.recentStudies()), undefined);

  const exportFile: FileState['exportFile'] = (name, mimeType, content) =>
    guarded(async () => {
      const done = await bridge.exportFile(name, mimeType, content);
      if (done !== null)
        notices.tell(`${done.name} was written to ${done.folder ?? "the browser's downloads"}.`, {
          tone: 'fact',
        });
    }, undefined);

  const remember = (file: OpenedFile): FileSource => {
    const named = {
      kind: 'file',
      name: file.name,
      path: file.path,
      sizeBytes: file.sizeBytes,
      sha256: null,
    } as const;
    atHand.put(named, file);
    return named;
  };

  const leave = async (): Promise<boolean> => {
    if (!unsaved.value) return true;
    switch (await askLeave(study.value.name)) {
      case 'save':
        return save();
      case 'leave':
        return true;
      case 'stay':
        return false;
    }
  };

  const show = async (
    next: Study,
    saved: boolean,
    from: SaveTarget | null,
    at: FileStamp | null,
    id: string | null,
  ) => {
    opened++;
    studyState.replace(next, saved);
    target.value = from;
    stamp.value = at;
    studyFileId.value = id;
    await locate(next);
  };

  const locate = async (next: Study): Promise<void> => {
    const named = next.source;
    if (named?.kind !== 'file' || atHand.of(named) !== null) return;
    const { name, path, sizeBytes } = named;
    const file = await bridge.locateSource({ name, path, sizeBytes, studyId: studyFileId.value });
    if (file !== null) atHand.put(named, file);
  };

  const openStudyFile = async (file: OpenedFile): Promise<void> => {
    const read = await bridge.readStudy(file);
    const next = readStudy(new TextDecoder().decode(read.bytes));
    if (!(await leave())) return;
    await show(next, true, read.target, read.stamp, file.id);
    await refreshRecent();
  };

  const openCatalogueFile = (file: OpenedFile): void => {
    const named = remember(file);
    const { source: before, look, name } = study.value;
    const fresh = before === null || before.kind === 'demo';
    if (before?.kind === 'demo') {
      // One's own catalogue in the demo's place is a study of its own: it never goes into the demo's file.
      target.value = null;
      stamp.value = null;
    }
    studyState.perform(
      change(`Open ${file.name}`, {
        source: named,
        mapping: null,
        cuts: [],
        region: null,
        edges: [],
        name: fresh ? baseName(file.name) : name,
        // The demo's columns are not one's own; another file of one's own may well have the same.
        look: fresh && typeof look.colourBy === 'object' ? { ...look, colourBy: 'redshift' } : look,
      }),
    );
  };

  // One save after another: a second must expect what the first has written. What is saved is the study that was open
  // when saving was asked for; another one opened meanwhile keeps its own place.
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
    const outcome = await bridge.saveStudy(to.id, new TextEncoder().encode(writeStudy(written)), expected);
    switch (outcome.kind) {
      case 'saved':
        if (openedThen === opened) {
          target.value = to;
          stamp.value = outcome.stamp;
          studyFileId.value = to.id;
          studyState.markSaved(written);
        }
        await refreshRecent();
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
    exportFile(
      `${written.name}${STUDY_ENDING}`,
      'application/json',
      new TextEncoder().encode(writeStudy(written)),
    );
  const save = (): Promise<boolean> =>
    inTurn(() =>
      guarded(async () => (target.value === null ? saveByName() : write(target.value, stamp.value)), false),
    );
  const saveAs = (): Promise<boolean> => inTurn(saveByName);
  const saveByName = (): Promise<boolean> =>
    guarded(async () => {
      const to = await bridge.chooseSaveTarget(study.value.name, stamp.value?.sha256 ?? null);
      return to === null ? false : write(to, to.existing);
    }, false);

  // Unsaved work is kept a moment after a change, and now and then while changes go on; it is forgotten once it is
  // saved or given up. One after the other, so that an old copy never comes after a newer one.
  let timer: ReturnType<typeof setTimeout> | undefined;
  let keeping: Promise<unknown> = Promise.resolve();
  let kept = false;
  let waitingSince = 0;
  const later = (work: () => Promise<unknown>): void => {
    keeping = keeping.then(() => guarded(work, undefined));
  };
  const keepNow = (): void => {
    waitingSince = 0;
    if (!unsaved.peek()) return;
    kept = true;
    const now = study.peek();
    later(() => bridge.keepUnsaved(workId, now.name, new TextEncoder().encode(writeStudy(now))));
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
  effect(() => {
    void guarded(
      () =>
        bridge.setWindowState({
          title: `${study.value.name}${unsaved.value ? ' (not saved)' : ''} - Conewright`,
          unsaved: unsaved.value,
        }),
      undefined,
    );
  });
  bridge.onCloseRequest(async () => {
    if (!(await leave())) return 'stay';
    // Given up or saved: nothing is to be offered back.
    forget();
    await keeping;
    return 'close';
  });
  void refreshRecent();
  void guarded(async () => void (offered.value = await bridge.listUnsaved()), undefined);

  const openFiles = async (files: readonly OpenedFile[]): Promise<void> => {
    for (const file of files)
      await guarded(async () => {
        if (/\.json$/i.test(file.name)) await openStudyFile(file);
        else openCatalogueFile(file);
      }, undefined);
    const catalogues = files.filter((f) => !/\.json$/i.test(f.name));
    if (catalogues.length > 1)
      notices.tell(
        `${catalogues.length} catalogues came, a study holds one: ${catalogues.at(-1)?.name} is open.`,
        { tone: 'fact' },
      );
  };

  return {
    engineSource,
    missingSource,
    beforeOpening,
    askedBefore: (readFor) =>
      studyState.earlier((before) => loadKey({ ...before, source: readable(before.source) }) === readFor),
    noteFingerprint(sha256) {
      const named = source.value;
      if (named?.kind !== 'file') return;
      atHand.carry(named, { ...named, sha256 });
      studyState.amend((now) => ({ ...now, source: { ...named, sha256 } }));
    },
    acceptChanged({ sizeBytes, sha256 }) {
      const named = source.value;
      if (named?.kind !== 'file') return;
      const accepted = { ...named, sizeBytes, sha256 };
      atHand.carry(named, accepted);
      studyState.perform(change('Accept the changed catalogue', { source: accepted }));
    },
    target,
    recent,
    offered,
    newStudy: () =>
      guarded(async () => {
        if (await leave()) await show(emptyStudy(), true, null, null, null);
      }, undefined),
    openDemo: () =>
      guarded(async () => {
        if (await leave()) await show(demoStudy(), true, null, null, null);
      }, undefined),
    open: (purpose) => guarded(async () => openFiles(await bridge.chooseFiles(purpose)), undefined),
    openFiles,
    openRecent: (id) => guarded(async () => openStudyFile(await bridge.openRecent(id)), undefined),
    pointAtSource: () =>
      guarded(async () => {
        const [file] = await bridge.chooseFiles('catalogue');
        const named = missingSource.value ?? source.value;
        if (file === undefined || named?.kind !== 'file') return;
        // The place is new, size and fingerprint stay those that the study knows: another file is then told.
        const placed = { ...named, name: file.name, path: file.path };
        atHand.put(placed, file);
        studyState.perform(change(`Find the catalogue at ${file.name}`, { source: placed }));
      }, undefined),
    save,
    saveAs,
    takeOffered: (id) =>
      guarded(async () => {
        const bytes = await bridge.takeUnsaved(id);
        const next = readStudy(new TextDecoder().decode(bytes));
        if (!(await leave())) return;
        offered.value = offered.value.filter((w) => w.workId !== id);
        await show(next, false, null, null, null);
        // Kept under this window's name before the old copy goes: at no moment is there none.
        await bridge.keepUnsaved(workId, next.name, new TextEncoder().encode(writeStudy(next)));
        kept = true;
        await bridge.dropUnsaved(id);
      }, undefined),
    dropOffered: (id) =>
      guarded(async () => {
        await bridge.dropUnsaved(id);
        offered.value = offered.value.filter((w) => w.workId !== id);
      }, undefined),
    mayLeave: leave,
    exportFile,
  };
}

function baseName(fileName: string): string {
  return fileName.replace(/(\.(csv|tsv|txt|dat))?(\.gz)?$/i, '').slice(0, 200) || 'Untitled';
}

function newWorkId(): string {
  const bytes = crypto.getRandomValues(new Uint8Array(18));
  return btoa(String.fromCharCode(...bytes))
    .replaceAll('+', '-')
    .replaceAll('/', '_');
}
