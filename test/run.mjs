// npm test: installs what is missing, then types, lint, import rule, dead code, unit, reference, command-line, host and
// window tests. Ends with a line "N passed, N failed".
import { spawnSync } from 'node:child_process';
import { existsSync, mkdirSync, readFileSync, rmSync } from 'node:fs';
import { join } from 'node:path';
import { build } from '../main/launch/build.mjs';
import { install, root } from '../main/launch/install.mjs';

install();

const results = join(root, 'test-results');
rmSync(results, { recursive: true, force: true });
mkdirSync(results);

let passed = 0;
let failed = 0;

/** @param {string} script @param {string[]} args @param {NodeJS.ProcessEnv} [more] */
function node(script, args, more = {}) {
  return spawnSync(process.execPath, [join(root, script), ...args], {
    cwd: root,
    stdio: 'inherit',
    env: { ...process.env, ...more },
  }).status;
}

/** A check that counts as one. @param {string} name @param {() => number | null} work */
function check(name, work) {
  console.log(`\n== ${name}`);
  if (work() === 0) passed++;
  else {
    failed++;
    console.log(`FAILED: ${name}`);
  }
}

/** A runner that reports its own counts. @param {string} name @param {() => number | null} work @param {() => [number, number, number]} counts */
function suite(name, work, counts) {
  console.log(`\n== ${name}`);
  const status = work();
  let [good, bad, skipped] = [0, 0, 0];
  try {
    [good, bad, skipped] = counts();
  } catch (error) {
    console.log(`${name} left no readable report: ${error instanceof Error ? error.message : error}`);
    bad = 1;
  }
  if (status !== 0 && bad === 0) bad = 1;
  console.log(`${name}: ${good} passed, ${bad} failed, ${skipped} not run`);
  passed += good;
  failed += bad;
}

/** @param {string} name */
const report = (name) => JSON.parse(readFileSync(join(results, name), 'utf8'));

for (const part of ['shared-core', 'renderer', 'main', 'test'])
  check(`types of ${part}`, () => node('node_modules/typescript/bin/tsc', ['-p', part]));
check('format and lint', () =>
  node('node_modules/@biomejs/biome/bin/biome', [
    'check',
    '--error-on-warnings',
    '--config-path=test/rules/lint.jsonc',
    '.',
  ]),
);
check('import rule', () => node('test/rules/imports.mjs', []));
check('dead code', () => node('node_modules/knip/bin/knip.js', ['--config', 'test/rules/knip.json']));

console.log('\n== build');
try {
  await build(['command', 'window', 'local', 'desktop']);
  passed++;
} catch (error) {
  failed++;
  console.log(`FAILED: build: ${error instanceof Error ? error.message : error}`);
}

suite(
  'unit, reference, command and host tests',
  () =>
    node('node_modules/vitest/vitest.mjs', [
      'run',
      '--config',
      'test/vitest.config.ts',
      '--reporter=dot',
      '--reporter=json',
      `--outputFile.json=${join(results, 'vitest.json')}`,
    ]),
  () => {
    const r = report('vitest.json');
    return [
      r.numPassedTests,
      r.numFailedTests + (r.success ? 0 : r.numFailedTests === 0 ? 1 : 0),
      r.numPendingTests,
    ];
  },
);

if (existsSync(join(root, 'test/window/playwright.config.ts')))
  suite(
    'window tests',
    () =>
      node('node_modules/@playwright/test/cli.js', ['test', '--config', 'test/window/playwright.config.ts']),
    () => {
      const { stats } = report('playwright.json');
      return [stats.expected + stats.flaky, stats.unexpected, stats.skipped];
    },
  );

console.log(`\n${passed} passed, ${failed} failed`);
process.exitCode = failed === 0 && passed > 0 ? 0 : 1;
