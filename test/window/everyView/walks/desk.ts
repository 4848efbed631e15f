import type { Page } from '@playwright/test';
import { ready } from '../../window.ts';
import { choose, clickButton, DIALOG, MENU, pressEscape } from '../acts.ts';
import type { View, Walk } from '../view.ts';

const menu = (button: string): View => ({
  name: `menu ${button}`,
  within: MENU,
  reach: clickButton(button),
  shows: (page) => page.locator(MENU),
  leave: pressEscape,
});
const cancel = (page: Page) => page.getByRole('button', { name: 'Cancel', exact: true }).click();
const addShape = (page: Page) => page.getByRole('button', { name: 'Add', exact: true }).click();
/** A shape whose form is sent without a number. */
const refusedShape = (kind: string): View => ({
  name: `${kind} refused`,
  within: '.shape-editor',
  async reach(page) {
    await choose(page, 'Add a shape', new RegExp(`^${kind}`));
    await addShape(page);
  },
  shows: (page) => page.locator('.shape-editor [role=alert]').first(),
  leave: cancel,
});

/** Head and desk of the demo: menus, columns, cuts, region, cosmology. */
export const desk: Walk = {
  name: 'desk',
  async open(desk, look) {
    const page = await desk.open(look);
    await ready(page);
    return page;
  },
  views: [
    menu('Study'),
    menu('Export'),
    menu('Copy'),
    menu('Add a shape'),
    {
      name: 'columns and a cut',
      within: '.desk',
      async reach(page) {
        await page.locator('#section-columns').click();
        await page.locator('#section-cuts').click();
        await page.getByRole('button', { name: 'Add a cut' }).click();
        await page.getByRole('textbox', { name: 'to', exact: true }).fill('22.5');
        await page.keyboard.press('Enter');
      },
      shows: (page) => page.getByText(/rows are set aside by it/),
    },
    {
      name: 'a cut refused, the map fitted',
      within: '.desk',
      async reach(page) {
        await page.getByRole('textbox', { name: 'from', exact: true }).fill('bright');
        await page.keyboard.press('Enter');
        await page.locator('.sky-head').getByText('field', { exact: true }).click();
      },
      shows: (page) => page.getByText('from is "bright": give a number such as 0.5 or 1e4.'),
    },
    {
      name: 'first rows',
      within: DIALOG,
      reach: (page) => page.getByRole('button', { name: 'Look at 20 rows…' }).click(),
      shows: (page) => page.locator('.preview-table tbody tr').nth(19),
    },
    {
      name: 'rows that would be set aside',
      within: DIALOG,
      reach: (page) => page.getByRole('combobox', { name: 'declination, deg' }).last().selectOption('field'),
      shows: (page) => page.locator('.preview-table .blamed').first(),
      async leave(page) {
        await page.keyboard.press('Escape');
        await page.keyboard.press('Control+z');
        await page.locator('#section-columns').click();
        await page.locator('#section-cuts').click();
      },
    },
    {
      name: 'Polygon pasted',
      within: '.shape-editor',
      async reach(page) {
        await choose(page, 'Add a shape', /^Polygon/);
        await page.getByLabel(/vertices/).fill('10 10\n20 10\nno numbers');
      },
      shows: (page) => page.locator('.shape-editor textarea'),
    },
    {
      name: 'Polygon refused',
      within: '.shape-editor',
      reach: addShape,
      shows: (page) => page.locator('.shape-editor [role=alert]').first(),
      leave: cancel,
    },
    refusedShape('Box'),
    refusedShape('Cap'),
    {
      name: 'own parameters of the universe',
      within: '.desk',
      async reach(page) {
        await page.getByRole('button', { name: /^Cosmology:/ }).click();
        await page.getByLabel('flat: dark energy closes the sum').uncheck();
        await page.getByLabel('Ω dark energy').fill('0.6');
        await page.keyboard.press('Enter');
      },
      shows: (page) => page.getByText(/^Own parameters: any change/),
    },
    {
      name: 'a parameter refused',
      within: '.desk',
      async reach(page) {
        await page.getByLabel('H₀').fill('-5');
        await page.keyboard.press('Enter');
      },
      shows: (page) => page.getByText(/^H₀ is -5; allowed is/),
    },
    {
      name: 'keys',
      within: DIALOG,
      reach: clickButton('Keys'),
      shows: (page) => page.locator(DIALOG),
      leave: pressEscape,
    },
  ],
};
