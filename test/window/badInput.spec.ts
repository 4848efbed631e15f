import {
  copyFileSync,
  existsSync,
  mkdirSync,
  readdirSync,
  readFileSync,
  utimesSync,
  writeFileSync,
} from 'node:fs';
import { join } from 'node:path';
import type { Page } from '@playwright/test';
import { emptyStudy, writeStudy } from '../../shared-core/study/document.ts';
import { drop, SHAPLEY } from './files.ts';
import { accessible, expect, ready, test } from './window.ts';

const ledger = (page: Page) => page.getByRole('grid', { name: 'Shell ledger' });

/** Opens a file through the dialog of the Study menu. */
async function openStudy(page: Page, path: string): Promise<void> {
  await page.getByRole('button', { name: 'Study' }).click();
  const [chooser] = await Promise.all([
    page.waitForEvent('filechooser'),
    page.getByRole('menuitem', { name: /^Open a study/ }).click(),
  ]);
  await chooser.setFiles(path);
}

test('studies that cannot be used: a sentence each, and what was open stays', async ({ desk }) => {
  const page = await desk.open();
  await ready(page);
  await page.keyboard.press('Control+s');
  await page.getByRole('textbox', { name: 'Name', exact: true }).fill('good');
  await page.getByRole('dialog').getByRole('button', { name: 'Save' }).click();
  const good = join(desk.folder, 'good.study.json');
  await expect.poll(() => existsSync(good)).toBe(true);
  const text = readFileSync(good, 'utf8');
  const cases: [string, string, RegExp][] = [
    ['not-json.study.json', 'this is no JSON', /not JSON/],
    ['other.study.json', '{"format":"something else"}', /not a study/],
    [
      'newer.study.json',
      text.replace(/"version": \d+/, '"version": 9'),
      /version 9, this program reads up to version 2/,
    ],
    ['edges.study.json', text.replace('0.7,', '0.95,'), /must increase: 0.95 is followed by 0.9/],
    ['broken.study.json', text.slice(0, text.length / 2), /not JSON/],
  ];
  for (const [name, content, sentence] of cases) {
    const path = join(desk.folder, name);
    writeFileSync(path, content);
    await openStudy(page, path);
    await expect(page.getByText(sentence)).toBeVisible();
    await expect(ledger(page).locator('tbody tr')).toHaveCount(5);
  }
});

test('a study whose catalogue is not there asks for it and keeps everything', async ({ desk }) => {
  const catalogue = join(desk.folder, 'shapley.csv');
  copyFileSync(SHAPLEY, catalogue);
  const page = await desk.open({ files: [catalogue] });
  await expect(page.locator('.engine-line')).toHaveText(/4.212 kept/);
  await page.getByRole('button', { name: /^z: shells of equal/ }).click();
  await page.keyboard.press('Control+s');
  await page.getByRole('dialog').getByRole('button', { name: 'Save' }).click();
  const path = join(desk.folder, 'shapley.study.json');
  await expect.poll(() => existsSync(path)).toBe(true);
  const study = JSON.parse(readFileSync(path, 'utf8'));
  const moved = join(desk.folder, 'moved.study.json');
  writeFileSync(
    moved,
    JSON.stringify({ ...study, source: { ...study.source, name: 'gone.csv', path: '/nowhere/gone.csv' } }),
  );
  const again = await desk.open({ files: [moved] });
  await expect(again.getByText(/gone\.csv/).first()).toBeVisible();
  await expect(again.locator('.stage').getByRole('button', { name: 'Point at it…' })).toBeVisible();
  await accessible(again, '.desk');
  // The shells are the study's own; only the galaxies are missing.
  await expect(ledger(again).locator('tbody tr')).toHaveCount(0);
  await expect(again.getByRole('slider', { name: /^Edge 1 of/ })).toBeVisible();
});

