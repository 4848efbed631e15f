import { chmodSync, mkdirSync, writeFileSync } from 'node:fs';
import { join } from 'node:path';
import { afterEach, beforeEach, describe, expect, it } from 'vitest';
import { electronArguments, electronProbe, fetchElectron } from '../../main/launch/electronProbe.ts';
import { temporaryFolder } from './testHost.ts';

describe("looking for Electron's program", () => {
  let root: ReturnType<typeof temporaryFolder>;
  let folder: string;
  beforeEach(() => {
    root = temporaryFolder();
    folder = join(root.folder, 'electron');
    mkdirSync(join(folder, 'dist'), { recursive: true });
    // As the real package does: whoever loads it begins to download.
    writeFileSync(join(folder, 'index.js'), 'throw new Error("the package was loaded");');
  });
  afterEach(() => root.remove());

  const program = (path: string) => {
    writeFileSync(path, '');
    chmodSync(path, 0o755);
  };
  const installer = (code: string) => writeFileSync(join(folder, 'install.js'), code);

  it('finds none before it was downloaded', () => {
    expect(electronProbe(folder, {})).toEqual({ binary: null, reason: 'its program is not downloaded' });
    expect(electronProbe(join(root.folder, 'none'), {}).binary).toBeNull();
  });

  it('finds it by path.txt, when it is there', () => {
    writeFileSync(join(folder, 'path.txt'), 'electron');
    expect(electronProbe(folder, {})).toMatchObject({
      binary: null,
      reason: expect.stringMatching(/is not at/),
    });
    program(join(folder, 'dist', 'electron'));
    expect(electronProbe(folder, {}).binary).toBe(join(folder, 'dist', 'electron'));
  });

  it('finds it where ELECTRON_OVERRIDE_DIST_PATH says', () => {
    const elsewhere = join(root.folder, 'elsewhere');
    mkdirSync(elsewhere);
    writeFileSync(join(folder, 'path.txt'), 'electron');
    program(join(elsewhere, 'electron'));
    expect(electronProbe(folder, { ELECTRON_OVERRIDE_DIST_PATH: elsewhere }).binary).toBe(
      join(elsewhere, 'electron'),
    );
  });

  it.each(['', '/bin/sh', '../../evil'])('takes no path.txt that says "%s"', (name) => {
    writeFileSync(join(folder, 'path.txt'), name);
    expect(electronProbe(folder, {}).binary).toBeNull();
  });

  it('lets the installer fetch it', async () => {
    installer(
      `const fs = require('fs'); fs.writeFileSync(__dirname + '/path.txt', 'electron');
       fs.writeFileSync(__dirname + '/dist/electron', ''); fs.chmodSync(__dirname + '/dist/electron', 0o755);`,
    );
    expect((await fetchElectron(folder, { env: {} })).binary).toBe(join(folder, 'dist', 'electron'));
  });

  it('tells in plain words why it could not be fetched', async () => {
    installer(
      "const e = new Error('getaddrinfo ENOTFOUND downloads.invalid'); console.error(e.stack); process.exit(1);",
    );
    expect(await fetchElectron(folder, { env: {} })).toEqual({
      binary: null,
      reason: 'its download failed (getaddrinfo ENOTFOUND downloads.invalid)',
    });
    installer('process.exit(1)');
    expect((await fetchElectron(folder, { env: {} })).reason).toBe('its download failed (no reason given)');
  });

  it('does not wait for a download that hangs', async () => {
    installer('setInterval(() => {}, 1000)');
    const { binary, reason } = await fetchElectron(folder, { env: {}, limitMs: 300 });
    expect(binary).toBeNull();
    expect(reason).toMatch(/^its download took longer than/);
  });

  it('passes files after two dashes, so that none is taken for a switch', () => {
    expect(electronArguments('main.js', ['--inspect.csv'], false)).toEqual([
      'main.js',
      '--',
      '--inspect.csv',
    ]);
    expect(electronArguments('main.js', [], true)[0]).toBe('--no-sandbox');
  });
});
