import type { Page } from '@playwright/test';
import { conewright } from './command.ts';
import { drop, SHAPLEY } from './files.ts';
import { accessible, downloaded, expect, ready, test } from './window.ts';

const edgesOf = async (page: Page): Promise<number[]> => {
  const handles = page.getByRole('slider', { name: /^Edge \d+ of/ });
  return Promise.all((await handles.all()).map(async (h) => Number(await h.getAttribute('aria-valuenow'))));
};

test("four shells of equal volume between two redshifts are the command's", async ({ desk }) => {
  const page = await desk.open({ files: [SHAPLEY] });
  await ready(page);
  const [from, to] = [
    page.getByRole('textbox', { name: 'Shells from redshift' }),
    page.getByRole('textbox', { name: 'Shells up to redshift' }),
  ];
  const number = page.getByRole('textbox', { name: 'Number of shells' });
  await number.fill('4');
  // The one field that cannot be read is marked, and a notice of before does not lie over the sentence.
  await drop(page, 'torn.study.json', '{');
  const notice = page.locator('.notice').last();
  await expect(notice).toBeVisible();
  await to.fill('0,06');
  await to.press('Enter');
  await expect(page.getByRole('alert')).toHaveText(/is "0,06": give a number/);
  await expect(to).toHaveAttribute('aria-describedby');
  for (const sound of [number, from]) await expect(sound).not.toHaveAttribute('aria-describedby');
  const [over, under] = [await page.getByRole('alert').boundingBox(), await notice.boundingBox()];
  const [x, y] = [Math.max(over!.x, under!.x) + 2, Math.max(over!.y, under!.y) + 2];
  expect(x).toBeLessThan(Math.min(over!.x + over!.width, under!.x + under!.width));
  expect(y).toBeLessThan(Math.min(over!.y + over!.height, under!.y + under!.height));
  expect(await page.evaluate(([a, b]) => document.elementFromPoint(a!, b!)?.role, [x, y])).toBe('alert');
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

test('an edge is typed where its number stands, and P0 is set from where it is said', async ({ desk }) => {
  const page = await desk.open();
  await ready(page);
  const row = page.locator('tr[data-shell="1"]').first();
  const field = page.getByRole('textbox', { name: 'Move this edge to' });
  await row.getByRole('button', { name: /^z max/ }).dblclick();
  await expect(field).toBeFocused();
  await expect(field).toHaveValue('0.9');
  await field.fill('0.95');
  await field.press('Enter');
  expect(await edgesOf(page)).toEqual([0.5, 0.7, 0.95, 1.1, 1.4, 2]);
  await expect(field).toBeFocused();
  await accessible(page, '.worth-panel');
  // By keys: along the row, and Enter.
  await row.focus();
  await page.keyboard.press('ArrowRight');
  await expect(row.getByRole('button', { name: /^z min/ })).toBeFocused();
  await page.keyboard.press('Enter');
  await expect(field).toBeFocused();
  await expect(field).toHaveValue('0.7');

  await page.getByRole('button', { name: /^P₀ = 10.000 \(Mpc\/h\)³ = 32.285 Mpc³/ }).click();
  const p0 = page.getByRole('textbox', { name: 'P₀ of the FKP weight' });
  await expect(p0).toBeFocused();
  await page.keyboard.type('20000');
  await page.keyboard.press('Enter');
  await expect(page.getByRole('button', { name: /^P₀ = 20.000 \(Mpc\/h\)³ = 64.570 Mpc³/ })).toBeVisible();
});
