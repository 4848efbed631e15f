import { appendFileSync, copyFileSync, existsSync, readFileSync } from 'node:fs';
import { join } from 'node:path';
import type { Page } from '@playwright/test';
import { conewright } from './command.ts';
import { SHAPLEY, SHAPLEY_WINDOW } from './files.ts';
import { accessible, downloaded, expect, ready, test } from './window.ts';

const edgesOf = async (page: Page): Promise<number[]> => {
  const handles = page.getByRole('slider', { name: /^Edge \d+ of/ });
  return Promise.all((await handles.all()).map(async (h) => Number(await h.getAttribute('aria-valuenow'))));
};
const ledgerJson = async (page: Page) => {
  const { text } = await downloaded(page, async () => {
    await page.getByRole('button', { name: 'Export' }).click();
    await page.getByRole('menuitem', { name: /^JSON/ }).click();
  });
  return JSON.parse(text);
};

test("the demo at first start: ledger, strip and cone are there, and the ledger is the command's", async ({
  desk,
}) => {
  const page = await desk.open();
  await ready(page);
  await expect(page.getByRole('grid', { name: 'Shell ledger' }).locator('tbody tr')).toHaveCount(5);
  const json = await ledgerJson(page);
  const folder = join(desk.folder, 'demo');
  await conewright(desk.folder, 'demo', '-o', folder);
  const command = JSON.parse(readFileSync(join(folder, 'shells.json'), 'utf8'));
  expect(json.shells).toEqual(command.shells);
  expect(json.catalogue).toEqual(command.catalogue);
  expect(await colouredPixels(page)).toBeGreaterThan(2000);
  await accessible(page);
});

test("a catalogue of one's own: open, region, drag an edge, undo, save, reopen, export", async ({ desk }) => {
  const page = await desk.open();
  await ready(page);

  // Open by the dialog, as a person does.
  const [chooser] = await Promise.all([
    page.waitForEvent('filechooser'),
    page.getByRole('button', { name: /Open your catalogue/ }).click(),
  ]);
  await chooser.setFiles(SHAPLEY);
  await expect(page.getByText('shapley.csv', { exact: false }).first()).toBeVisible();
  await expect(page.locator('.engine-line')).toHaveText(/4.212 kept · 3 set aside/);
  await expect(page.getByText(/estimate/i).first()).toBeVisible();

  // The published window, pasted.
  await page.getByRole('button', { name: /Add a shape/ }).click();
  await page.getByRole('menuitem', { name: /Polygon/ }).click();
  await page.getByLabel(/vertices/).fill(readFileSync(SHAPLEY_WINDOW, 'utf8'));
  await page.getByRole('button', { name: 'Add', exact: true }).click();
  await expect(page.getByText(/exact area/)).toBeVisible();

  // Four shells of equal count between the data's ends, then one edge dragged.
  await page.getByRole('textbox', { name: 'Number of shells' }).fill('4');
  await page.getByRole('button', { name: /^count: shells of equal/ }).click();
  const before = await edgesOf(page);
  expect(before).toHaveLength(5);
  const handle = page.getByRole('slider', { name: 'Edge 3 of 5' });
  const box = (await handle.boundingBox())!;
  const rowBefore = await page.locator('tr[data-shell="1"]').textContent();
  await page.mouse.move(box.x + box.width / 2, box.y + box.height - 6);
  await page.mouse.down();
  await page.mouse.move(box.x + box.width / 2 + 12, box.y + box.height - 6, { steps: 6 });
  await page.mouse.up();
  const dragged = await edgesOf(page);
  expect(dragged[2]).toBeGreaterThan(before[2]!);
  await expect(page.locator('tr[data-shell="1"]')).not.toHaveText(rowBefore ?? '');

  // The window and the command agree to the last digit.
  const json = await ledgerJson(page);
  const command = JSON.parse(
    (
      await conewright(
        desk.folder,
        'shells',
        SHAPLEY,
        '--region',
        `polygon:${SHAPLEY_WINDOW}`,
        '--edges',
        dragged.join(','),
        '--json',
      )
    ).out,
  );
  expect(json.shells).toEqual(command.shells);
  expect(json.region).toEqual(command.region);
  expect(json.catalogue).toEqual(command.catalogue);

  // One drag is one step back.
  await page.keyboard.press('Control+z');
  expect(await edgesOf(page)).toEqual(before);
  await page.keyboard.press('Control+Shift+z');
  expect(await edgesOf(page)).toEqual(dragged);

  await expect(page).toHaveTitle('shapley (not saved) - Conewright');

  // Save under a name, and find everything again in another window.
  await page.keyboard.press('Control+s');
  await page.getByRole('textbox', { name: 'Name', exact: true }).fill('supercluster');
  await page.getByRole('dialog').getByRole('button', { name: 'Save' }).click();
  await expect(page.getByText(/not saved/)).toHaveCount(0);
  await expect(page).toHaveTitle('shapley - Conewright');
  const saved = join(desk.folder, 'supercluster.study.json');
  await expect.poll(() => readJson(saved)?.edges).toEqual(dragged);
  const again = await desk.open({ files: [saved] });
  // The browser did not tell where the file was, so the person is asked to point at it once.
  await expect(again.getByText(/shapley\.csv/).first()).toBeVisible();
  const [pointed] = await Promise.all([
    again.waitForEvent('filechooser'),
    again.locator('.stage').getByRole('button', { name: 'Point at it…' }).click(),
  ]);
  await pointed.setFiles(SHAPLEY);
  await ready(again);
  expect((await ledgerJson(again)).shells).toEqual(command.shells);
});

