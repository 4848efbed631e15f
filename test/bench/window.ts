import { mkdtempSync, rmSync } from 'node:fs';
import { loadavg, tmpdir } from 'node:os';
import { join } from 'node:path';
import { fileURLToPath, pathToFileURL } from 'node:url';
import { chromium } from '@playwright/test';
import { build as bundle } from 'vite';
import { build } from '../../main/launch/build.mjs';
import { findBrowser } from '../../main/launch/findBrowser.ts';
import { browserArguments } from '../../main/local/open.ts';
import { writeInventedField } from './inventedField.ts';
import { traceTasks } from './longTasks.ts';
import { type Act, everydayActs, opening, ready } from './windowActs.ts';

const root = fileURLToPath(new URL('../..', import.meta.url));

const CATALOGUES = {
  field: [1_000_000, false],
  sky: [1_000_000, true],
  large: [10_000_000, false],
} as const;

/**
 * Tasks of the page over 50 ms in the real window: from its start with the demo, through catalogues of a million and
 * ten million rows and what a person does with them.
 *
 * @param words which of demo, field, sky and large (all where none is named); 'stacks' also prints what each such
 * task did, which itself takes time
 */
export async function bench(words: readonly string[] = []) {
  const found = findBrowser({
    platform: process.platform,
    env: process.env,
    homeFolder: process.env.HOME ?? '',
  });
  if (found === null) return { name: 'The page: no Chromium here, not measured', rows: [] };
  const folder = mkdtempSync(join(tmpdir(), 'conewright-bench-'));
  const stacks = words.includes('stacks');
  const named = (name: string) => words.filter((w) => w !== 'stacks').length === 0 || words.includes(name);
  // Names instead of letters: what a task did can be read.
  const windowFolder = join(folder, 'window');
  await bundle({
    configFile: join(root, 'renderer/window.vite.ts'),
    root: join(root, 'renderer'),
    logLevel: 'warn',
    build: { outDir: windowFolder, minify: false },
  });
  await build(['local']);
  const { runLocal } = (await import(
    pathToFileURL(join(root, 'build/local/local.js')).href
  )) as typeof import('../../main/local/entry.ts');
  const rows: { what: string; seconds: number; ratio: number }[] = [];

  const session = async (title: string, acts: readonly Act[]) => {
    const host = await runLocal({
      windowFolder,
      files: [],
      open: false,
      print: () => undefined,
      baseFolder: folder,
      programFolder: windowFolder,
    });
    // As the program starts it, but for the page and its folder, which are the driver's.
    const own = browserArguments(host.address, folder, process.getuid?.() === 0);
    const args = own.filter((arg) => !/^--(app|user-data-dir)=/.test(arg));
    const browser = await chromium.launch({ executablePath: found.path, args });
    try {
      const page = await browser.newPage({ viewport: { width: 1280, height: 800 } });
      const start: Act = {
        what: 'start with the demo',
        settleMs: 1500,
        act: async () => {
          await page.goto(host.address);
          await ready(page);
        },
      };
      for (const { what, act, settleMs } of [start, ...acts]) {
        const trace = await traceTasks(browser, page, { stacks, overMs: 5 });
        await act(page);
        await page.waitForTimeout(settleMs);
        const tasks = await trace.stop();
        const long = tasks.filter(({ clockMs }) => clockMs > 50);
        for (const { clockMs, ownMs, stacks: text } of stacks ? long : [])
          console.log(
            `${title}, ${what}: ${Math.round(clockMs)} ms, itself ${Math.round(ownMs)} ms; ${text}`,
          );
        const over = tasks.filter(({ ownMs }) => ownMs > 50).length;
        const clock =
          long.length === 0 ? '' : `, to ${Math.round(Math.max(...long.map((t) => t.clockMs)))} ms`;
        const longest = Math.max(1, ...tasks.map(({ ownMs }) => ownMs)) / 1000;
        rows.push({
          what: `${title}, ${what}: ${over} (${long.length} by the clock${clock})`,
          seconds: longest,
          ratio: 0.05 / longest,
        });
      }
    } finally {
      await browser.close();
      await host.stop();
    }
  };
  try {
    if (named('demo')) await session('demo', everydayActs(60_000));
    for (const [name, [count, wholeSky]] of Object.entries(CATALOGUES)) {
      if (!named(name)) continue;
      const file = join(folder, `${name}.csv`);
      writeInventedField(file, count, wholeSky);
      await session(name, [opening(file, count), ...everydayActs(count)]);
      rmSync(file);
    }
  } finally {
    rmSync(folder, { recursive: true, force: true, maxRetries: 10, retryDelay: 100 });
  }
  const [load] = loadavg();
  return {
    name: `Tasks of the page over 50 ms of its own work (and by the clock, where others take the cores too); the longest of its own, ratio: 50 ms to it. Load ${load!.toFixed(1)}`,
    rows,
  };
}
