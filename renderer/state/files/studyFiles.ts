import { computed, type ReadonlySignal, signal } from '@preact/signals';
import type { FileStamp, SaveTarget } from '../../../shared-core/bridge/messages.ts';
import type { Study, StudySource } from '../../../shared-core/study/schema.ts';
import { sameCatalogue } from './sameCatalogue.ts';

/** A file that a study was read from or saved in. */
export interface StudyFile {
  readonly target: SaveTarget;
  /** The file as it was when it was last read or written. */
  readonly stamp: FileStamp | null;
  /** The study's name in it. */
  readonly name: string;
  /** The catalogue of the study in it, and what that became by pointing at it or accepting its change. */
  readonly sources: readonly (StudySource | null)[];
}

/**
 * The files of the open study. Another catalogue opened in it makes another study, so there may be several: each
 * state that undo brings back goes into the file of its own catalogue.
 */
export interface StudyFiles {
  /** The file of the study as it stands; null when it has none. */
  readonly own: ReadonlySignal<StudyFile | null>;
  /** The file used last, whether it is the study's own or that of another catalogue. */
  readonly last: ReadonlySignal<StudyFile | null>;
  /** Another study is open: its file, if it has one. */
  startAt(file: StudyFile | null): void;
  /** The study was written there. */
  wrote(study: Study, target: SaveTarget, stamp: FileStamp): void;
  /** `to` is the catalogue that was remembered as `from`. */
  carry(from: StudySource, to: StudySource): void;
  /** Whether a study of this name was read or saved. */
  isNamed(name: string): boolean;
}

export function createStudyFiles(study: ReadonlySignal<Study>): StudyFiles {
  const files = signal<readonly StudyFile[]>([]);
  const source = computed(() => study.value.source);
  const holds = ({ sources }: StudyFile, wanted: StudySource | null): boolean =>
    sources.some((one) => sameCatalogue(one, wanted));
  return {
    own: computed(() => files.value.find((file) => holds(file, source.value)) ?? null),
    last: computed(() => files.value[0] ?? null),
    startAt(file) {
      files.value = file === null ? [] : [file];
    },
    wrote({ name, source }, target, stamp) {
      const others = files.value.filter((file) => !isSamePlace(file.target, target));
      files.value = [{ target, stamp, name, sources: [source] }, ...others];
    },
    carry(from, to) {
      files.value = files.value.map((file) =>
        holds(file, from) && !holds(file, to) ? { ...file, sources: [...file.sources, to] } : file,
      );
    },
    isNamed: (name) => files.value.some((file) => file.name === name),
  };
}

const isSamePlace = (a: SaveTarget, b: SaveTarget): boolean => a.folder === b.folder && a.name === b.name;