test('a file that is no catalogue says so, and the one before comes back with undo', async ({ desk }) => {
  const page = await desk.open({ files: [SHAPLEY] });
  await expect(page.locator('.engine-line')).toHaveText(/4.212 kept/);
  await drop(page, 'letter.txt', 'nothing of a table\njust words\n');
  await expect(page.getByText(/is a single column/).first()).toBeVisible();
  await page.keyboard.press('Control+z');
  await expect(page.locator('.engine-line')).toHaveText(/4.212 kept/);
});

test('two windows on one study: the second to save is told, and nothing is lost', async ({ desk }) => {
  const page = await desk.open();
  await ready(page);
  await page.keyboard.press('Control+s');
  await page.getByRole('textbox', { name: 'Name', exact: true }).fill('shared');
  await page.getByRole('dialog').getByRole('button', { name: 'Save' }).click();
  const path = join(desk.folder, 'shared.study.json');
  await expect.poll(() => existsSync(path)).toBe(true);
  const other = await desk.open({ files: [path] });
  await ready(other);

  const rename = async (window: Page, name: string) => {
    await window.getByLabel('Name of the study').fill(name);
    await window.keyboard.press('Enter');
    await window.keyboard.press('Control+s');
  };
  await rename(other, 'from the second');
  await expect.poll(() => JSON.parse(readFileSync(path, 'utf8')).name).toBe('from the second');
  await rename(page, 'from the first');
  await expect(page.getByRole('dialog')).toContainText(/changed by somebody else/);
  await accessible(page, '.dialog[open]');
  expect(JSON.parse(readFileSync(path, 'utf8')).name).toBe('from the second');
  await page.getByRole('button', { name: 'Save under another name' }).click();
  await page.getByRole('textbox', { name: 'Name', exact: true }).fill('mine');
  await page.getByRole('dialog').getByRole('button', { name: 'Save' }).click();
  await expect.poll(() => existsSync(join(desk.folder, 'mine.study.json'))).toBe(true);
  expect(JSON.parse(readFileSync(join(desk.folder, 'mine.study.json'), 'utf8')).name).toBe('from the first');
});

test('the worker dying in the middle is told, and reading again brings everything back', async ({ desk }) => {
  const page = await desk.open({ init: killableWorkers });
  await ready(page);
  await page.evaluate(() => (globalThis as unknown as { failWorkers: () => void }).failWorkers());
  await expect(page.getByText(/stopped/).first()).toBeVisible();
  await expect(ledger(page).locator('tbody tr')).toHaveCount(5);
  await page.getByRole('button', { name: 'Read again' }).click();
  await ready(page);
  await expect(page.locator('tr[data-shell="0"] [data-quantity=count]')).not.toHaveText('0');
});

test('unsaved work is offered back after the window died', async ({ desk }) => {
  const page = await desk.open();
  await ready(page);
  await page.getByLabel('Name of the study').fill('almost lost');
  await page.keyboard.press('Enter');
  // Kept a moment after the last change; then the window goes without a word.
  await page.waitForTimeout(3000);
  await desk.kill(page);
  const again = await desk.open();
  await expect(again.getByText(/almost lost/)).toBeVisible();
  await accessible(again, '.notices');
  await again.getByRole('button', { name: /Take it up/ }).click();
  await expect(again.getByLabel('Name of the study')).toHaveValue('almost lost');
  await expect(again.getByText('not saved').first()).toBeVisible();
});

