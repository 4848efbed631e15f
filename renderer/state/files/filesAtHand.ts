import { signal } from '@preact/signals';
import type { OpenedFile } from '../../../shared-core/bridge/messages.ts';
import type { StudySource } from '../../../shared-core/study/schema.ts';

export type FileSource = Extract<StudySource, { kind: 'file' }>;

/** The files that the person gave in this session, found again by what a study remembers of them. */
export interface FilesAtHand {
  of(source: FileSource): OpenedFile | null;
  put(source: FileSource, file: OpenedFile): void;
  /** What a study remembers of a file changed (a fingerprint came, a changed file was accepted): still that file. */
  carry(from: FileSource, to: FileSource): void;
}

export function createFilesAtHand(): FilesAtHand {
  const files = signal<ReadonlyMap<string, OpenedFile>>(new Map());
  const of = (source: FileSource) => files.value.get(keyOf(source)) ?? null;
  const put = (source: FileSource, file: OpenedFile): void => {
    files.value = new Map(files.value).set(keyOf(source), file);
  };
  return {
    of,
    put,
    carry(from, to) {
      const file = of(from);
      if (file !== null) put(to, file);
    },
  };
}

// A browser keeps paths to itself, so that two files may share a name: size and contents tell them apart.
function keyOf({ path, name, sizeBytes, sha256 }: FileSource): string {
  return JSON.stringify(path ?? [name, sizeBytes, sha256]);
}
