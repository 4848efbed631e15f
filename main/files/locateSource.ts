import { lstat } from 'node:fs/promises';
import { dirname, isAbsolute, join, normalize } from 'node:path';
import { isBareFileName } from '../../shared-core/bridge/fileNames.ts';
import type { SourceReference } from '../../shared-core/bridge/messages.ts';
import type { FileHistory } from './history.ts';

/**
 * The path of the source that a study names, where it may be opened without asking: the very path that the user gave
 * before, or a regular file (no link, which could lead anywhere) of that bare name beside the study. A study comes
 * from anywhere, so it must never make the program read another file. Of two, the one of the remembered size.
 */
export async function locateSource(
  { name, path, sizeBytes }: SourceReference,
  studyPath: string | null,
  history: Pick<FileHistory, 'holds'>,
): Promise<string | null> {
  const found: { path: string; sizeBytes: number }[] = [];
  if (studyPath !== null && isBareFileName(name)) {
    const beside = join(dirname(studyPath), name);
    const info = await lstat(beside).catch(() => null);
    if (info?.isFile()) found.push({ path: beside, sizeBytes: info.size });
  }
  if (path !== null && isAbsolute(path) && normalize(path) === path && (await history.holds(path))) {
    const info = await lstat(path).catch(() => null);
    if (info?.isFile() || info?.isSymbolicLink()) found.push({ path, sizeBytes: info.size });
  }
  return (found.find((file) => file.sizeBytes === sizeBytes) ?? found[0])?.path ?? null;
}
