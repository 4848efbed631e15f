import type { Page } from '@playwright/test';
import { engineWith, shortMemory, stallingDisk } from './engineFaults.ts';
import { csv, pick, SHAPLEY, table } from './files.ts';
import { downloaded, expect, ready, test } from './window.ts';

const line = (page: Page) => page.locator('.engine-line');
const source = (page: Page) => page.getByRole('region', { name: /^Source/ });

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
