import type { Page } from '@playwright/test';
import { expect, ready } from '../../window.ts';
import { choose, DIALOG, pressEscape } from '../acts.ts';
import type { Walk } from '../view.ts';

async function put(page: Page, kind: RegExp, fields: Readonly<Record<string, string>>): Promise<void> {
  await choose(page, 'Add a shape', kind);
  for (const [label, value] of Object.entries(fields))
    await page.getByLabel(label, { exact: true }).fill(value);
  await page.getByRole('button', { name: 'Add', exact: true }).click();
}

/** From nothing to a plan: no catalogue is open. */
export const plan: Walk = {
  name: 'plan',
  async open(desk, look) {
    const page = await desk.open(look);
    await ready(page);
    await page.keyboard.press('Control+n');
    return page;
  },
  views: [
    { name: 'a new study', within: 'body', shows: (page) => page.getByText(/No catalogue is open/) },
    {
      name: 'bench of a new study',
      within: DIALOG,
      reach: (page) => choose(page, 'Export', /^Picture/),
      shows: (page) => page.locator('.bench .field-trouble').first(),
      leave: pressEscape,
    },
    {
      name: 'a region alone',
      within: 'body',
      reach: (page) => put(page, /^Cap/, { 'centre RA': '180', 'centre Dec': '0', radius: '10' }),
      shows: (page) => page.getByText(/exact area/),
    },
    {
      name: 'a region and one edge',
      within: '.centre, .worth',
      async reach(page) {
        await page.getByRole('button', { name: 'Add edge', exact: true }).click();
        await page.getByRole('textbox', { name: 'New edge' }).fill('0.4');
        await page.keyboard.press('Enter');
      },
      shows: (page) => page.getByText(/^One edge: set a second/),
    },
    {
      name: 'region and shells',
      within: 'body',
      reach: (page) => page.getByRole('button', { name: /^volume: shells of equal/ }).click(),
      shows: (page) => page.locator('tr[data-shell="0"] [data-quantity=volumeMpc3]'),
    },
    {
      name: 'bench of a plan',
      within: DIALOG,
      async reach(page) {
        await choose(page, 'Export', /^Picture/);
        await expect(page.locator('.bench-pane img')).toBeVisible();
      },
      shows: (page) => page.locator('.bench-facts', { hasText: /pixels$/ }),
      leave: pressEscape,
    },
    {
      name: 'a hole and a second field',
      within: '.desk, .stage',
      async reach(page) {
        await put(page, /^Box/, { 'RA from': '30', 'RA to': '50', 'Dec from': '-10', 'Dec to': '5' });
      },
      shows: (page) => page.locator('.stage-bar').getByText('field 1 of 2'),
    },
  ],
};
