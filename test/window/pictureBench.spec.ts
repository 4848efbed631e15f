import { readFileSync } from 'node:fs';
import { join } from 'node:path';
import type { Page } from '@playwright/test';
import { conewright } from './command.ts';
import { accessible, expect, ready, test } from './window.ts';

/** The bytes of what a button exports. */
async function exported(page: Page, button: string): Promise<{ name: string; bytes: Buffer }> {
  const [download] = await Promise.all([
    page.waitForEvent('download'),
    page.getByRole('button', { name: button }).click(),
  ]);
  const parts: Buffer[] = [];
  for await (const part of await download.createReadStream()) parts.push(part as Buffer);
  return { name: download.suggestedFilename(), bytes: Buffer.concat(parts) };
}

const drawn = (page: Page) =>
  expect(page.locator('.bench-facts')).toHaveText(/^\d+ × \d+ pixels$/, { timeout: 60_000 });

test("the picture bench: previews, says what hinders, and exports the command's bytes", async ({ desk }) => {
  test.setTimeout(240_000);
  const page = await desk.open();
  await ready(page);
  await page.getByRole('button', { name: 'Export' }).click();
  await page.getByRole('menuitem', { name: /^Picture/ }).click();
  const bench = page.getByRole('dialog', { name: 'Picture' });
  await expect(bench.locator('.bench-pane img')).toBeVisible();
  await expect(bench.getByLabel('Text alternative')).toHaveValue(/^Cone diagram/);
  await expect(bench.getByLabel('Caption')).toHaveValue(/The survey is invented\.$/);
  await accessible(page);

  // What cannot be used is said, and nothing can be started with it.
  await bench.getByLabel('Size', { exact: true }).selectOption('own');
  await bench.getByLabel('Width').fill('0');
  await expect(
    bench.getByText('The width in pixels is 0: give a number from 64 to 16384.').first(),
  ).toBeVisible();
  await expect(bench.getByRole('button', { name: 'Export PNG' })).toBeDisabled();
  await bench.getByLabel('Width').fill('640');
  await bench.getByLabel('Height').fill('400');
  await bench.getByLabel('Credit').fill('Ostrewick');
  await drawn(page);
  const png = await exported(page, 'Export PNG');
  expect(png.name).toMatch(/cone\.png$/);
  await conewright(
    desk.folder,
    'picture',
    'demo',
    '-o',
    'same.png',
    '--size',
    '640x400',
    '--credit',
    'Ostrewick',
  );
  expect(png.bytes.equals(readFileSync(join(desk.folder, 'same.png')))).toBe(true);

  // A right-to-left label: SVG holds it, PDF does not, and that is said before anything is written.
  await bench.getByRole('button', { name: 'Add a label' }).click();
  await bench.getByRole('textbox', { name: 'Label 1' }).fill('צביר גדול');
  await expect(bench.getByText(/choose PNG or SVG/)).toBeVisible();
  await expect(bench.getByRole('button', { name: 'Export PDF' })).toBeDisabled();
  const svg = await exported(page, 'Export SVG');
  expect(svg.bytes.toString('utf8')).toContain('צביר גדול');
  await expect(bench.getByText(/was written to/)).toBeVisible();
  await accessible(page);

  // What was chosen is still there when the bench is opened again, by its key.
  await page.keyboard.press('Escape');
  await expect(bench).toHaveCount(0);
  await page.keyboard.press('p');
  await expect(bench.getByRole('textbox', { name: 'Label 1' })).toHaveValue('צביר גדול');
});

test('a large export shows how far it is, and can be cancelled', async ({ desk }) => {
  test.setTimeout(240_000);
  const page = await desk.open({ theme: 'light' });
  await ready(page);
  await page.keyboard.press('p');
  const bench = page.getByRole('dialog', { name: 'Picture' });
  await bench.getByLabel('Size', { exact: true }).selectOption('a0');
  await drawn(page);
  await bench.getByRole('button', { name: 'Export PNG' }).click();
  await expect(bench.getByRole('progressbar', { name: 'Writing PNG' })).toBeVisible();
  await bench.getByRole('button', { name: 'Cancel' }).click();
  await expect(bench.getByText('The export was cancelled; no file was written.')).toBeVisible();
  await accessible(page);
});
