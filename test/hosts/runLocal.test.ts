import { chmodSync, existsSync, mkdirSync, readdirSync, writeFileSync } from 'node:fs';
import { join } from 'node:path';
import { afterEach, beforeEach, describe, expect, it } from 'vitest';
import { takeBrowserProfile } from '../../main/local/browserProfile.ts';
import { type LocalOptions, runLocal } from '../../main/local/run.ts';
import { temporaryFolder } from './testHost.ts';

describe('running the local host', () => {
  let root: ReturnType<typeof temporaryFolder>;
  let lines: string[];
  const inRoot = (name: string) => join(root.folder, name);

  beforeEach(() => {
    root = temporaryFolder();
    lines = [];
    mkdirSync(inRoot('window'));
    writeFileSync(inRoot('window/index.html'), '<!doctype html><title>window</title>');
  });
  afterEach(() => root.remove());

  const run = (options: Partial<LocalOptions> = {}, env: Record<string, string> = {}) =>
    runLocal({
      windowFolder: inRoot('window'),
      files: [],
      open: true,
      print: (line) => void lines.push(line),
      baseFolder: root.folder,
      programFolder: inRoot('window'),
      machine: {
        platform: process.platform,
        env: { CONEWRIGHT_HOME: inRoot('own'), PATH: '', ...env },
        homeFolder: root.folder,
      },
      ...options,
    });

  /** A program that stands in for a browser: it gets the arguments that a browser gets. */
  function playedBrowser(code: string): string {
    const path = inRoot('browser.mjs');
    writeFileSync(
      path,
      `#!${process.execPath}
const value = (name) => process.argv.find((argument) => argument.startsWith(name + '=')).slice(name.length + 1);
const address = value('--app');
const profile = value('--user-data-dir');
${code}
`,
    );
    chmodSync(path, 0o755);
    return path;
  }

  it('only prints the address when asked not to open', async () => {
    const { address, closed, stop } = await run({ open: false });
    expect(address).toMatch(/^http:\/\/127\.0\.0\.1:\d+\/[A-Za-z0-9_-]{32}\/$/);
    expect(lines).toEqual([
      `Studies are saved in ${root.folder}`,
      `Open ${address} in a browser on this machine; Ctrl-C ends the program.`,
    ]);
    expect(await (await fetch(address)).text()).toContain('<title>window</title>');
    await stop();
    await closed;
    await expect(fetch(address)).rejects.toThrow();
  });

  it('ends when the browser that showed the window ends, and frees its profile', async () => {
    const browser = playedBrowser(`
      const page = await fetch(address);
      if (!(await page.text()).includes('<title>window</title>')) process.exit(3);
      if ((await fetch(address)).status !== 410) process.exit(4);`);
    const { address, closed } = await run({}, { CHROME_PATH: browser });
    await closed;
    await expect(fetch(address)).rejects.toThrow();
    expect(lines).toEqual([`Studies are saved in ${root.folder}`]);
    expect(existsSync(inRoot('own/browser-1'))).toBe(true);
    expect(readdirSync(inRoot('own/browser-1'))).not.toContain('conewright-holder');
  });

  it('keeps its port for the next time, so that the page finds what the browser kept', async () => {
    const browser = playedBrowser('await fetch(address);');
    const first = await run({}, { CHROME_PATH: browser });
    await first.closed;
    const second = await run({}, { CHROME_PATH: browser });
    await second.closed;
    expect(new URL(second.address).port).toBe(new URL(first.address).port);
    expect(second.address).not.toBe(first.address);
  });

  it('says so when the browser ends before it showed anything, and goes on', async () => {
    const browser = playedBrowser('process.exit(7);');
    const { address, stop } = await run({}, { CHROME_PATH: browser });
    while (lines.length < 2) await new Promise((resolve) => setTimeout(resolve, 10));
    expect(lines[1]).toBe(
      `${browser} ended (7) before it showed the window: open ${address} in a browser yourself; Ctrl-C ends the program.`,
    );
    expect((await fetch(address)).status).toBe(200);
    await stop();
  });

  it('says so when the browser cannot be started', async () => {
    const path = inRoot('broken');
    writeFileSync(path, '#!/no/such/interpreter\n');
    chmodSync(path, 0o755);
    const { address, stop } = await run({}, { CHROME_PATH: path });
    expect(lines.at(-1)).toContain(`${path} did not start`);
    expect((await fetch(address)).status).toBe(200);
    await stop();
  });

  it('ends the browser when it is stopped', async () => {
    const browser = playedBrowser(`
      const { writeFileSync } = await import('node:fs');
      await fetch(address);
      process.on('SIGTERM', () => { writeFileSync(${JSON.stringify(inRoot('ended'))}, ''); process.exit(0); });
      writeFileSync(${JSON.stringify(inRoot('ready'))}, '');
      setInterval(() => {}, 1000);`);
    const { stop } = await run({}, { CHROME_PATH: browser });
    while (!existsSync(inRoot('ready'))) await new Promise((resolve) => setTimeout(resolve, 10));
    await stop();
    while (!existsSync(inRoot('ended'))) await new Promise((resolve) => setTimeout(resolve, 10));
    expect(existsSync(inRoot('ended'))).toBe(true);
  });

  it('refuses a file that is not there before anything is opened', async () => {
    await expect(run({ files: ['missing.csv'] })).rejects.toThrow(/^missing\.csv could not be opened: /);
    await expect(run({ windowFolder: inRoot('nothing'), open: false })).rejects.toThrow(
      /^The window is not built/,
    );
    expect(lines).toEqual([]);
  });

  it('saves in the folder of the study that it was started with', async () => {
    mkdirSync(inRoot('field'));
    writeFileSync(inRoot('field/deep.study.json'), '{}');
    const { stop } = await run({ open: false, files: ['field/deep.study.json'] });
    expect(lines[0]).toBe(`Studies are saved in ${inRoot('field')}`);
    await stop();
  });

  it('started in its own folder, saves in the documents of the person', async () => {
    mkdirSync(inRoot('Documents'));
    const { stop } = await run({ open: false, baseFolder: inRoot('window') });
    expect(lines[0]).toBe(`Studies are saved in ${inRoot('Documents')}`);
    await stop();
  });

  it('gives each running browser a profile of its own, and a free one again', async () => {
    const take = () => takeBrowserProfile(inRoot('profiles'), inRoot('locks'));
    const [one, two] = [await take(), await take()];
    expect([one.folder, two.folder]).toEqual([inRoot('profiles/browser-1'), inRoot('profiles/browser-2')]);
    one.release();
    expect((await take()).folder).toBe(inRoot('profiles/browser-1'));
    // A profile that a killed browser left: no process has that number (proc(5), pid_max).
    two.hold(2 ** 22 + 1);
    expect((await take()).folder).toBe(inRoot('profiles/browser-2'));
  });
});
