import { once } from 'node:events';
import { chmodSync, existsSync, mkdirSync, readFileSync, writeFileSync } from 'node:fs';
import { createServer } from 'node:http';
import type { AddressInfo } from 'node:net';
import { homedir } from 'node:os';
import { join } from 'node:path';
import { type Browser, type BrowserContext, chromium, type Page } from '@playwright/test';
import { afterAll, afterEach, beforeAll, beforeEach, describe, expect, it } from 'vitest';
import { isProcessAlive } from '../../main/files/processes.ts';
import { findBrowser } from '../../main/launch/findBrowser.ts';
import { runLocal } from '../../main/local/run.ts';
import { type LocalServer, startLocalServer } from '../../main/local/server.ts';
import { buildTestPage } from './pageBundle.ts';
import { temporaryFolder } from './testHost.ts';

const found = findBrowser({ platform: process.platform, env: process.env, homeFolder: homedir() });
if (found === null) console.log('The local host was not tried in a real browser: none is installed here.');
const flags = [
  ...(process.getuid?.() === 0 ? ['--no-sandbox'] : []),
  '--disable-background-networking',
  '--disable-component-update',
  '--disable-sync',
  '--no-first-run',
];

describe.skipIf(found === null)('the local host in a real browser', () => {
  const root = temporaryFolder();
  if (found === null) root.remove();
  const folder = join(root.folder, 'studies');
  const windowFolder = join(root.folder, 'window');
  let browser: Browser;
  let context: BrowserContext;
  let server: LocalServer;
  let complaints: string[];

  beforeAll(async () => {
    await buildTestPage(windowFolder);
    mkdirSync(folder);
    writeFileSync(join(folder, 'field.csv'), 'ra,dec,z\n10,20,0.5\n');
    writeFileSync(join(folder, 'deep.study.json'), '{"version":1}');
    browser = await chromium.launch({ executablePath: found?.path ?? '', args: flags });
  });
  afterAll(async () => {
    await browser?.close();
    root.remove();
  });

  beforeEach(async () => {
    complaints = [];
    server = await startLocalServer({
      windowFolder,
      userFolder: join(root.folder, 'own'),
      saveFolder: folder,
      launchPaths: [join(folder, 'field.csv'), join(folder, 'deep.study.json')],
      port: 0,
      warn: (line) => complaints.push(line),
    });
    context = await browser.newContext();
  });
  afterEach(async () => {
    await context.close();
    await server.close();
  });

  async function openPage(address = server.addressForOneUse()): Promise<Page> {
    const page = await context.newPage();
    page.on('console', (message) => {
      if (message.type() === 'error') complaints.push(message.text());
    });
    page.on('pageerror', (error) => complaints.push(error.message));
    await page.goto(address);
    await page.waitForFunction(() => document.title === 'connected');
    return page;
  }

  it('shows the window at its own address, isolated, without a complaint', async () => {
    const page = await openPage();
    expect(page.url()).toBe(server.address);
    expect(await page.evaluate(() => [crossOriginIsolated, typeof SharedArrayBuffer])).toEqual([
      true,
      'function',
    ]);
    expect(await page.evaluate(() => testPage.violations)).toEqual([]);
    expect(complaints).toEqual([]);
    await page.reload();
    await page.waitForFunction(() => document.title === 'connected');
    expect(complaints).toEqual([]);
  });

  it('runs no inline script, no code from text, and loads nothing from elsewhere', async () => {
    const page = await openPage();
    const ran = await page.evaluate(async () => {
      const script = document.createElement('script');
      script.textContent = 'globalThis.inlineRan = true';
      document.body.append(script);
      // What a test evaluates may make code from text in its first turn, whatever the page's policy says.
      await new Promise((resolve) => setTimeout(resolve));
      const attempts = [
        () => Reflect.apply(Reflect.get(globalThis, 'eval'), null, ['1']),
        () => new Function('return 1')(),
        () => new Worker('data:text/javascript,0'),
      ];
      const refused = attempts.map((attempt) => {
        try {
          attempt();
          return false;
        } catch {
          return true;
        }
      });
      const foreign = await fetch('http://127.0.0.1:9/').then(
        () => 'loaded',
        () => 'refused',
      );
      return { inline: 'inlineRan' in globalThis, code: refused.slice(0, 2), foreign };
    });
    expect(ran).toEqual({ inline: false, code: [true, true], foreign: 'refused' });
    expect(
      await page.evaluate(() => testPage.violations.map((violation) => violation.split(' ')[0])),
    ).toEqual(expect.arrayContaining(['script-src-elem', 'script-src', 'worker-src', 'connect-src']));
  });

  it('lets a worker read a named file in ranges', async () => {
    const page = await openPage();
    const read = (range: string | null) =>
      page.evaluate(async (asked) => {
        const { launch } = await testPage.bridge;
        return await testPage.readInWorker({ url: launch.files[0]!.url, range: asked });
      }, range);
    expect(await read(null)).toEqual({ status: 200, text: 'ra,dec,z\n10,20,0.5\n', isolated: true });
    expect(await read('bytes=3-5')).toEqual({ status: 206, text: 'dec', isolated: true });
  });

  it('lets a worker read a picked file, whole and in ranges, and hashes it', async () => {
    const page = await openPage();
    const chooser = page.waitForEvent('filechooser');
    const chosen = page.evaluate(async () => {
      const bridge = await testPage.bridge;
      const [file] = await bridge.chooseFiles('catalogue');
      const whole = await testPage.readInWorker({ url: file!.url, range: null });
      const part = await testPage.readInWorker({ url: file!.url, range: 'bytes=3-5' });
      const stamp = await bridge.fingerprint(file!);
      bridge.releaseFile(file!);
      return { file: file!, whole, part, stamp };
    });
    await (await chooser).setFiles(join(folder, 'field.csv'));
    const { file, whole, part, stamp } = await chosen;
    expect(file).toMatchObject({ name: 'field.csv', sizeBytes: 19, path: null });
    expect(file.url).toMatch(/^blob:/);
    expect(whole.text).toBe('ra,dec,z\n10,20,0.5\n');
    expect(part).toMatchObject({ status: 206, text: 'dec' });
    // sha256sum of the same 19 bytes (GNU coreutils 9.1).
    expect(stamp).toMatchObject({ sizeBytes: 19, sha256: FIELD_SHA256 });
    expect(complaints).toEqual([]);
  });

  it('saves a picked study back over itself, and tells a second window', async () => {
    const [one, other] = [await openPage(), await openPage()];
    const openStudy = async (page: Page) => {
      const chooser = page.waitForEvent('filechooser');
      const reading = page.evaluate(async () => {
        const bridge = await testPage.bridge;
        const [file] = await bridge.chooseFiles('study');
        const { target, stamp } = await bridge.readStudy(file!);
        return { target: target!, stamp };
      });
      await (await chooser).setFiles(join(folder, 'deep.study.json'));
      return await reading;
    };
    const save = (page: Page, study: Awaited<ReturnType<typeof openStudy>>, text: string) =>
      page.evaluate(
        async ([{ target, stamp }, contents]) =>
          (await testPage.bridge).saveStudy(target.id, new TextEncoder().encode(contents), stamp),
        [study, text] as const,
      );
    const here = await openStudy(one);
    const there = await openStudy(other);
    expect(await save(one, here, 'from one')).toMatchObject({ kind: 'saved' });
    expect(await save(other, there, 'from other')).toMatchObject({ kind: 'conflict' });
    expect(readFileSync(join(folder, 'deep.study.json'), 'utf8')).toBe('from one');
  });

  it('exports as a download', async () => {
    const page = await openPage();
    const downloading = page.waitForEvent('download');
    await page.evaluate(async () => {
      async function* pieces() {
        yield new Uint8Array([104, 97]);
        yield new Uint8Array([108, 102]);
      }
      await (await testPage.bridge).exportFile('../cone.txt', 'text/plain', pieces());
    });
    const download = await downloading;
    expect(download.suggestedFilename()).toBe('-cone.txt');
    expect(readFileSync(await download.path(), 'utf8')).toBe('half');
  });

  it('lets the browser ask before unsaved work is closed, and not else', async () => {
    const page = await openPage();
    await page.click('button');
    const setState = (unsaved: boolean) =>
      page.evaluate(
        async (state) => (await testPage.bridge).setWindowState({ title: 'connected', unsaved: state }),
        unsaved,
      );
    await setState(true);
    const asking = page.waitForEvent('dialog');
    await page.evaluate(() => void setTimeout(() => location.reload()));
    const dialog = await asking;
    expect(dialog.type()).toBe('beforeunload');
    await dialog.dismiss();
    await setState(false);
    await page.reload();
    await page.waitForFunction(() => document.title === 'connected');
  });

  it('offers the unsaved work of a page that was closed or loaded again', async () => {
    const [one, other] = [await openPage(), await openPage()];
    const offered = (page: Page) =>
      page.evaluate(async () => (await (await testPage.bridge).listUnsaved()).map(({ title }) => title));
    const keep = (page: Page, title: string) =>
      page.evaluate(
        async (name) => (await testPage.bridge).keepUnsaved(`work-${name}-01234567`, name, new Uint8Array(3)),
        title,
      );
    await keep(one, 'closed');
    await keep(other, 'reloaded');
    expect(await offered(other)).toEqual([]);
    await one.close();
    await other.reload();
    await other.waitForFunction(() => document.title === 'connected');
    await expect.poll(() => offered(other).then((titles) => titles.sort())).toEqual(['closed', 'reloaded']);
  });

  it('tells the window when its host has ended', async () => {
    const page = await openPage();
    await server.close();
    await page.waitForFunction(() => testPage.lost);
    const words = await page.evaluate(async () =>
      (await testPage.bridge).recentStudies().then(
        () => '',
        (error: Error) => error.message,
      ),
    );
    expect(words).toMatch(/^The program behind this window does not answer: start it again/);
  });

  it('gives nothing to a page of another site, even if that knows the token', async () => {
    const attacker = createServer((_, response) => {
      response.writeHead(200, { 'content-type': 'text/html' });
      response.end('<!doctype html><title>attacker</title>');
    });
    attacker.listen(0, '127.0.0.1');
    await once(attacker, 'listening');
    const page = await context.newPage();
    await page.goto(`http://127.0.0.1:${(attacker.address() as AddressInfo).port}/`);
    const answers: number[] = [];
    page.on('response', (response) => {
      if (response.url().startsWith(server.address)) answers.push(response.status());
    });
    const results = await page.evaluate(async (base) => {
      const attempt = (promise: Promise<unknown>) =>
        promise.then(
          () => 'answered',
          () => 'refused',
        );
      const line = new Promise((resolve, reject) => {
        const socket = new WebSocket(`${base.replace('http', 'ws')}line/0123456789abcdef`);
        socket.onopen = resolve;
        socket.onerror = reject;
      });
      const frame = document.createElement('iframe');
      frame.src = base;
      document.body.append(frame);
      await new Promise((resolve) => {
        frame.onload = resolve;
      });
      return {
        read: await attempt(fetch(base)),
        call: await attempt(fetch(`${base}call`, { method: 'POST', body: 'x' })),
        line: await attempt(line),
        // A frame that was refused shows the browser's own page, which has no document of ours.
        frame: frame.contentDocument === null,
      };
    }, server.address);
    expect(results).toEqual({ read: 'refused', call: 'refused', line: 'refused', frame: true });
    expect(answers.length).toBeGreaterThan(0);
    expect(answers.every((status) => status === 403)).toBe(true);
    // Without reading the answer: the request itself is refused.
    const before = answers.length;
    await page.evaluate(
      (base) => fetch(`${base}call`, { method: 'POST', mode: 'no-cors', body: 'x' }).catch(() => null),
      server.address,
    );
    expect(answers.slice(before).every((status) => status === 403)).toBe(true);
    attacker.close();
    attacker.closeAllConnections();
  });

  it('runs as the program runs it, and ends the browser with the host', async () => {
    // As the user's browser, but without a screen.
    const headless = join(root.folder, 'headless.sh');
    writeFileSync(headless, `#!/bin/sh\nexec "${found?.path}" --headless=new "$@"\n`);
    chmodSync(headless, 0o755);
    const own = join(root.folder, 'own-run');
    const lines: string[] = [];
    const running = await runLocal({
      windowFolder,
      files: [],
      open: true,
      print: (line) => void lines.push(line),
      baseFolder: folder,
      programFolder: windowFolder,
      machine: {
        platform: process.platform,
        env: { CHROME_PATH: headless, CONEWRIGHT_HOME: own },
        homeFolder: root.folder,
      },
    });
    const answered = () =>
      fetch(running.address).then(
        () => true,
        () => false,
      );
    await expect.poll(() => existsSync(join(own, 'browser-1', 'Default')), { timeout: 30_000 }).toBe(true);
    const browserPid = Number(readFileSync(join(own, 'browser-1', 'conewright-holder'), 'utf8'));
    expect([isProcessAlive(browserPid), browserPid === process.pid]).toEqual([true, false]);
    expect(await answered()).toBe(true);
    expect(lines).toEqual([`Studies are saved in ${folder}`]);
    await running.stop();
    await running.closed;
    expect(await answered()).toBe(false);
    await expect.poll(() => isProcessAlive(browserPid), { timeout: 30_000 }).toBe(false);
  });
});

const FIELD_SHA256 = 'a126ffb8f16a59a5d190529edc5dd3993fdb7b5a3f2d604df8767b947810f2b6';
