// npm start [-- --local] [-- --no-open] [FILE...]: installs what is missing, builds what is stale, opens the window.
import { spawn } from 'node:child_process';
import { existsSync, readFileSync, statSync, writeFileSync } from 'node:fs';
import { join, resolve } from 'node:path';
import { pathToFileURL } from 'node:url';
import { build } from './build.mjs';
import { install, root } from './install.mjs';

const RETRY_DOWNLOAD_MS = 24 * 3600 * 1000;
const LONGEST_DOWNLOAD_MS = 180_000;

const words = process.argv.slice(2);
const wishes = { local: words.includes('--local'), noOpen: words.includes('--no-open') };
const unknown = words.find((w) => w.startsWith('-') && !['--local', '--no-open', '--'].includes(w));
const files = words.filter((w) => !w.startsWith('-'));
const here = process.env.INIT_CWD ?? process.cwd();
const electronPackage = join(root, 'node_modules/electron');
const failedDownload = join(root, 'node_modules/.conewright-electron');

/** @param {string} text */
const say = (text) => console.error(`conewright: ${text}`);

if (unknown !== undefined) {
  say(
    `the option ${unknown} is not known: npm start takes --local, --no-open and files (npm start -- --local --no-open).`,
  );
  process.exit(2);
}

install();
await build(['local']);
/** @type {typeof import('../local/entry.ts')} */
const hosts = await import(pathToFileURL(join(root, 'build/local/local.js')).href);

try {
  process.exitCode = await start();
} catch (error) {
  say(error instanceof Error ? error.message : String(error));
  process.exitCode = 1;
}

/** @returns {Promise<number>} */
async function start() {
  if (!wishes.local && !wishes.noOpen && !hosts.hasDisplay({ platform: process.platform, env: process.env }))
    return withoutWindow();
  await hosts.checkLaunchPaths(hosts.launchPaths(files, here));
  await build(['window']);
  if (!wishes.local && !wishes.noOpen) {
    const electron = await findElectron();
    if (electron.binary !== null) return desktop(electron.binary);
    say(`Electron: ${electron.reason}; the window opens in an installed browser instead.`);
  }
  return local();
}

async function findElectron() {
  const probe = hosts.electronProbe(electronPackage);
  if (probe.binary !== null) return probe;
  // Where the network refuses, asking again at every start would only cost time.
  if (existsSync(failedDownload) && Date.now() - statSync(failedDownload).mtimeMs < RETRY_DOWNLOAD_MS)
    return { binary: null, reason: `${readFileSync(failedDownload, 'utf8')} (tried within the last day)` };
  say("fetching Electron's program (once) ...");
  const fetched = await hosts.fetchElectron(electronPackage, { limitMs: LONGEST_DOWNLOAD_MS });
  if (fetched.binary === null) writeFileSync(failedDownload, fetched.reason);
  return fetched;
}

/** @param {string} binary @returns {Promise<number>} */
async function desktop(binary) {
  await build(['desktop']);
  say('opening the window in Electron');
  const isRoot = process.getuid?.() === 0;
  const named = files.map((file) => resolve(here, file));
  const child = spawn(binary, hosts.electronArguments(root, named, isRoot), {
    stdio: ['ignore', 'inherit', 'inherit'],
  });
  return new Promise((end) => {
    child.once('error', (error) => {
      say(`Electron did not start (${error.message}); npm start -- --local opens the window in a browser.`);
      end(1);
    });
    child.once('exit', (code, signal) => {
      if (signal !== null)
        say(`Electron ended by ${signal}; npm start -- --local opens the window in a browser.`);
      end(signal === null ? (code ?? 1) : 1);
    });
  });
}

async function local() {
  const running = await hosts.runLocal({
    windowFolder: join(root, 'build/window'),
    files,
    open: !wishes.noOpen,
    print: (line) => console.log(line),
    baseFolder: here,
    programFolder: root,
  });
  for (const signal of /** @type {const} */ (['SIGINT', 'SIGTERM']))
    process.once(signal, () => void running.stop());
  await running.closed;
  return 0;
}

/** The main job without a window: the ledger of the invented demo survey, or of the files that were named. */
async function withoutWindow() {
  await build(['command']);
  const { run } = await import(pathToFileURL(join(root, 'build/command/conewright.js')).href);
  say(
    'no display here, so the main job runs without a window; npm start -- --local --no-open prints an address to see it.',
  );
  if (files.length === 0) {
    say('the invented demo survey, its shell ledger, and its tables in conewright-demo/');
    return run(['demo', '-o', join(root, 'conewright-demo'), '--overwrite']);
  }
  let code = 0;
  for (const file of files) code = Math.max(code, await run(['shells', file]));
  return code;
}
