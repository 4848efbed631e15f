import { copyFileSync, existsSync, readFileSync, writeFileSync } from 'node:fs';
import { join } from 'node:path';
import { drop, SHAPLEY } from './files.ts';
import { accessible, expect, ready, test } from './window.ts';

const OTHER = 'ra,dec,z\n150,2,0.5\n151,3,0.6\n152,2.5,0.7\n';

test('a file that is no catalogue has no columns, and the way back leads to the last one that could be read', async ({
  desk,
}) => {
  const page = await desk.open({ files: [SHAPLEY] });
  await ready(page);
  await page.getByRole('button', { name: /^Columns/ }).click();
  const columns = page.locator('#fold-columns');
  await expect(columns.getByRole('combobox').first()).toBeVisible();
  // A table whose columns cannot be guessed shows its own; what comes after it must not inherit them.
  await drop(page, 'odd.csv', 'a,b,c\n1,2,3\n');
  await expect(columns.locator('option', { hasText: /^b$/ }).first()).toBeAttached();
  for (const name of ['picture.png', 'second.png']) {
    // The first bytes of a PNG: its signature and the head of its first chunk (W3C, PNG, section 5.2).
    await drop(page, name, '\x89PNG\r\n\x1a\n\0\0\0\rIHDR');
    await expect(page.locator('.source-name')).toContainText(name);
    await expect(page.locator('.engine-line')).toHaveText('catalogue not read');
    await expect(columns.getByRole('combobox')).toHaveCount(0);
  }
  await page.getByRole('button', { name: 'Back to shapley.csv' }).click();
  await ready(page);
  await expect(columns.getByRole('combobox').first()).toBeVisible();
  await expect(page.locator('.source-name')).toContainText('shapley.csv');
});

test('another catalogue in a saved study takes the title, and Save asks before it replaces the study', async ({
  desk,
}) => {
  const catalogue = join(desk.folder, 'shapley.csv');
  copyFileSync(SHAPLEY, catalogue);
  const page = await desk.open({ files: [catalogue] });
  await ready(page);
  await page.getByRole('button', { name: /^z: shells of equal/ }).click();
  const title = page.getByLabel('Name of the study');
  await title.fill('Supercluster');
  await page.keyboard.press('Enter');
  await page.keyboard.press('Control+s');
  await page.getByRole('dialog').getByRole('button', { name: 'Save' }).click();
  const path = join(desk.folder, 'Supercluster.study.json');
  await expect.poll(() => existsSync(path)).toBe(true);
  await expect(page.getByText('not saved', { exact: true })).toHaveCount(0);
  const saved = readFileSync(path, 'utf8');

  await drop(page, 'other.csv', OTHER);
  await ready(page);
  await expect(title).toHaveValue('other');
  await page.getByRole('button', { name: 'Save', exact: true }).click();
  const question = page.getByRole('dialog', { name: /holds a study of another catalogue/ });
  await expect(question).toContainText('other.csv');
  await accessible(page, '.dialog[open]');
  // Nothing of the question lies outside of its dialog.
  const overhang = await question.evaluate((dialog) => dialog.scrollWidth - dialog.clientWidth);
  expect(overhang).toBe(0);
  await page.keyboard.press('Escape');
  await expect(question).toHaveCount(0);
  expect(readFileSync(path, 'utf8')).toBe(saved);

  await page.keyboard.press('Control+s');
  await question.getByRole('button', { name: 'Save under a new name…' }).click();
  await expect(page.getByRole('textbox', { name: 'Name', exact: true })).toHaveValue('other');
  await page.getByRole('dialog').getByRole('button', { name: 'Save' }).click();
  await expect.poll(() => existsSync(join(desk.folder, 'other.study.json'))).toBe(true);
  expect(readFileSync(path, 'utf8')).toBe(saved);

  // Taken back, the study of before is whole, and goes into its own file.
  await page.keyboard.press('Control+z');
  await ready(page);
  await expect(title).toHaveValue('Supercluster');
  await expect(page.locator('.engine-line')).toHaveText(/4.212 kept/);
  await page.getByRole('button', { name: 'Save', exact: true }).click();
  await expect(page.getByText('not saved', { exact: true })).toHaveCount(0);
  await expect(page.getByRole('dialog')).toHaveCount(0);
  expect(JSON.parse(readFileSync(path, 'utf8')).edges).toEqual(JSON.parse(saved).edges);
});

