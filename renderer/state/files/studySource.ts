import { computed, type ReadonlySignal, signal } from '@preact/signals';
import type { Bridge } from '../../../shared-core/bridge/contract.ts';
import type { OpenedFile } from '../../../shared-core/bridge/messages.ts';
import { UNNAMED } from '../../../shared-core/study/document.ts';
import { change } from '../../../shared-core/study/edits.ts';
import type { Study, StudySource } from '../../../shared-core/study/schema.ts';
import { loadKey } from '../../engine/loadKey.ts';
import type { EngineSource } from '../../engine/protocol.ts';
import type { StudyState } from '../studyState.ts';
import { createFilesAtHand, type FileSource } from './filesAtHand.ts';

/** The catalogue that the study names, and the file of this machine that it is. */
export interface StudySourceState {
  /** What the engine should read; null when the study has no source or its file is not at hand. */
  readonly engineSource: ReadonlySignal<EngineSource | null>;
  /** The study names a file that is not at hand: the person must point at it. */
  readonly missingSource: ReadonlySignal<FileSource | null>;
  /** The study as it was before its present catalogue was opened; null when it came with it. */
  readonly beforeOpening: ReadonlySignal<Study | null>;
  /** The latest earlier study with another catalogue than the present one, of which none is known to be unreadable. */
  readonly lastReadable: ReadonlySignal<Study | null>;
  /** The present catalogue could, or could not, be read. */
  noteReading(done: boolean): void;
  /** The latest earlier study that asked for a reading with this loadKey; null when none did. */
  askedBefore(readFor: string): Study | null;
  /** The source was read whole for the first time: from now on a change of the file is told. */
  noteFingerprint(sha256: string): void;
  /** Takes the changed file, as it was read, for the study's source. */
  acceptChanged(read: { readonly sizeBytes: number; readonly sha256: string }): void;
}

interface SourceFiles extends StudySourceState {
  /**
   * Makes a file the study's catalogue, with nothing cut. The region and shells of another catalogue go; those of a
   * plan stay, for it is the plan that the catalogue is held against. The study takes its name, unless the one that it
   * has is to be kept.
   */
  openCatalogue(file: OpenedFile, keepName: boolean): void;
  /** Finds the file of a study that has just been opened, where that needs no asking. `studyId`: the study's file. */
  locate(study: Study, studyId: string | null): Promise<void>;
  /** The study's source lies at this file. */
  place(file: OpenedFile): void;
}

/** @param onCarried told when what the study remembers of its catalogue changes while it stays that catalogue */
export function createStudySource(
  bridge: Bridge,
  studyState: StudyState,
  onCarried: (from: FileSource, to: FileSource) => void,
): SourceFiles {
  const { study } = studyState;
  const atHand = createFilesAtHand();
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
  const keyOf = (named: StudySource | null): string => JSON.stringify(readable(named));
  const beforeOpening = computed(() => {
    const now = keyOf(source.value);
    return studyState.earlier((before) => keyOf(before.source) !== now);
  });
  const unreadable = signal<ReadonlySet<string>>(new Set());

  return {
    engineSource,
    missingSource,
    beforeOpening,
    lastReadable: computed(() => {
      const now = keyOf(source.value);
      return studyState.earlier((before) => {
        const key = keyOf(before.source);
        return key !== now && !unreadable.value.has(key);
      });
    }),
    noteReading(done) {
      const key = keyOf(source.peek());
      const others = [...unreadable.peek()].filter((one) => one !== key);
      unreadable.value = new Set(done ? others : [...others, key]);
    },
    askedBefore: (readFor) =>
      studyState.earlier((before) => loadKey({ ...before, source: readable(before.source) }) === readFor),
    noteFingerprint(sha256) {
      const named = source.value;
      if (named?.kind !== 'file') return;
      const known = { ...named, sha256 };
      atHand.carry(named, known);
      onCarried(named, known);
      studyState.amend((now) => ({ ...now, source: known }));
    },
    acceptChanged({ sizeBytes, sha256 }) {
      const named = source.value;
      if (named?.kind !== 'file') return;
      const accepted = { ...named, sizeBytes, sha256 };
      atHand.carry(named, accepted);
      onCarried(named, accepted);
      studyState.perform(change('Accept the changed catalogue', { source: accepted }));
    },
    openCatalogue(file, keepName) {
      const { source: before, region, edges, look, name } = study.value;
      const fresh = before === null || before.kind === 'demo';
      const { path, sizeBytes } = file;
      const named: FileSource = { kind: 'file', name: file.name, path, sizeBytes, sha256: null };
      atHand.put(named, file);
      studyState.perform(
        change(`Open ${file.name}`, {
          source: named,
          mapping: null,
          cuts: [],
          region: before === null ? region : null,
          edges: before === null ? edges : [],
          name: keepName ? name : catalogueTitle(file.name),
          // The demo's columns are not one's own; another file of one's own may well have the same.
          look: fresh && typeof look.colourBy === 'object' ? { ...look, colourBy: 'redshift' } : look,
        }),
      );
    },
    async locate({ source: named }, studyId) {
      if (named?.kind !== 'file' || atHand.of(named) !== null) return;
      const { name, path, sizeBytes } = named;
      const file = await bridge.locateSource({ name, path, sizeBytes, studyId });
      if (file !== null) atHand.put(named, file);
    },
    place(file) {
      const named = source.value;
      if (named?.kind !== 'file') return;
      // The place is new, size and fingerprint stay those that the study knows: another file is then told.
      const placed = { ...named, name: file.name, path: file.path };
      atHand.put(placed, file);
      onCarried(named, placed);
      studyState.perform(change(`Find the catalogue at ${file.name}`, { source: placed }));
    },
  };
}

/** The name that a study takes from its catalogue. */
export function catalogueTitle(fileName: string): string {
  return fileName.replace(/(\.(csv|tsv|txt|dat))?(\.gz)?$/i, '').slice(0, 200) || UNNAMED;
}
