import { fileURLToPath } from 'node:url';
import type { Page } from '@playwright/test';
import { conewright } from './command.ts';
import { accessible, downloaded, expect, ready, test } from './window.ts';

const edgesOf = async (page: Page): Promise<number[]> => {
  const handles = page.getByRole('slider', { name: /^Edge \d+ of/ });
  return Promise.all((await handles.all()).map(async (h) => Number(await h.getAttribute('aria-valuenow'))));
};

const SHAPLEY = fileURLToPath(new URL('../data/shapley.csv', import.meta.url));

test("four shells of equal volume between two redshifts are the command's", async ({ desk }) => {
  const page = await desk.open({ files: [SHAPLEY] });
  await ready(page);
  const [from, to] = [
    page.getByRole('textbox', { name: 'Shells from redshift' }),
    page.getByRole('textbox', { name: 'Shells up to redshift' }),
  ];
  await page.getByRole('textbox', { name: 'Number of shells' }).fill('4');
  await from.fill('0.06');
  await to.fill('0.03');
  await to.press('Enter');
  await expect(page.getByRole('alert')).toHaveText(/begins at z 0.06 and ends at z 0.03: give an end behind/);
  await accessible(page, '.strip');
  await from.fill('0.03');
  await to.fill('0.06');
  await expect(page.getByRole('alert')).toHaveCount(0);
  await page.getByRole('button', { name: /^volume: shells of equal/ }).click();
  // What was typed is where the shells begin and end from now on.
  await expect(to).toHaveValue('');
  await expect(from).toHaveAttribute('placeholder', '0.03');
  await expect(to).toHaveAttribute('placeholder', '0.06');
  const { text } = await downloaded(page, async () => {
    await page.getByRole('button', { name: 'Export' }).click();
    await page.getByRole('menuitem', { name: /^JSON/ }).click();
  });
  const range = ['--shells', 'volume:4', '--z-range', '0.03,0.06'];
  const command = await conewright(desk.folder, 'shells', SHAPLEY, ...range, '--json');
  expect(JSON.parse(text).shells).toEqual(JSON.parse(command.out).shells);
});

test('an edge that others bar the way of: which, and ways to have it there', async ({ desk }) => {
  const page = await desk.open();
  await ready(page);
  const last = page.getByRole('slider', { name: 'Edge 6 of 6' });
  const place = page.getByRole('textbox', { name: 'Edge 6' });
  await last.focus();
  await last.press('Enter');
  // In redshift to begin with, and what is typed is read in the unit that is chosen then.
  await expect(place).toHaveValue('2');
  await page.getByRole('combobox', { name: 'Read as' }).selectOption('Gyr');
  await expect(place).toHaveValue('10.5099');
  await place.fill('1.3');
  await page.getByRole('combobox', { name: 'Read as' }).selectOption('z');
  await expect(place).toHaveValue('1.3');
  await place.press('Enter');
  await expect(page.getByRole('alert')).toHaveText(/^1.3 lies before edge 5 \(z 1.4\): remove edge 5 first/);
  await accessible(page, '.strip');
  await page.getByRole('button', { name: 'Lay out anew…' }).click();
  await expect(page.getByRole('textbox', { name: 'Shells up to redshift' })).toHaveValue('1.3');
  await expect(page.getByRole('button', { name: /^z: shells of equal/ })).toBeFocused();
  await page.getByRole('textbox', { name: 'Shells up to redshift' }).fill('');
  await last.focus();
  await last.press('Enter');
  await place.fill('1.3');
  await place.press('Enter');
  await page.getByRole('button', { name: 'Remove edge 5 and move' }).click();
  expect(await edgesOf(page)).toEqual([0.5, 0.7, 0.9, 1.1, 1.3]);
});