test('without its catalogue a study gives no numbers of galaxies, says so in one way, and points the way to it', async ({
  desk,
}) => {
  const page = await desk.open();
  await ready(page);
  await drop(page, 'shapley.csv', readFileSync(SHAPLEY, 'utf8'));
  await expect(page.locator('.engine-line')).toHaveText(/4.212 kept/);
  await page.getByRole('button', { name: /^z: shells of equal/ }).click();
  await page.keyboard.press('Control+s');
  await page.getByRole('dialog').getByRole('button', { name: 'Save' }).click();
  // A browser does not say where the file lies: told once.
  const apart = page.getByText(/“shapley\.csv” is not within the study/);
  await expect(apart).toBeVisible();
  await apart.locator('..').getByRole('button', { name: 'Dismiss' }).click();
  const path = join(desk.folder, 'shapley.study.json');
  await expect(page.getByText('not saved', { exact: true })).toHaveCount(0);
  const study = JSON.parse(readFileSync(path, 'utf8'));
  await page.getByLabel('Name of the study').fill('again');
  await page.keyboard.press('Enter');
  await page.keyboard.press('Control+s');
  await expect.poll(() => JSON.parse(readFileSync(path, 'utf8')).name).toBe('again');
  await expect(apart).toHaveCount(0);

  const box = { kind: 'box', raMinDeg: 190, raMaxDeg: 210, decMinDeg: -38, decMaxDeg: -26 };
  writeFileSync(path, JSON.stringify({ ...study, region: { parts: [box], holes: [] } }));
  const bare = await desk.open({
    files: [path],
    init: () => localStorage.setItem('conewright.section.source', 'closed'),
  });
  const stage = bare.locator('.stage-missing');
  await expect(stage).toContainText('The catalogue “shapley.csv” is not at hand.');
  await expect(bare.locator('#fold-source')).toContainText('The catalogue “shapley.csv” is not at hand.');
  await expect(bare.locator('.engine-line')).toHaveText('catalogue not at hand');
  await expect(bare.getByText('The catalogue is not at hand: no galaxies to count.')).toBeVisible();
  const cell = (key: string) => bare.locator(`tr[data-shell="0"] [data-quantity=${key}]`);
  for (const key of ['count', 'zEffective', 'densityPerMpc3', 'densityErrorPerMpc3', 'effectiveVolumeMpc3'])
    await expect(cell(key)).toHaveText('-');
  await expect(cell('volumeMpc3')).toHaveText(/^\d/);
  await expect(bare.locator('.sheet [data-quantity=count]')).toHaveText('-');
  const copy = bare.getByRole('button', { name: 'Copy', exact: true });
  await expect(copy).toBeDisabled();
  await expect(copy).toHaveAttribute('title', /not at hand\. Point at it/);
  const menu = bare.getByRole('button', { name: 'Export', exact: true });
  await expect(menu).toHaveAttribute('title', /not at hand\. Point at it/);
  await menu.click();
  await expect(bare.getByRole('menuitem', { name: /^CSV/ })).toBeDisabled();
  await bare.keyboard.press('Escape');
  await accessible(bare);
  await bare.getByRole('button', { name: 'Light theme' }).click();
  await accessible(bare);

  const [chooser] = await Promise.all([
    bare.waitForEvent('filechooser'),
    stage.getByRole('button', { name: 'Point at it…' }).click(),
  ]);
  await chooser.setFiles(SHAPLEY);
  await ready(bare);
  await expect(stage).toHaveCount(0);
  await expect(cell('count')).toHaveText(/^\d+$/);
  await expect(copy).toBeEnabled();
});
