import { readdirSync, readFileSync, writeFileSync } from 'node:fs';
import { join } from 'node:path';
import { afterAll, beforeAll, describe, expect, it } from 'vitest';
import { saveAtomically } from '../../main/files/atomicSave.ts';
import { ExportFiles } from '../../main/files/exportFiles.ts';
import { UnsavedWorks } from '../../main/files/unsavedWork.ts';
import { mountSmallDisk } from './smallDisk.ts';
import { temporaryFolder } from './testHost.ts';

const root = temporaryFolder();
const disk = mountSmallDisk(join(root.folder, 'disk'));
const lockFolder = join(root.folder, 'locks');
if (disk === null) {
  root.remove();
  console.log('A real full disk was not tried: this user may mount none. atomicSave.test.ts plays one.');
}

describe.skipIf(disk === null)('a real disk of 256 kB', () => {
  const folder = disk?.folder ?? '';
  const path = join(folder, 'deep.study.json');
  const tooLarge = new Uint8Array(400_000).fill(65);

  beforeAll(() => writeFileSync(path, 'old'));
  afterAll(() => {
    disk?.remove();
    root.remove();
  });

  const untouched = () => {
    expect(readFileSync(path, 'utf8')).toBe('old');
    expect(readdirSync(folder)).toEqual(['deep.study.json']);
  };

  it('that gets full while a study is saved keeps the old one', async () => {
    const outcome = await saveAtomically(path, tooLarge, { lockFolder, expected: 'any' });
    expect(outcome).toMatchObject({
      kind: 'failed',
      sentence: expect.stringMatching(/is full; free some space/),
    });
    untouched();
  });

  it('that gets full while something is exported keeps no half file', async () => {
    const exports = new ExportFiles();
    const id = await exports.start(join(folder, 'cone.png'), 'window-1');
    await exports.add(id, 'window-1', tooLarge.subarray(0, 100_000));
    await expect(exports.add(id, 'window-1', tooLarge)).rejects.toThrow(
      /^cone\.png could not be written: .* is full/,
    );
    await expect(exports.finish(id, 'window-1', true)).rejects.toThrow(/ended before/);
    untouched();
  });

  it('that gets full while unsaved work is kept says so, and keeps what was kept before', async () => {
    const unsaved = new UnsavedWorks(join(folder, 'own'), lockFolder, new Set());
    await unsaved.keep('work-01234567', 'Deep', new TextEncoder().encode('before'), 'window-1');
    await expect(unsaved.keep('work-01234567', 'Deep', tooLarge, 'window-1')).rejects.toThrow(/is full/);
    expect(Buffer.from(await unsaved.take('work-01234567', 'window-1')).toString()).toBe('before');
  });

  it('that can only be read is told, and nothing is lost', async () => {
    disk?.readOnly();
    const outcome = await saveAtomically(path, new Uint8Array(3), { lockFolder, expected: 'any' });
    expect(outcome).toMatchObject({ kind: 'failed', sentence: expect.stringMatching(/can only be read/) });
    expect(readFileSync(path, 'utf8')).toBe('old');
    await expect(new ExportFiles().start(join(folder, 'cone.png'), 'window-1')).rejects.toThrow(
      /can only be read/,
    );
  });
});