test('a file named on the command line, and a study beside its catalogue, need no pointing', async ({
  desk,
}) => {
  const catalogue = join(desk.folder, 'shapley.csv');
  copyFileSync(SHAPLEY, catalogue);
  const page = await desk.open({ files: [catalogue] });
  await expect(page.locator('.engine-line')).toHaveText(/4.212 kept/);
  await page.keyboard.press('Control+s');
  await page.getByRole('dialog').getByRole('button', { name: 'Save' }).click();
  const study = join(desk.folder, 'shapley.study.json');
  await expect.poll(() => readJson(study)?.source.sha256 ?? '').toMatch(/^[0-9a-f]{64}$/);
  const again = await desk.open({ files: [study] });
  await expect(again.locator('.engine-line')).toHaveText(/4.212 kept/);

  // The file changes under the study: told, not silently used.
  appendFileSync(catalogue, '\n200,-30,17,9000,50\n');
  const third = await desk.open({ files: [study] });
  await expect(third.getByText(/changed since/)).toBeVisible();
  await accessible(third, '.desk');
});

/** A file as JSON; null while it is not there. */
function readJson(path: string) {
  return existsSync(path) ? JSON.parse(readFileSync(path, 'utf8')) : null;
}

/** Pixels of the stage that are neither its ground nor grey: galaxies and shells. */
async function colouredPixels(page: Page): Promise<number> {
  const image = await page.locator('.stage').screenshot();
  return page.evaluate(async (base64) => {
    const bitmap = new Image();
    bitmap.src = `data:image/png;base64,${base64}`;
    await bitmap.decode();
    const canvas = new OffscreenCanvas(bitmap.width, bitmap.height);
    const context = canvas.getContext('2d', { willReadFrequently: true })!;
    context.drawImage(bitmap, 0, 0);
    const { data } = context.getImageData(0, 0, bitmap.width, bitmap.height);
    let count = 0;
    for (let i = 0; i < data.length; i += 4)
      if (
        Math.max(data[i]!, data[i + 1]!, data[i + 2]!) - Math.min(data[i]!, data[i + 1]!, data[i + 2]!) >
        24
      )
        count++;
    return count;
  }, image.toString('base64'));
}
