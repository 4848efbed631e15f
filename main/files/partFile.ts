import { createHash, randomBytes } from 'node:crypto';
import type { FileHandle } from 'node:fs/promises';
import { basename, dirname, join } from 'node:path';
import { setTimeout as wait } from 'node:timers/promises';
import type { FileCalls } from './fileCalls.ts';
import { errorCode } from './fileTrouble.ts';

const ENDING = '.conewright-part';

/** Leftovers of one target share this beginning, so that they are found, and no other file is ever touched. */
function leadingPart(target: string): string {
  return `.${createHash('sha256').update(basename(target)).digest('hex').slice(0, 16)}-`;
}

/** Creates, beside `target`, the file that will become it; its name cannot be foreseen and is never an existing one. */
export async function createPart(
  calls: FileCalls,
  target: string,
  mode: number,
): Promise<{ path: string; file: FileHandle }> {
  const name = `${leadingPart(target)}${randomBytes(12).toString('hex')}${ENDING}`;
  const path = join(dirname(target), name);
  return { path, file: await calls.open(path, 'wx', mode) };
}

/** Removes what killed saves of the same target left beside it. Call while holding the target's lock. */
export async function removeLeftovers(calls: FileCalls, target: string): Promise<void> {
  const folder = dirname(target);
  const leading = leadingPart(target);
  for (const name of await calls.readdir(folder))
    if (name.startsWith(leading) && name.endsWith(ENDING))
      await calls.unlink(join(folder, name)).catch(ignore);
}

/** Gives the part the target's name, replacing what stands there. */
export async function movePart(calls: FileCalls, part: string, target: string): Promise<void> {
  for (let attempt = 0; ; attempt++) {
    try {
      return await calls.rename(part, target);
    } catch (error) {
      // On Windows a virus scanner or indexer can hold a file for a moment after it was written.
      const passing =
        process.platform === 'win32' && ['EPERM', 'EACCES', 'EBUSY'].includes(errorCode(error) ?? '');
      if (!passing || attempt === 8) throw error;
      await wait(20 * 2 ** attempt);
    }
  }
}

/**
 * Gives the part the target's name only if nothing stands there; false if something does. A hard link fails on an
 * existing name in one step; on disks without hard links the check and the move are two steps.
 */
export async function movePartToFreeName(calls: FileCalls, part: string, target: string): Promise<boolean> {
  try {
    await calls.link(part, target);
  } catch (error) {
    const code = errorCode(error) ?? '';
    if (code === 'EEXIST') return false;
    if (!['EPERM', 'ENOTSUP', 'EOPNOTSUPP', 'ENOSYS', 'EINVAL', 'EMLINK'].includes(code)) throw error;
    if (await exists(calls, target)) return false;
    await movePart(calls, part, target);
    return true;
  }
  await calls.unlink(part);
  return true;
}

/** Makes the new name last through a power cut. Windows has no such call for folders. */
export async function syncFolder(calls: FileCalls, folder: string): Promise<void> {
  if (process.platform === 'win32') return;
  const handle = await calls.open(folder, 'r');
  try {
    await handle.sync();
  } catch (error) {
    // Some network and foreign disks cannot sync a folder; the file itself is synced.
    if (!['EINVAL', 'ENOTSUP', 'EBADF'].includes(errorCode(error) ?? '')) throw error;
  } finally {
    await handle.close();
  }
}

async function exists(calls: FileCalls, path: string): Promise<boolean> {
  try {
    await calls.stat(path);
    return true;
  } catch (error) {
    if (errorCode(error) === 'ENOENT') return false;
    throw error;
  }
}

function ignore(): void {}
