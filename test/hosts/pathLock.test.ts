import { mkdirSync, readdirSync, utimesSync, writeFileSync } from 'node:fs';
import { join } from 'node:path';
import { afterEach, beforeEach, describe, expect, it } from 'vitest';
import { withLock } from '../../main/files/pathLock.ts';
import { temporaryFolder } from './testHost.ts';

describe('the lock of a path', () => {
  let root: ReturnType<typeof temporaryFolder>;
  let folder: string;
  beforeEach(() => {
    root = temporaryFolder();
    folder = join(root.folder, 'locks');
  });
  afterEach(() => root.remove());

  /** The file of a lock, as an earlier program left it. */
  async function leaveLock(content: string, ageSeconds: number): Promise<void> {
    let name = '';
    await withLock(folder, 'key', async () => {
      name = readdirSync(folder)[0]!;
    });
    const path = join(folder, name);
    mkdirSync(folder, { recursive: true });
    writeFileSync(path, content);
    const then = new Date(Date.now() - ageSeconds * 1000);
    utimesSync(path, then, then);
  }

  it('runs works of one key one after the other, and of two keys side by side', async () => {
    const order: string[] = [];
    const work = (name: string, key: string) =>
      withLock(folder, key, async () => {
        order.push(`${name} begins`);
        await new Promise((resolve) => setTimeout(resolve, 20));
        order.push(`${name} ends`);
      });
    await Promise.all([work('a', 'one'), work('b', 'one'), work('c', 'two')]);
    expect(order.indexOf('a ends')).toBeLessThan(order.indexOf('b begins'));
    expect(order.indexOf('c begins')).toBeLessThan(order.indexOf('a ends'));
    expect(readdirSync(folder)).toEqual([]);
  });

  it('is given back when the work fails', async () => {
    await expect(withLock(folder, 'key', () => Promise.reject(new Error('no')))).rejects.toThrow('no');
    expect(await withLock(folder, 'key', async () => 'again')).toBe('again');
  });

  it.each([
    ['of a killed process', `${2 ** 22 + 1} 0123456789abcdef`, 0],
    ['older than any save takes', `${process.ppid} 0123456789abcdef`, 60],
    ['that was never written', '', 5],
    ['that says nothing sensible', 'nonsense', 0],
  ])('%s is taken over', async (_, content, ageSeconds) => {
    await leaveLock(content, ageSeconds);
    const done = await Promise.all([1, 2, 3].map((n) => withLock(folder, 'key', async () => n)));
    expect(done).toEqual([1, 2, 3]);
    expect(readdirSync(folder)).toEqual([]);
  });

  it('of a living process is waited for', async () => {
    await leaveLock(`${process.ppid} 0123456789abcdef`, 0);
    let entered = false;
    const waiting = withLock(folder, 'key', async () => {
      entered = true;
    });
    await new Promise((resolve) => setTimeout(resolve, 150));
    expect(entered).toBe(false);
    const [name] = readdirSync(folder);
    const then = new Date(Date.now() - 60_000);
    utimesSync(join(folder, name!), then, then);
    await waiting;
    expect(entered).toBe(true);
  });
});
