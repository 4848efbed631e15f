import {
  chmodSync,
  existsSync,
  linkSync,
  lstatSync,
  mkdirSync,
  readdirSync,
  readFileSync,
  statSync,
  symlinkSync,
  writeFileSync,
} from 'node:fs';
import { join } from 'node:path';
import { afterEach, beforeEach, describe, expect, it } from 'vitest';
import { type SaveOptions, saveAtomically } from '../../main/files/atomicSave.ts';
import { type FileCalls, systemCalls } from '../../main/files/fileCalls.ts';
import { sha256Of, stampOf } from '../../main/files/fileStamp.ts';
import { temporaryFolder } from './testHost.ts';

const bytesOf = (text: string) => new TextEncoder().encode(text);
const failure = (code: string) => Object.assign(new Error(`${code}: as the system says`), { code });
const isPosix = process.platform !== 'win32';

describe('saving atomically', () => {
  let root: ReturnType<typeof temporaryFolder>;
  let folder: string;
  let path: string;

  beforeEach(() => {
    root = temporaryFolder();
    folder = join(root.folder, 'studies');
    path = join(folder, 'deep.study.json');
    mkdirSync(folder);
  });
  afterEach(() => root.remove());

  const save = (text: string, options: Partial<SaveOptions> = {}) =>
    saveAtomically(path, bytesOf(text), {
      lockFolder: join(root.folder, 'locks'),
      expected: 'any',
      ...options,
    });

  it('answers the stamp that reading the file gives', async () => {
    const outcome = await save('contents');
    expect(outcome).toEqual({ kind: 'saved', stamp: await stampOf(path) });
    expect(outcome).toMatchObject({ stamp: { sha256: sha256Of(bytesOf('contents')), sizeBytes: 8 } });
  });

  it('keeps the permissions of the file that it replaces', async () => {
    writeFileSync(path, 'old');
    for (const mode of [0o600, 0o640, 0o664]) {
      chmodSync(path, mode);
      await save(`new ${mode}`);
      if (isPosix) expect(statSync(path).mode & 0o7777).toBe(mode);
      expect(readFileSync(path, 'utf8')).toBe(`new ${mode}`);
    }
  });

  it('follows a link and leaves it a link', async () => {
    const real = join(root.folder, 'real.json');
    writeFileSync(real, 'old');
    symlinkSync(real, path);
    expect(await save('new')).toMatchObject({ kind: 'saved' });
    expect(lstatSync(path).isSymbolicLink()).toBe(true);
    expect(readFileSync(real, 'utf8')).toBe('new');
  });

  it('does not touch another name of the same file', async () => {
    writeFileSync(path, 'old');
    const other = join(root.folder, 'copy.json');
    linkSync(path, other);
    await save('new');
    expect(readFileSync(other, 'utf8')).toBe('old');
  });

  it('removes the leftovers of its own target and no other file', async () => {
    await save('first', {
      calls: { ...systemCalls, rename: () => Promise.reject(failure('EIO')), unlink: async () => undefined },
    });
    const left = readdirSync(folder);
    expect(left).toEqual([expect.stringMatching(/^\.[0-9a-f]{16}-[0-9a-f]{24}\.conewright-part$/)]);
    const foreign = [
      '.other-part',
      '.0123456789abcdef-0123456789abcdef01234567.conewright-part',
      'x.conewright-part',
    ];
    for (const name of foreign) writeFileSync(join(folder, name), '');
    await save('second');
    expect(readdirSync(folder).sort()).toEqual([...foreign, 'deep.study.json'].sort());
  });

  it('does not let two saves at once mix or lose each other', async () => {
    const texts = Array.from({ length: 12 }, (_, n) => `${n}`.repeat(50_000 + n));
    const outcomes = await Promise.all(texts.map((text) => save(text)));
    expect(outcomes.every(({ kind }) => kind === 'saved')).toBe(true);
    expect(texts).toContain(readFileSync(path, 'utf8'));
    const expectingNothing = await Promise.all(texts.map((text) => save(text, { expected: null })));
    const kinds = expectingNothing.map(({ kind }) => kind);
    // The one whose very contents stand there already has nothing to write; all others are told.
    expect(kinds.filter((kind) => kind === 'saved')).toHaveLength(1);
    expect(kinds.filter((kind) => kind === 'conflict')).toHaveLength(11);
  });

  it('is no conflict when only the time of the file changed', async () => {
    writeFileSync(path, 'old');
    const stamp = { ...(await stampOf(path)), modifiedMs: 1 };
    expect(await save('new', { expected: stamp })).toMatchObject({ kind: 'saved' });
  });

  describe('when the system refuses', () => {
    /** Each call of the system that can fail on the way, with the code that it fails with. */
    const refusing = (code: string): [string, FileCalls][] => {
      const fail = () => Promise.reject(failure(code));
      const part =
        (method: 'writeFile' | 'sync' | 'close'): FileCalls['open'] =>
        async (name, flags, mode) => {
          const file = await systemCalls.open(name, flags, mode);
          if (flags !== 'wx') return file;
          const really = file[method].bind(file) as () => Promise<void>;
          // A close that reports a fault has closed all the same; a write that fails has written a part.
          file[method] = (async (data: unknown) => {
            if (method === 'writeFile') await file.write((data as Uint8Array).subarray(0, 2));
            if (method === 'close') await really();
            throw failure(code);
          }) as never;
          return file;
        };
      return [
        [
          'creating',
          {
            ...systemCalls,
            open: (name, flags, mode) => (flags === 'wx' ? fail() : systemCalls.open(name, flags, mode)),
          },
        ],
        ['writing', { ...systemCalls, open: part('writeFile') }],
        ['syncing', { ...systemCalls, open: part('sync') }],
        ['closing', { ...systemCalls, open: part('close') }],
        ['renaming', { ...systemCalls, rename: fail }],
      ];
    };

    it.each(refusing('ENOSPC'))(
      'a full disk while %s leaves the old file, and a sentence',
      async (_, calls) => {
        writeFileSync(path, 'old');
        const outcome = await save('new', { calls });
        expect(outcome).toEqual({
          kind: 'failed',
          sentence: `deep.study.json could not be saved: the disk that holds ${folder} is full; free some space there or choose another folder.`,
        });
        expect(readFileSync(path, 'utf8')).toBe('old');
        expect(readdirSync(folder)).toEqual(['deep.study.json']);
      },
    );

    it.each([
      ['EROFS', /can only be read/],
      ['EACCES', /no permission/],
      ['EPERM', /no permission/],
      ['EDQUOT', /quota/],
      ['ENAMETOOLONG', /shorter/],
      ['EIO', /reports a fault/],
      ['EBUSY', /another program holds it/],
      ['EMFILE', /too many files/],
      ['EFBIG', /larger than that disk allows/],
      ['EUNHEARDOF', /the system says "EUNHEARDOF: as the system says"/],
    ])('%s is told in one sentence', async (code, words) => {
      writeFileSync(path, 'old');
      for (const [, calls] of refusing(code)) {
        const outcome = await save('new', { calls });
        if (outcome.kind !== 'failed') throw new Error(`answered ${outcome.kind}`);
        expect(outcome.sentence).toMatch(words);
        expect(outcome.sentence).toMatch(/^deep\.study\.json could not be saved: [^\n]*\.$/);
      }
      expect(readFileSync(path, 'utf8')).toBe('old');
    });

    it('a new file on a disk without hard links is saved, and never over another', async () => {
      const calls: FileCalls = { ...systemCalls, link: () => Promise.reject(failure('EPERM')) };
      expect(await save('new', { expected: null, calls })).toMatchObject({ kind: 'saved' });
      expect(await save('newer', { expected: null, calls })).toMatchObject({ kind: 'conflict' });
      expect(readFileSync(path, 'utf8')).toBe('new');
    });

    it('a new file that another made in the last moment is a conflict', async () => {
      const calls: FileCalls = {
        ...systemCalls,
        link: async (part, target) => {
          writeFileSync(target, 'of another');
          await systemCalls.link(part, target);
        },
      };
      expect(await save('mine', { expected: null, calls })).toMatchObject({ kind: 'conflict' });
      expect(readFileSync(path, 'utf8')).toBe('of another');
      expect(readdirSync(folder)).toEqual(['deep.study.json']);
    });

    it('a disk that cannot sync folders still saves', async () => {
      const calls: FileCalls = {
        ...systemCalls,
        open: async (name, flags, mode) => {
          const file = await systemCalls.open(name, flags, mode);
          if (name === folder) file.sync = () => Promise.reject(failure('EINVAL'));
          return file;
        },
      };
      expect(await save('new', { calls })).toMatchObject({ kind: 'saved' });
    });
  });

  it('syncs the file before it is renamed, and the folder after', async () => {
    const order: string[] = [];
    const calls: FileCalls = {
      ...systemCalls,
      open: async (name, flags, mode) => {
        const file = await systemCalls.open(name, flags, mode);
        const sync = file.sync.bind(file);
        file.sync = () => {
          order.push(name === folder ? 'sync folder' : 'sync file');
          return sync();
        };
        return file;
      },
      rename: (from, to) => {
        order.push('rename');
        return systemCalls.rename(from, to);
      },
    };
    await save('new', { calls });
    expect(order).toEqual(['sync file', 'rename', 'sync folder']);
  });

  it('refuses a folder and what is under a file, in sentences', async () => {
    mkdirSync(path);
    expect(await save('x')).toMatchObject({ kind: 'failed', sentence: expect.stringMatching(/is a folder/) });
    writeFileSync(join(folder, 'file'), '');
    const under = await saveAtomically(join(folder, 'file', 'x.json'), bytesOf('x'), {
      lockFolder: join(root.folder, 'locks'),
      expected: null,
    });
    expect(under).toMatchObject({ kind: 'failed', sentence: expect.stringMatching(/is not a folder/) });
  });

  it('does not wait for a pipe', async () => {
    if (!isPosix) return expect(existsSync('/dev/null')).toBe(false);
    symlinkSync('/dev/null', path);
    const outcome = await save('x');
    expect(outcome).toMatchObject({ kind: 'failed', sentence: expect.stringMatching(/device or a pipe/) });
  });
});
