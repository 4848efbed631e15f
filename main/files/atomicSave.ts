import { constants } from 'node:fs';
import { access } from 'node:fs/promises';
import { basename, dirname, join } from 'node:path';
import type { FileStamp, SaveOutcome } from '../../shared-core/bridge/messages.ts';
import { type FileCalls, systemCalls } from './fileCalls.ts';
import { sha256Of, stampOrNull } from './fileStamp.ts';
import { errorCode, fileTrouble } from './fileTrouble.ts';
import { createPart, movePart, movePartToFreeName, removeLeftovers, syncFolder } from './partFile.ts';
import { withLock } from './pathLock.ts';

export interface SaveOptions {
  /** A folder of this user's in which windows agree who saves. */
  lockFolder: string;
  /** What must stand at the path: a stamp, null for nothing, or 'any' for the program's own files. */
  expected: FileStamp | null | 'any';
  /** Permissions of a new file before the user's umask; an existing file keeps its own. */
  newFileMode?: number;
  calls?: FileCalls;
}

/**
 * Saves `bytes` at `path` so that a kill or a power cut at any moment leaves the old file or the new one, whole:
 * written to a new file beside it, synced, renamed over it, and the folder synced.
 *
 * Answers, and never throws: saved; conflict, when what stands there is not what was expected (nothing is written;
 * a file that is gone is no conflict, it is written anew); or failed with a sentence (full disk, read-only, folder
 * gone ...), the old file untouched. A link is followed: the file it leads to is replaced, not the link.
 */
export async function saveAtomically(
  path: string,
  bytes: Uint8Array,
  options: SaveOptions,
): Promise<SaveOutcome> {
  const calls = options.calls ?? systemCalls;
  try {
    const target = await realTarget(calls, path);
    return await withLock(options.lockFolder, target, () => saveLocked(calls, target, bytes, options));
  } catch (error) {
    return { kind: 'failed', sentence: fileTrouble(error, path, 'be saved') };
  }
}

async function saveLocked(
  calls: FileCalls,
  target: string,
  bytes: Uint8Array,
  { expected, newFileMode }: SaveOptions,
): Promise<SaveOutcome> {
  await removeLeftovers(calls, target);
  const current = await stampOrNull(target);
  // The very contents that are to be saved: nothing to write, and nothing to lose.
  if (current !== null && current.sha256 === sha256Of(bytes)) return { kind: 'saved', stamp: current };
  if (expected !== 'any' && current !== null && current.sha256 !== expected?.sha256)
    return conflict(target, current, expected);
  const mode = current === null ? (newFileMode ?? 0o666) : (await calls.stat(target)).mode & 0o7777;
  if (current !== null) await access(target, constants.W_OK);

  const part = await createPart(calls, target, mode);
  try {
    try {
      await part.file.writeFile(bytes);
      if (current !== null) await keepOwnership(calls, part.file, target, mode);
      await part.file.sync();
    } finally {
      await part.file.close();
    }
    if (current !== null || expected === 'any') await movePart(calls, part.path, target);
    else if (!(await movePartToFreeName(calls, part.path, target))) {
      await calls.unlink(part.path);
      const found = await stampOrNull(target);
      if (found !== null) return conflict(target, found, null);
      throw new Error('a file came and went under this name');
    }
  } catch (error) {
    await calls.unlink(part.path).catch(() => undefined);
    throw error;
  }
  await syncFolder(calls, dirname(target));
  const saved = await stampOrNull(target);
  const written = {
    sizeBytes: bytes.length,
    modifiedMs: saved?.modifiedMs ?? Date.now(),
    sha256: sha256Of(bytes),
  };
  return { kind: 'saved', stamp: written };
}

/** The file a path leads to, through links; for a file that is not there yet, its place in the real folder. */
async function realTarget(calls: FileCalls, path: string): Promise<string> {
  try {
    return await calls.realpath(path);
  } catch (error) {
    if (errorCode(error) !== 'ENOENT') throw error;
    return join(await calls.realpath(dirname(path)), basename(path));
  }
}

/** The new file gets the old one's permissions exactly, and its owner where the system lets us give it away. */
async function keepOwnership(
  calls: FileCalls,
  file: Awaited<ReturnType<FileCalls['open']>>,
  target: string,
  mode: number,
): Promise<void> {
  if (process.platform === 'win32') return;
  const old = await calls.stat(target);
  const mine = await file.stat();
  if (mine.uid !== old.uid || mine.gid !== old.gid) await file.chown(old.uid, old.gid).catch(() => undefined);
  await file.chmod(mode);
}

function conflict(target: string, found: FileStamp, expected: FileStamp | null): SaveOutcome {
  const when = new Date(found.modifiedMs).toISOString().slice(0, 16).replace('T', ' ');
  const what =
    expected === null
      ? `a file of that name is there already (${when} UTC)`
      : `another window or program changed it (${when} UTC) since it was opened here`;
  return {
    kind: 'conflict',
    found,
    sentence: `${basename(target)} was not saved: ${what}; save under another name, or choose to replace it.`,
  };
}
