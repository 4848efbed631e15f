import { type ChildProcess, spawn } from 'node:child_process';
import { once } from 'node:events';
import { mkdtempSync, rmSync } from 'node:fs';
import { tmpdir } from 'node:os';
import { join } from 'node:path';
import { fileURLToPath } from 'node:url';
import { AxeBuilder } from '@axe-core/playwright';
import { type Browser, test as base, chromium, expect, type Page } from '@playwright/test';
import { findBrowser } from '../../main/launch/findBrowser.ts';
import { FLAGS } from './chromiumFlags.ts';

const root = fileURLToPath(new URL('../..', import.meta.url));
const browser = findBrowser({
  platform: process.platform,
  env: process.env,
  homeFolder: process.env.HOME ?? '',
});

export interface WindowOptions {
  readonly files?: readonly string[];
  readonly theme?: 'light' | 'dark';
  readonly size?: { readonly width: number; readonly height: number };
  /** The folder that studies are saved in; a fresh one if not given. */
  readonly folder?: string;
  /** Runs in the page before anything of it. */
  readonly init?: () => void;
  /** Runs before the window's address is opened. */
  readonly prepare?: (page: Page) => Promise<void>;
}

export interface Desk {
  /** A folder of this test's own. */
  readonly folder: string;
  /** Starts the program as a person does (npm start -- --no-open) and opens its address. */
  open(options?: WindowOptions): Promise<Page>;
  /** Ends a window and its program at once, as a crash does. */
  kill(page: Page): Promise<void>;
}

export const test = base.extend<{ desk: Desk }, { chrome: Browser }>({
  chrome: [
    // biome-ignore lint/correctness/noEmptyPattern: Playwright reads which fixtures are wanted from the pattern
    async ({}, use) => {
      if (browser === null) throw new Error('no Chromium');
      const running = await chromium.launch({ executablePath: browser.path, args: FLAGS });
      await use(running);
      await running.close();
    },
    { scope: 'worker' },
  ],
  desk: async ({ chrome }, use, info) => {
    const folder = mkdtempSync(join(tmpdir(), 'conewright-window-'));
    const started: ChildProcess[] = [];
    const complaints: string[] = [];
    const programs = new Map<Page, ChildProcess>();
    await use({
      folder,
      async open({
        files = [],
        theme = 'dark',
        size = { width: 1280, height: 800 },
        folder: base = folder,
        init,
        prepare,
      } = {}) {
        const child = spawn(process.execPath, [join(root, 'main/launch/start.mjs'), '--no-open', ...files], {
          cwd: base,
          env: { ...process.env, INIT_CWD: base, XDG_CONFIG_HOME: join(folder, 'config') },
          stdio: ['ignore', 'pipe', 'pipe'],
        });
        started.push(child);
        const address = await addressOf(child);
        const context = await chrome.newContext({
          viewport: size,
          colorScheme: theme,
          acceptDownloads: true,
        });
        const page = await context.newPage();
        // From the first listener on choosers are caught, which takes a busy browser a while: not while one is awaited.
        page.on('filechooser', () => undefined);
        page.on('pageerror', (error) => complaints.push(String(error)));
        page.on('console', (message) => {
          if (message.type() === 'error') complaints.push(message.text());
        });
        if (init !== undefined) await page.addInitScript(init);
        await prepare?.(page);
        await page.goto(address);
        programs.set(page, child);
        return page;
      },
      async kill(page) {
        programs.get(page)?.kill('SIGKILL');
        await page.context().close();
      },
    });
    for (const context of chrome.contexts()) await context.close();
    // A program that is still ending may still write: the folder goes when all have ended.
    await Promise.all(
      started.map((child) => {
        if (child.exitCode !== null || child.signalCode !== null) return null;
        child.kill();
        return once(child, 'exit');
      }),
    );
    rmSync(folder, { recursive: true, force: true, maxRetries: 10, retryDelay: 100 });
    // Whatever a test looks at, the page itself must be quiet: no exception, no violation of the content policy.
    if (info.status === info.expectedStatus) expect(complaints).toEqual([]);
  },
});
// Reason: without a browser there is no window to test; in CI, where one is installed first, its absence is a failure.
test.skip(
  browser === null && !process.env.CI,
  'not run: no Chromium, Chrome or Edge is installed (CHROME_PATH names one)',
);

async function addressOf(child: ChildProcess): Promise<string> {
  let said = '';
  return new Promise((resolve, reject) => {
    const listen = (data: Buffer) => {
      said += data.toString();
      const found = /Open (http:\/\/127\.0\.0\.1\S+)/.exec(said);
      if (found !== null) resolve(found[1]!);
    };
    child.stdout!.on('data', listen);
    child.stderr!.on('data', listen);
    child.once('exit', (code) => reject(new Error(`start ended with ${code}: ${said}`)));
  });
}

/** Waits until the catalogue is in and nothing is being worked on. */
export async function ready(page: Page): Promise<void> {
  await expect(page.locator('.engine-line')).toHaveText(/kept · .* set aside/, { timeout: 90_000 });
}

/**
 * No violation of WCAG that axe can find, in the window or the parts of it that a selector names.
 *
 * @param rules those of axe; all if not given
 */
export async function accessible(page: Page, within = 'body', rules: readonly string[] = []): Promise<void> {
  // Half a megabyte of axe is brought into a page once.
  const isThere = await page.evaluate(() => 'axe' in globalThis);
  const axe = new AxeBuilder({ page, ...(isThere ? { axeSource: 'null' } : {}) })
    .setLegacyMode(true)
    .options({ resultTypes: ['violations'] })
    .include(within);
  const { violations } = await (rules.length === 0 ? axe : axe.withRules([...rules])).analyze();
  expect(
    violations.map(
      (v) => `${v.id}: ${v.nodes.map((n) => `${n.target.join(' ')} (${n.failureSummary})`).join('; ')}`,
    ),
  ).toEqual([]);
}

/** What a download holds, as text. */
export async function downloaded(
  page: Page,
  act: () => Promise<void>,
): Promise<{ name: string; text: string }> {
  const [download] = await Promise.all([page.waitForEvent('download'), act()]);
  const stream = await download.createReadStream();
  const parts: Buffer[] = [];
  for await (const part of stream) parts.push(part as Buffer);
  return { name: download.suggestedFilename(), text: Buffer.concat(parts).toString('utf8') };
}

export { expect };
