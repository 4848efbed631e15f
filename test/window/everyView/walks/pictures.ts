import type { Page } from '@playwright/test';
import { expect, ready } from '../../window.ts';
import { DIALOG, press } from '../acts.ts';
import type { View, Walk } from '../view.ts';

const drawn = (page: Page) => page.locator('.bench-facts', { hasText: /^\d+ × \d+ pixels$/ });
const view = (label: string): View => ({
  name: `bench ${label.toLowerCase()}`,
  within: DIALOG,
  reach: (page) => page.getByRole('combobox', { name: 'View' }).selectOption({ label }),
  shows: drawn,
});

/** The picture bench on the demo. */
export const pictures: Walk = {
  name: 'pictures',
  async open(desk, look) {
    const page = await desk.open(look);
    await ready(page);
    return page;
  },
  views: [
    { name: 'bench', within: DIALOG, reach: press('p'), shows: drawn },
    view('Cone in perspective'),
    view('Wedge, laid flat'),
    view('Shells on the sky'),
    view('Light-cone diagram'),
    {
      name: 'on paper, upright, a label',
      within: DIALOG,
      async reach(page) {
        await page.getByLabel('Size', { exact: true }).selectOption('a3');
        await page.getByText('Paper', { exact: true }).click();
        await page.getByRole('button', { name: 'Add a label' }).click();
        await page.getByRole('textbox', { name: 'Label 1' }).fill('A wall');
      },
      shows: drawn,
      leave: (page) => page.getByRole('button', { name: /^Take label/ }).click(),
    },
    {
      name: 'a size that is refused',
      within: DIALOG,
      async reach(page) {
        await page.getByLabel('Size', { exact: true }).selectOption('own');
        await page.getByLabel('Width').fill('0');
      },
      shows: (page) => page.getByText('The width in pixels is 0: give a number from 64 to 16384.').first(),
    },
    {
      name: 'a picture being written',
      within: DIALOG,
      async reach(page) {
        await page.getByLabel('Size', { exact: true }).selectOption('a0');
        await page.getByRole('button', { name: 'Export PNG' }).click();
      },
      shows: (page) => page.getByRole('progressbar', { name: 'Writing PNG' }),
      leave: (page) => page.getByRole('button', { name: 'Cancel' }).click(),
    },
    {
      name: 'a picture cancelled',
      within: DIALOG,
      shows: (page) => page.getByText('The export was cancelled; no file was written.'),
    },
    {
      name: 'a picture written',
      within: DIALOG,
      async reach(page) {
        await page.getByLabel('Size', { exact: true }).selectOption('own');
        await page.getByLabel('Width').fill('640');
        await page.getByLabel('Height').fill('400');
        await expect(drawn(page)).toBeVisible();
        await page.getByRole('button', { name: 'Export SVG' }).click();
      },
      shows: (page) => page.getByText(/was written to/),
    },
  ],
};
