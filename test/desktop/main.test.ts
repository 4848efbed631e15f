// main.ts itself, tied to a stand-in for Electron: that every rule is in its place, in the right order.
import { writeFileSync } from 'node:fs';
import { join } from 'node:path';
import { afterEach, beforeEach, describe, expect, it, vi } from 'vitest';
import { CHANNELS } from '../../main/desktop/channels.ts';
import { WINDOW_URL } from '../../main/desktop/place.ts';
import { temporaryFolder } from '../hosts/testHost.ts';
import { PlayedElectron, type PlayedWindow } from './playedElectron.ts';

let electron: PlayedElectron;
let windowIsBuilt = true;
let page = '';

describe('the main process of the desktop host', () => {
  let root: ReturnType<typeof temporaryFolder>;
  const errors: string[] = [];
  const settle = () => new Promise((resolve) => setTimeout(resolve, 30));

  beforeEach(() => {
    root = temporaryFolder();
    page = join(root.folder, 'index.html');
    writeFileSync(page, '<!doctype html>');
    writeFileSync(join(root.folder, 'field.csv'), 'ra,dec,z\n');
    electron = new PlayedElectron();
    windowIsBuilt = true;
    errors.length = 0;
    vi.resetModules();
    vi.doMock('electron', () => electron.module());
    vi.doMock('../../main/files/windowFiles.ts', async () => {
      const { Refusal } = await import('../../shared-core/base/refusal.ts');
      return {
        windowFiles() {
          if (!windowIsBuilt) throw new Refusal('The window is not built: run npm start, which builds it.');
          return new Map([['index.html', { path: page, type: 'text/html' }]]);
        },
      };
    });
    vi.stubEnv('CONEWRIGHT_HOME', join(root.folder, 'own'));
    vi.stubEnv('INIT_CWD', root.folder);
    vi.spyOn(console, 'error').mockImplementation((line: string) => void errors.push(line));
  });
  afterEach(() => {
    electron.app.emit('will-quit');
    vi.unstubAllEnvs();
    vi.restoreAllMocks();
    root.remove();
  });

  async function start(...files: string[]): Promise<PlayedWindow> {
    const argv = process.argv;
    process.argv = ['conewright', '--', ...files];
    try {
      await import('../../main/desktop/main.ts');
      await settle();
    } finally {
      process.argv = argv;
    }
    return electron.windows[0]!;
  }

  const windowId = '0123456789abcdef';
  const call = (window: PlayedWindow, name: string, argument: object = {}) =>
    electron.channels.get(CHANNELS.call)!(window.sender(), { windowId, call: name, argument, bytes: null });

  it('forces the sandbox and names its scheme before it is ready, then shows the window', async () => {
    const window = await start();
    expect(electron.order).toEqual(['sandbox', 'scheme', 'ready']);
    expect(window.loaded).toEqual([WINDOW_URL]);
    expect(window.options).toMatchObject({
      webPreferences: { sandbox: true, preload: expect.stringMatching(/preload\.cjs$/) },
    });
    expect(electron.paths.get('userData')).toBe(join(root.folder, 'own', 'desktop'));
    expect(errors).toEqual([]);
  });

  it('leaves the sandbox alone where it was started without', async () => {
    electron.switches.add('no-sandbox');
    await start();
    expect(electron.order).toEqual(['scheme', 'ready']);
  });

  it('opens the files it was started with, and those of a second start in a window of their own', async () => {
    const window = await start('field.csv');
    expect(await call(window, 'launch')).toMatchObject({
      answer: { files: [{ name: 'field.csv' }], troubles: [] },
    });
    electron.app.emit('second-instance', {}, [], '', { paths: [join(root.folder, 'missing.csv')] });
    const second = electron.windows[1]!;
    const message = { windowId: 'fedcba9876543210', call: 'launch', argument: {}, bytes: null };
    const answer = await electron.channels.get(CHANNELS.call)!(second.sender(), message);
    expect(answer).toMatchObject({
      answer: { files: [], troubles: [expect.stringMatching(/^missing\.csv/)] },
    });
  });

  it('hands its files over when the program runs already', async () => {
    electron.isFirst = false;
    await start('field.csv');
    expect(electron.handedOver).toEqual({ paths: [join(root.folder, 'field.csv')] });
    expect(electron.order).toEqual(['sandbox', 'scheme', 'quit']);
    expect(electron.windows).toEqual([]);
  });

  it('says in a line when the window is not built, and ends', async () => {
    windowIsBuilt = false;
    await start();
    expect(errors).toEqual(['conewright: The window is not built: run npm start, which builds it.']);
    expect(electron.order.at(-1)).toBe('exit 1');
  });

  it('refuses what a page could try', async () => {
    const window = await start();
    const prevented = (
      emitter: { emit(name: string, ...values: unknown[]): boolean },
      name: string,
      event: object = {},
    ) => {
      const preventDefault = vi.fn();
      emitter.emit(name, { ...event, preventDefault });
      return preventDefault.mock.calls.length === 1;
    };
    const contents = window.webContents;
    expect(prevented(contents, 'will-frame-navigate', { url: 'https://example.com/' })).toBe(true);
    expect(prevented(contents, 'will-frame-navigate', { url: WINDOW_URL })).toBe(false);
    expect(prevented(contents, 'will-redirect')).toBe(true);
    expect(prevented(contents, 'will-attach-webview')).toBe(true);
    expect(prevented(electron.session, 'will-download')).toBe(true);
    expect(window.openHandler()).toEqual({ action: 'deny' });
    expect(electron.devices()).toBe(false);
    const details = { requestingUrl: WINDOW_URL, isMainFrame: true };
    const granted = vi.fn();
    electron.permissionRequest(null, 'media', granted, details);
    electron.permissionRequest(null, 'clipboard-sanitized-write', granted, details);
    expect(granted.mock.calls).toEqual([[false], [true]]);
    expect(electron.permissionCheck(null, 'geolocation', 'conewright://window', details)).toBe(false);
    const cancelled = vi.fn();
    electron.beforeRequest({ url: 'https://example.com/' }, cancelled);
    electron.beforeRequest({ url: WINDOW_URL }, cancelled);
    expect(cancelled.mock.calls).toEqual([[{ cancel: true }], [{ cancel: false }]]);
  });

  it('answers its own scheme with the headers that isolate the page', async () => {
    await start();
    const request = { method: 'GET', url: WINDOW_URL, headers: new Headers() };
    const response = await electron.schemeHandler!(request);
    expect([response.status, response.headers.get('cross-origin-embedder-policy')]).toEqual([
      200,
      'require-corp',
    ]);
    expect(await response.text()).toBe('<!doctype html>');
  });

  it('lets the page ask before unsaved work is closed, and the user when it does not answer', async () => {
    const window = await start();
    await call(window, 'setWindowState', { title: 'deep field *', unsaved: true });
    expect(window.title).toBe('deep field *');
    window.close();
    expect(window.sent).toEqual([{ kind: 'closeRequest' }]);
    expect(window.destroyed).toBe(false);
    window.close();
    await settle();
    expect(window.destroyed).toBe(false);
    electron.dialogAnswer = 1;
    window.close();
    await settle();
    expect(window.destroyed).toBe(true);
    await expect(call(window, 'launch')).resolves.toMatchObject({
      refused: expect.stringMatching(/not known/),
    });
  });

  it('closes a window that has nothing to lose, or agrees', async () => {
    const window = await start();
    window.close();
    expect(window.destroyed).toBe(true);
    electron.app.emit('second-instance', {}, [], '', {});
    const second = electron.windows[1]!;
    await call(second, 'setWindowState', { title: 'x', unsaved: true });
    second.close();
    await call(second, 'answerClose', { close: true });
    expect(second.destroyed).toBe(true);
    electron.app.emit('window-all-closed');
    expect(electron.order.at(-1)).toBe('quit');
  });

  it('loads a page that died again, three times in a minute at most', async () => {
    const window = await start();
    for (let n = 0; n < 4; n++) window.webContents.emit('render-process-gone', {}, { reason: 'crashed' });
    expect(window.loaded).toEqual([WINDOW_URL, 'again', 'again', 'again']);
    expect(electron.order.at(-1)).toMatch(/^The window stopped working several times/);
  });

  it('sends what its menu says to the window in front', async () => {
    const window = await start();
    const items = electron.menu.flatMap(({ submenu }) => submenu ?? []);
    items.find(({ label }) => label === 'Save')!.click!();
    expect(window.sent).toEqual([{ kind: 'command', command: 'save' }]);
  });
});
