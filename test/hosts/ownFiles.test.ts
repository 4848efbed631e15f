import { mkdirSync, readdirSync, readFileSync, rmSync, symlinkSync, writeFileSync } from 'node:fs';
import { join } from 'node:path';
import { afterEach, beforeEach, describe, expect, it } from 'vitest';
import { FileHistory } from '../../main/files/history.ts';
import { checkLaunchPaths, launchPaths, saveFolderFor } from '../../main/files/launchPaths.ts';
import { userFolder } from '../../main/files/userFolder.ts';
import { windowFiles } from '../../main/files/windowFiles.ts';
import { temporaryFolder } from './testHost.ts';

describe("the program's own files", () => {
  let root: ReturnType<typeof temporaryFolder>;
  const warnings: string[] = [];
  const history = () =>
    new FileHistory(root.folder, join(root.folder, 'locks'), (line) => warnings.push(line));
  beforeEach(() => {
    root = temporaryFolder();
    warnings.length = 0;
  });
  afterEach(() => root.remove());

  it('lie where each system keeps them', () => {
    const at = (platform: NodeJS.Platform, env: Record<string, string>) =>
      userFolder({ platform, env, homeFolder: '/home/ada' });
    expect(at('linux', {})).toBe('/home/ada/.config/conewright');
    expect(at('linux', { XDG_CONFIG_HOME: '/elsewhere' })).toBe('/elsewhere/conewright');
    // XDG Base Directory Specification 0.8: "All paths ... must be absolute. If ... relative ... ignore it".
    expect(at('linux', { XDG_CONFIG_HOME: 'relative' })).toBe('/home/ada/.config/conewright');
    expect(at('darwin', {})).toBe('/home/ada/Library/Application Support/Conewright');
    expect(at('win32', { APPDATA: 'C:\\Roaming' })).toMatch(/^C:\\Roaming.Conewright$/);
    expect(at('linux', { CONEWRIGHT_HOME: '/own' })).toBe('/own');
  });

  it('remember files of two programs at once without losing any', async () => {
    const paths = Array.from({ length: 20 }, (_, n) => `/files/${n}.study.json`);
    const [one, other] = [history(), history()];
    await Promise.all(paths.map((path, n) => (n % 2 ? one : other).add([path])));
    expect((await history().recent()).map(({ name }) => name).sort()).toEqual(
      paths.map((path) => path.slice('/files/'.length)).sort(),
    );
  });

  it('that cannot be understood are set aside, not overwritten', async () => {
    for (const text of ['{"version":1,"fi', '{"version":2,"files":[]}', '[]', '']) {
      writeFileSync(join(root.folder, 'history.json'), text);
      await history().add(['/files/a.csv']);
      expect(await history().holds('/files/a.csv')).toBe(true);
      const aside = readdirSync(root.folder).filter((name) => name.startsWith('unreadable-'));
      expect(aside.map((name) => readFileSync(join(root.folder, name), 'utf8'))).toContain(text);
      expect(warnings.at(-1)).toMatch(/could not be understood and was set aside as .*; a new one begins\.$/);
    }
  });

  it('show studies only, at most twenty', async () => {
    await history().add(Array.from({ length: 30 }, (_, n) => `/files/${n}.study.json`));
    await history().add(['/files/a.csv']);
    const recent = await history().recent();
    expect(recent).toHaveLength(20);
    expect(recent.every(({ name }) => name.endsWith('.json'))).toBe(true);
  });

  it('named on the command line are taken from where the program was started', async () => {
    const paths = launchPaths(['a.csv', '/b/c.study.json', '../d.csv'], '/home/ada');
    expect(paths).toEqual(['/home/ada/a.csv', '/b/c.study.json', '/home/d.csv']);
    await expect(checkLaunchPaths([join(root.folder, 'missing.csv')])).rejects.toThrow(
      /^missing\.csv could not be opened: /,
    );
    mkdirSync(join(root.folder, 'folder'));
    await expect(checkLaunchPaths([join(root.folder, 'folder')])).rejects.toThrow(
      /is a folder, a file was expected/,
    );
  });

  it('decide where studies are saved: beside the first, else here, never among the sources of the program', async () => {
    const programFolder = join(root.folder, 'program');
    const homeFolder = join(root.folder, 'home');
    mkdirSync(join(programFolder, 'main'), { recursive: true });
    mkdirSync(join(root.folder, 'programmes'));
    mkdirSync(homeFolder);
    symlinkSync(programFolder, join(root.folder, 'link'));
    const saved = (paths: string[], baseFolder: string) =>
      saveFolderFor(paths, { baseFolder, programFolder, homeFolder });

    expect(await saved(['/x/a.csv', '/b/c.study.json'], homeFolder)).toBe('/x');
    expect(await saved([], root.folder)).toBe(root.folder);
    expect(await saved([], join(root.folder, 'programmes'))).toBe(join(root.folder, 'programmes'));
    for (const own of [programFolder, join(programFolder, 'main'), join(root.folder, 'link')])
      expect(await saved([], own)).toBe(homeFolder);
    writeFileSync(join(homeFolder, 'Documents'), 'a file of that name');
    expect(await saved([], programFolder)).toBe(homeFolder);
    rmSync(join(homeFolder, 'Documents'));
    mkdirSync(join(homeFolder, 'Documents'));
    expect(await saved([], programFolder)).toBe(join(homeFolder, 'Documents'));
  });

  it('of a window that is not built are told in a sentence', () => {
    expect(() => windowFiles(join(root.folder, 'none'))).toThrow(
      /^The window is not built .*: run npm start/,
    );
  });
});