test('many pieces of unsaved work are one notice, and a list to choose from', async ({ desk }) => {
  const kept = join(desk.folder, 'config', 'conewright', 'unsaved');
  mkdirSync(kept, { recursive: true });
  const left = () => readdirSync(kept).filter((name) => name.endsWith('.study.json')).length;
  for (let i = 1; i <= 11; i++) {
    const source = { kind: 'file', name: `field ${i}.csv`, path: null, sizeBytes: 1, sha256: null } as const;
    const study = { ...emptyStudy(`piece ${i}`), source: i === 1 ? null : source, edges: [0.1, 0.2, 0.3] };
    const path = join(kept, `work-00000000${String(i).padStart(2, '0')}`);
    writeFileSync(`${path}.study.json`, i === 2 ? 'cut off' : writeStudy(study));
    writeFileSync(`${path}.about.json`, JSON.stringify({ version: 1, title: `piece ${i}`, owner: null }));
    utimesSync(`${path}.study.json`, 1e9 + i, 1e9 + i);
  }
  // Closed, it is kept for the next start.
  const first = await desk.open();
  await expect(first.locator('.notice-offer')).toHaveCount(1);
  await expect(first.locator('.notice-offer')).toContainText(/^11 pieces of work/);
  await accessible(first, '.notices');
  await first.getByRole('button', { name: 'Not now' }).click();
  await expect(first.locator('.notice-offer')).toHaveCount(0);
  expect(left()).toBe(11);

  const page = await desk.open();
  await page.getByRole('button', { name: 'Look…' }).click();
  const list = page.getByRole('dialog', { name: 'Work that was not saved' });
  const rows = list.locator('tbody tr');
  await expect(rows).toHaveCount(11);
  await expect(rows.first()).toContainText(/^piece 11.*2field 11\.csv/);
  await expect(rows.nth(9)).toContainText(/^piece 2.*–cannot be read/);
  await expect(rows.nth(10)).toContainText(/^piece 1.*2none/);
  await accessible(page, '.dialog[open]');
  await list.getByRole('button', { name: /^Forget: “piece 11”/ }).click();
  await expect(rows).toHaveCount(10);
  expect(left()).toBe(10);
  await list.getByRole('button', { name: /^Take it up: “piece 10”/ }).click();
  await expect(list).toHaveCount(0);
  await expect(page.getByLabel('Name of the study')).toHaveValue('piece 10');
  await expect(page.locator('.notice-offer')).toContainText(/^9 pieces of work/);

  // All at once is asked about once.
  await page.getByRole('button', { name: 'Look…' }).click();
  await list.getByRole('button', { name: 'Forget all' }).click();
  const question = page.getByRole('dialog', { name: 'Forget 9 pieces of unsaved work?' });
  await question.getByRole('button', { name: 'Keep them' }).click();
  await expect(rows).toHaveCount(9);
  await list.getByRole('button', { name: 'Forget all' }).click();
  await question.getByRole('button', { name: 'Forget all' }).click();
  await expect(list).toHaveCount(0);
  await expect(page.locator('.notice-offer')).toHaveCount(0);
  // What was taken up is this window's own work by now.
  await expect.poll(left).toBe(1);
});

/** Lets the test raise the error that a worker raises when it runs out of memory. */
function killableWorkers(): void {
  const made: Worker[] = [];
  const Original = Worker;
  globalThis.Worker = class extends Original {
    constructor(...args: ConstructorParameters<typeof Worker>) {
      super(...args);
      if (String(args[0]).includes('engine')) made.push(this);
    }
  };
  Object.assign(globalThis, {
    failWorkers: () => {
      for (const worker of made) worker.dispatchEvent(new ErrorEvent('error', { message: 'out of memory' }));
    },
  });
}

test('a window that cannot start says why, in letters that can be read', async ({ desk }) => {
  for (const theme of ['dark', 'light'] as const) {
    const page = await desk.open({
      theme,
      init: () => {
        globalThis.matchMedia = () => {
          throw new Error('the screen is unknown');
        };
      },
    });
    await expect(page.getByText('Conewright could not start: the screen is unknown')).toBeVisible();
    const [ink, ground] = await page.evaluate(() => {
      const { color, backgroundColor } = getComputedStyle(document.body);
      return [color, backgroundColor].map((colour) => {
        // Relative luminance by WCAG 2.2.
        const [r, g, b] = (colour.match(/\d+/g) ?? []).map((byte) => {
          const value = Number(byte) / 255;
          return value <= 0.04045 ? value / 12.92 : ((value + 0.055) / 1.055) ** 2.4;
        });
        return 0.2126 * r! + 0.7152 * g! + 0.0722 * b!;
      });
    });
    const [dark, light] = [ink!, ground!].sort((a, b) => a - b);
    expect((light! + 0.05) / (dark! + 0.05), theme).toBeGreaterThan(4.5);
    expect(ground! > 0.5, theme).toBe(theme === 'light');
  }
});
