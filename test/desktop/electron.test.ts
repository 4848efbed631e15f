import { mkdirSync, readFileSync, writeFileSync } from 'node:fs';
import { join } from 'node:path';
import { fileURLToPath } from 'node:url';
import { _electron, type ElectronApplication, type Page } from '@playwright/test';
import { build } from 'vite';
import { afterAll, beforeAll, describe, expect, it } from 'vitest';
import { electronArguments, electronProbe } from '../../main/launch/electronProbe.ts';
import { hasDisplay } from '../../main/launch/findBrowser.ts';
import { buildTestPage } from '../hosts/pageBundle.ts';
import { temporaryFolder } from '../hosts/testHost.ts';

const top = fileURLToPath(new URL('../..', import.meta.url));
const probe = electronProbe(join(top, 'node_modules', 'electron'));
const display = hasDisplay({ platform: process.platform, env: process.env });
const binary = display ? probe.binary : null;
if (binary === null)
  console.log(
    `Electron's program was not run: ${probe.binary === null ? probe.reason : 'there is no display'}.`,
  );

describe('the bundle of the desktop host', () => {
  const root = temporaryFolder();
  afterAll(() => root.remove());

  it('is a module for the main process and one CommonJS file for the sandboxed preload script', async () => {
    await buildDesktop(root.folder);
    const main = readFileSync(join(root.folder, 'main.js'), 'utf8');
    const preload = readFileSync(join(root.folder, 'preload.cjs'), 'utf8');
    const imported = [...main.matchAll(/^import .* from "([^"]+)";$/gm)].map((match) => match[1]!);
    expect(imported).toContain('electron');
    expect(imported.filter((name) => name !== 'electron' && !name.startsWith('node:'))).toEqual([]);
    const required = [...preload.matchAll(/require\("([^"]+)"\)/g)].map((match) => match[1]);
    expect(required).toEqual(['electron']);
    expect(preload).not.toMatch(/^(import|export) /m);
  });
});

describe.skipIf(binary === null)("Electron's real program", () => {
  const root = temporaryFolder();
  if (binary === null) root.remove();
  const folder = join(root.folder, 'studies');
  let app: ElectronApplication;
  let page: Page;

  beforeAll(async () => {
    await buildDesktop(join(root.folder, 'build', 'desktop'));
    await buildTestPage(join(root.folder, 'build', 'window'));
    mkdirSync(folder);
    writeFileSync(join(folder, 'field.csv'), 'ra,dec,z\n10,20,0.5\n');
    writeFileSync(join(folder, 'deep.study.json'), '{"version":1}');
    const entry = join(root.folder, 'build', 'desktop', 'main.js');
    const files = [join(folder, 'field.csv'), join(folder, 'deep.study.json')];
    app = await _electron.launch({
      executablePath: binary ?? '',
      args: electronArguments(entry, files, process.getuid?.() === 0),
      env: { ...process.env, CONEWRIGHT_HOME: join(root.folder, 'own') } as Record<string, string>,
    });
    page = await app.firstWindow();
    await page.waitForFunction(() => document.title === 'connected');
  }, 120_000);
  afterAll(async () => {
    await app?.evaluate(({ app: running }) => running.exit(0)).catch(() => undefined);
    root.remove();
  });

  it('shows the window at its own place, isolated, without Node', async () => {
    expect(page.url()).toBe('conewright://window/index.html');
    expect(
      await page.evaluate(() => [
        crossOriginIsolated,
        'require' in globalThis,
        'process' in globalThis,
        testPage.violations,
      ]),
    ).toEqual([true, false, false, []]);
    const preferences = await app.evaluate(({ BrowserWindow }) => {
      const contents = BrowserWindow.getAllWindows()[0]!.webContents as unknown as {
        getLastWebPreferences(): { sandbox?: boolean; contextIsolation?: boolean; nodeIntegration?: boolean };
      };
      const { sandbox, contextIsolation, nodeIntegration } = contents.getLastWebPreferences();
      return { sandbox, contextIsolation, nodeIntegration };
    });
    expect(preferences).toEqual({ sandbox: true, contextIsolation: true, nodeIntegration: false });
  });

  it('lets a worker read a named file in ranges', async () => {
    const answer = await page.evaluate(async () => {
      const { launch } = await testPage.bridge;
      return await testPage.readInWorker({ url: launch.files[0]!.url, range: 'bytes=3-5' });
    });
    expect(answer).toEqual({ status: 206, text: 'dec', isolated: true });
  });

  it('reads and saves a study', async () => {
    const outcome = await page.evaluate(async () => {
      const bridge = await testPage.bridge;
      const study = await bridge.readStudy(bridge.launch.files[1]!);
      return await bridge.saveStudy(study.target!.id, new TextEncoder().encode('{"version":2}'), study.stamp);
    });
    expect(outcome).toMatchObject({ kind: 'saved' });
    expect(readFileSync(join(folder, 'deep.study.json'), 'utf8')).toBe('{"version":2}');
  });

  it('goes nowhere else, opens nothing, and loads nothing from outside', async () => {
    const results = await page.evaluate(async () => {
      const opened = window.open('https://example.invalid/');
      location.href = 'https://example.invalid/';
      const refused = (url: string) =>
        fetch(url).then(
          () => false,
          () => true,
        );
      return {
        opened: opened !== null,
        network: await refused('http://127.0.0.1:9/'),
        file: await refused('file:///etc/hostname'),
      };
    });
    expect(results).toEqual({ opened: false, network: true, file: true });
    expect(page.url()).toBe('conewright://window/index.html');
    expect(app.windows()).toHaveLength(1);
    for (const name of ['geolocation', 'notifications'] as const)
      expect(
        await page.evaluate(
          async (asked) => (await navigator.permissions.query({ name: asked })).state,
          name,
        ),
      ).toBe('denied');
  });

  it('asks the page before unsaved work is closed', async () => {
    await page.evaluate(async () => {
      const bridge = await testPage.bridge;
      await bridge.setWindowState({ title: 'connected *', unsaved: true });
      bridge.onCloseRequest(async () => {
        document.title = 'asked';
        return 'stay';
      });
    });
    await app.evaluate(({ BrowserWindow }) => BrowserWindow.getAllWindows()[0]!.close());
    await page.waitForFunction(() => document.title === 'asked');
    expect(app.windows()).toHaveLength(1);
  });
});

async function buildDesktop(outDir: string): Promise<void> {
  await build({
    configFile: join(top, 'main', 'desktop', 'desktop.vite.ts'),
    logLevel: 'error',
    build: { outDir, emptyOutDir: false },
  });
}
