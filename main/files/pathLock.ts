import { createHash, randomBytes } from 'node:crypto';
import { link, mkdir, open, readFile, rename, stat, unlink } from 'node:fs/promises';
import { join } from 'node:path';
import { setTimeout as wait } from 'node:timers/promises';
import { Refusal } from '../../shared-core/base/refusal.ts';
import { errorCode } from './fileTrouble.ts';
import { isProcessAlive } from './processes.ts';

// Held for one save, which takes well under a second; a lock this old was left behind.
const STALE_AFTER_MS = 30_000;
// A lock that its owner did not finish writing.
const EMPTY_AFTER_MS = 2_000;
const GIVE_UP_AFTER_MS = 15_000;

const queues = new Map<string, Promise<unknown>>();

/**
 * Runs `work` while no other work of this user runs under the same key, in this process or another. The lock is a
 * file in `lockFolder` that names its process, so one left by a killed process is taken over at once.
 * Throws Refusal when another process holds it for longer than saving can take.
 */
export async function withLock<T>(lockFolder: string, key: string, work: () => Promise<T>): Promise<T> {
  const path = join(lockFolder, `${createHash('sha256').update(key).digest('hex').slice(0, 32)}.lock`);
  const before = queues.get(path) ?? Promise.resolve();
  const mine = before.then(() => lockedRun(lockFolder, path, work));
  const settled = mine.catch(() => undefined);
  queues.set(path, settled);
  try {
    return await mine;
  } finally {
    if (queues.get(path) === settled) queues.delete(path);
  }
}

async function lockedRun<T>(lockFolder: string, path: string, work: () => Promise<T>): Promise<T> {
  await mkdir(lockFolder, { recursive: true, mode: 0o700 });
  const content = `${process.pid} ${randomBytes(8).toString('hex')}`;
  const deadline = Date.now() + GIVE_UP_AFTER_MS;
  while (!(await tryLock(path, content))) {
    if (await removeStale(path)) continue;
    if (Date.now() > deadline)
      throw new Refusal('Another window is saving the same file and does not finish: try again in a moment.');
    await wait(5 + Math.random() * 20);
  }
  try {
    return await work();
  } finally {
    if ((await readFile(path, 'utf8').catch(() => '')) === content) await unlink(path).catch(() => undefined);
  }
}

async function tryLock(path: string, content: string): Promise<boolean> {
  try {
    const file = await open(path, 'wx', 0o600);
    await file.writeFile(content).finally(() => file.close());
    return true;
  } catch (error) {
    if (errorCode(error) === 'EEXIST') return false;
    throw error;
  }
}

/** True when a lock of a dead process was removed. */
async function removeStale(path: string): Promise<boolean> {
  let seen: string;
  try {
    seen = await readFile(path, 'utf8');
    const ageMs = Date.now() - (await stat(path)).mtimeMs;
    const pid = Number(seen.split(' ')[0]);
    const stale = seen === '' ? ageMs > EMPTY_AFTER_MS : ageMs > STALE_AFTER_MS || !isProcessAlive(pid);
    if (!stale) return false;
  } catch (error) {
    if (errorCode(error) === 'ENOENT') return true;
    throw error;
  }
  // Two processes may find the same stale lock: moved aside first, so that a fresh lock made meanwhile is noticed.
  const aside = `${path}.${randomBytes(8).toString('hex')}`;
  try {
    await rename(path, aside);
    if ((await readFile(aside, 'utf8')) !== seen) await link(aside, path).catch(() => undefined);
    await unlink(aside);
  } catch (error) {
    if (errorCode(error) !== 'ENOENT') throw error;
  }
  return true;
}
