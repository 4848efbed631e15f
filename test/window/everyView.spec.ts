import type { Page } from '@playwright/test';
import { accessible, expect, legible, ready, test } from './window.ts';

/**
 * What axe says of a part of the window, in the theme that it is shown in and then in the other, in which it stays:
 * the window starts either way, and turning back and forth would draw the cone for nothing.
 */
async function bothThemes(page: Page, within: string, what: string): Promise<void> {
  await test.step(what, async () => {
    await accessible(page, within);
    await otherTheme(page);
    await legible(page, within);
  });
}

/** Presses the button of the theme, which no dialog can hide from a script. */
const otherTheme = (page: Page) =>
  page.evaluate(() => document.querySelector<HTMLElement>('.head [aria-label$=" theme"]')!.click());

const dialog = '.dialog[open]';

test('axe finds nothing in any view, dark and light: the window and its panels', async ({ desk }) => {
  const page = await desk.open();
  await ready(page);
  for (const key of ['2', '3', '4', '5', '6', '1']) {
    await page.keyboard.press(key);
    await accessible(page, '.stage');
  }
  await bothThemes(page, '.stage', 'the stage');
  for (const name of ['Study', 'Export', 'Copy the ledger', 'Add a shape']) {
    await page.getByRole('button', { name: name === 'Copy the ledger' ? 'Copy' : name, exact: true }).click();
    await accessible(page, '[role=menu]:popover-open');
    if (name === 'Export') await bothThemes(page, '[role=menu]:popover-open', 'a menu');
    await page.keyboard.press('Escape');
  }

  await page.getByRole('button', { name: 'Light', exact: true }).click();
  await bothThemes(page, '.popover:popover-open', 'the light');
  await page.keyboard.press('Escape');

  await page.keyboard.press(']');
  await page.getByRole('button', { name: 'Whole ledger' }).click();
  await bothThemes(page, '.wide-ledger', 'whole ledger');
  await page.keyboard.press('Escape');
  await page.getByLabel('all digits').check();
  await page.locator('.sheet button[data-quantity="effectiveVolumeMpc3"]').click();
  await bothThemes(page, '.worth', 'shell sheet, all digits, an explanation');

  await page.locator('#section-columns').click();
  await page.locator('#section-cuts').click();
  await page.getByRole('button', { name: 'Add a cut' }).click();
  await page.getByRole('textbox', { name: 'from', exact: true }).fill('bright');
  await page.keyboard.press('Enter');
  await expect(page.getByText('from is "bright": give a number such as 0.5 or 1e4.')).toBeVisible();
  await page.locator('.sky-head').getByText('field', { exact: true }).click();
  await bothThemes(page, '.desk', 'columns, a cut that is refused, the sky map fitted');
  await page.getByRole('button', { name: 'Look at 20 rows…' }).click();
  await expect(page.locator('.preview-table tbody tr')).toHaveCount(20);
  await bothThemes(page, dialog, 'the first rows');
  await page.getByRole('combobox', { name: 'declination, deg' }).last().selectOption('field');
  await expect(page.locator('.preview-table .blamed').first()).toBeVisible();
  await bothThemes(page, dialog, 'rows that would be set aside');
  await page.keyboard.press('Escape');
  await page.keyboard.press('Control+z');

  for (const kind of ['Box', 'Cap', 'Polygon']) {
    await page.getByRole('button', { name: 'Add a shape' }).click();
    await page.getByRole('menuitem', { name: new RegExp(`^${kind}`) }).click();
    if (kind === 'Polygon') {
      await page.getByLabel(/vertices/).fill('10 10\n20 10\nno numbers');
      await bothThemes(page, '.shape-editor', 'a polygon, pasted');
    }
    await page.getByRole('button', { name: 'Add', exact: true }).click();
    await expect(page.locator('.shape-editor [role=alert]').first()).toBeVisible();
    await bothThemes(page, '.shape-editor', `${kind}, refused`);
    await page.getByRole('button', { name: 'Cancel', exact: true }).click();
  }

  await page.getByRole('button', { name: /^Cosmology:/ }).click();
  await page.getByLabel('H₀').fill('-5');
  await page.keyboard.press('Enter');
  await expect(page.getByText(/^H₀ is -5; allowed is/)).toBeVisible();
  await bothThemes(page, '.desk', 'a refused parameter');
});

test('axe finds nothing in any view, dark and light: dialogs, notices and the picture bench', async ({
  desk,
}) => {
  const page = await desk.open({ theme: 'light' });
  await ready(page);
  await page.keyboard.press('?');
  await bothThemes(page, dialog, 'keys');
  await page.keyboard.press('Escape');
  await page.keyboard.press('p');
  const bench = page.getByRole('dialog', { name: 'Picture' });
  const views = bench.getByRole('combobox', { name: 'View' });
  for (const view of await views.locator('option').allTextContents()) {
    await views.selectOption({ label: view });
    await accessible(page, dialog);
  }
  await bench.getByText('Film', { exact: true }).click();
  await accessible(page, dialog);
  await bench.getByText('Picture', { exact: true }).click();
  await bench.getByLabel('Size', { exact: true }).selectOption('own');
  await bench.getByLabel('Width').fill('0');
  await expect(bench.getByRole('button', { name: 'Export PNG' })).toBeDisabled();
  await bothThemes(page, dialog, 'picture bench, a size that is refused');
  await page.keyboard.press('Escape');

  await page.getByLabel('Name of the study').fill('');
  await page.keyboard.press('Enter');
  await expect(page.getByText('The study needs a name: the old one was kept.')).toBeVisible();
  await bothThemes(page, '.notices', 'a notice');
  await page.getByLabel('Name of the study').fill('other');
  await page.keyboard.press('Enter');
  await page.keyboard.press('Control+s');
  await bothThemes(page, dialog, 'the name to save under');
  await page.keyboard.press('Escape');
  await page.keyboard.press('Control+n');
  await expect(page.getByRole('button', { name: 'Leave without saving' })).toBeVisible();
  await bothThemes(page, dialog, 'the question before leaving');
});
