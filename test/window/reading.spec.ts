import { fileURLToPath } from 'node:url';
import type { Page } from '@playwright/test';
import { downloaded, expect, ready, test } from './window.ts';

const SHAPLEY = fileURLToPath(new URL('../data/shapley.csv', import.meta.url));
const line = (page: Page) => page.locator('.engine-line');
const source = (page: Page) => page.getByRole('region', { name: /^Source/ });

const csv = (name: string, text: string) => ({ name, mimeType: 'text/csv', buffer: Buffer.from(text) });
const table = (rows: number) =>
  `ra,dec,z\n${Array.from({ length: rows }, (_, i) => `${150 + (i % 977) / 100},${(i % 991) / 100},${(0.1 + (i % 1000) / 1000).toFixed(4)}`).join('\n')}\n`;

/** Opens a file that is picked, as a browser gives it: by name and contents, without a path. */
async function pick(page: Page, file: ReturnType<typeof csv>): Promise<void> {
  const [chooser] = await Promise.all([
    page.waitForEvent('filechooser'),
    page.getByRole('button', { name: /^Open (your catalogue|another)/ }).click(),
  ]);
  await chooser.setFiles(file);
}

/**
 * Puts code before the engine's own, in its worker: what a disk or a memory does at its limits, made to happen every
 * time. Everything behind that code is the program's own.
 */
async function engineWith(page: Page, code: () => void): Promise<void> {
  await page.route(/engine\.worker/, async (route) => {
    const response = await route.fetch();
    await route.fulfill({ response, body: `(${code})();\n${await response.text()}` });
  });
}

/** Of a file above 1 MB the first half comes, and then nothing more until the reading is given up. */
function stallingDisk(): void {
  const own = self.fetch;
  self.fetch = async (url, options) => {
    const whole = await (await own(url)).blob();
    if (whole.size < 1e6) return new Response(whole);
    const half = new Uint8Array(await whole.slice(0, whole.size / 2).arrayBuffer());
    return new Response(
      new ReadableStream({
        start(controller) {
          controller.enqueue(half);
          options?.signal?.addEventListener('abort', () => controller.error(new Error('aborted')));
        },
      }),
    );
  };
}

/** Columns of more than 100 000 rows find no memory, with the error that a browser throws then. */
function shortMemory(): void {
  self.Float64Array = new Proxy(Float64Array, {
    construct(Original, [first, ...rest], target) {
      if (typeof first === 'number' && first > 100_000)
        throw new RangeError('Array buffer allocation failed');
      return Reflect.construct(Original, [first, ...rest], target === self.Float64Array ? Original : target);
    },
  });
}

test('reading shows how far it is and can be cancelled: what was open before is open again', async ({
  desk,
}) => {
  const page = await desk.open({ files: [SHAPLEY], prepare: (page) => engineWith(page, stallingDisk) });
  await expect(line(page)).toHaveText(/4.212 kept/);
  await page.getByRole('button', { name: /^z: shells of equal/ }).click();
  const first = await page.locator('tr[data-shell="0"]').textContent();

  await pick(page, csv('big.csv', table(250_000)));
  await expect(line(page)).toContainText(/Reading the catalogue (49|50) %/);
  await expect(page.getByRole('progressbar', { name: 'Reading the catalogue' })).toBeVisible();
  await line(page).getByRole('button', { name: 'Cancel' }).click();
  await expect(line(page)).toHaveText(/4.212 kept/);
  await expect(
    page.getByText('Reading big.csv was cancelled: everything is as it was before.'),
  ).toBeVisible();
  await expect(source(page)).toContainText('shapley.csv');
  await expect(page.locator('tr[data-shell="0"]')).toHaveText(first ?? '');

  // Redo opens it once more, and Escape cancels as the button does.
  await page.keyboard.press('Control+Shift+z');
  await expect(line(page)).toContainText(/Reading the catalogue (49|50) %/);
  await page.keyboard.press('Escape');
  await expect(line(page)).toHaveText(/4.212 kept/);
  await expect(page.locator('tr[data-shell="0"]')).toHaveText(first ?? '');
});

test('two files of one name are two: undo brings the first back; files without usable rows say so', async ({
  desk,
}) => {
  const page = await desk.open();
  await ready(page);
  await pick(page, csv('survey.csv', table(300)));
  await expect(line(page)).toHaveText('300 kept · 0 set aside');
  await pick(page, csv('survey.csv', table(400)));
  await expect(line(page)).toHaveText('400 kept · 0 set aside');
  await page.keyboard.press('Control+z');
  await expect(line(page)).toHaveText('300 kept · 0 set aside');
  await expect(source(page)).not.toContainText('has changed');
  await page.keyboard.press('Control+Shift+z');
  await expect(line(page)).toHaveText('400 kept · 0 set aside');
  await expect(source(page)).not.toContainText('has changed');

  // Without a row, or without one that can be used, the window says so.
  await pick(page, csv('none.csv', 'ra,dec,z\n'));
  await expect(line(page)).toHaveText('0 kept · 0 set aside');
  await expect(page.getByText('The catalogue has a header and no rows: no galaxies to count.')).toBeVisible();
  await pick(page, csv('bad.csv', 'ra,dec,z\n10,95,0.5\n400,5,0.5\n'));
  await expect(line(page)).toHaveText('0 kept · 2 set aside');
  await expect(page.getByText(/^No row of the catalogue can be used: see Source/)).toBeVisible();
});

test('memory that is too short for a catalogue is told, and the one before comes back', async ({ desk }) => {
  const page = await desk.open({ files: [SHAPLEY], prepare: (page) => engineWith(page, shortMemory) });
  await expect(line(page)).toHaveText(/4.212 kept/);
  await pick(page, csv('wide.csv', table(150_000)));
  await expect(source(page)).toContainText(/Memory ran short while working on the catalogue: /);
  await page.getByRole('button', { name: 'Back to shapley.csv' }).click();
  await expect(line(page)).toHaveText(/4.212 kept/);
});

test('decimal commas are told, and repeated positions are listed as the command lists them', async ({
  desk,
}) => {
  const text = 'id;ra;dec;z\na;150,25;2,5;0,1\nb;151,5;2,5;0,2\nc;150,25;2,5;0,3\n';
  const page = await desk.open();
  await ready(page);
  await pick(page, csv('halves.csv', text));
  const account = source(page).locator('.account');
  await expect(account).toContainText('The file has decimal commas: 10,5 is read as 10.5.');
  await expect(account).toContainText('1 kept row repeats an earlier position.');
  const list = await downloaded(page, () =>
    account.getByRole('button', { name: 'Save the list of repeated positions…' }).click(),
  );
  expect(list.name).toBe('halves repeated positions.csv');
  expect(list.text).toBe('line,name,ra_deg,dec_deg,repeats_line\r\n4,c,150.25,2.5,2\r\n');
});
