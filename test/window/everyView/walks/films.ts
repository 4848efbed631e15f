import type { Page } from '@playwright/test';
import { smallStudy } from '../../smallStudy.ts';
import { expect, ready } from '../../window.ts';
import { DIALOG } from '../acts.ts';
import type { View, Walk } from '../view.ts';

const drawn = (page: Page) => page.locator('.bench-facts', { hasText: /frames · takes/ });
const film = (label: string): View => ({
  name: `film ${label.toLowerCase()}`,
  within: DIALOG,
  reach: (page) => page.getByLabel('Kind').selectOption({ label }),
  shows: drawn,
});

/** The film side of the bench, on few galaxies: every frame draws all of them. */
export const films: Walk = {
  name: 'films',
  async open(desk, look) {
    const page = await desk.open({ ...look, files: [smallStudy(desk.folder)] });
    await ready(page);
    await page.keyboard.press('p');
    await page.getByRole('dialog').getByText('Film', { exact: true }).click();
    return page;
  },
  views: [
    { name: 'film turntable', within: DIALOG, shows: drawn },
    film('Fly-along'),
    film('Shell by shell'),
    {
      name: 'odd sides refused',
      within: DIALOG,
      async reach(page) {
        await page.getByLabel('Size', { exact: true }).selectOption('own');
        await page.getByLabel('Width').fill('321');
        await page.getByLabel('Height').fill('192');
      },
      shows: (page) => page.getByText(/films need even sides, such as 322/).first(),
    },
    {
      name: 'film being written',
      within: DIALOG,
      async reach(page) {
        await page.getByLabel('Size', { exact: true }).selectOption('4k');
        await expect(drawn(page)).toBeVisible();
        await page.getByRole('button', { name: 'Export WebM' }).click();
      },
      shows: (page) => page.getByRole('progressbar', { name: 'Writing WebM' }),
      leave: (page) => page.getByRole('button', { name: 'Cancel' }).click(),
    },
    {
      name: 'film written',
      within: DIALOG,
      async reach(page) {
        await expect(page.getByText('The export was cancelled; no file was written.')).toBeVisible();
        await page.getByLabel('Size', { exact: true }).selectOption('own');
        await page.getByLabel('Width').fill('320');
        await page.getByLabel('Length').fill('0.6');
        await page.getByLabel('Frames').fill('5');
        await expect(drawn(page)).toHaveText(/^320 × 192/);
        await page.getByRole('button', { name: 'Export WebM' }).click();
      },
      shows: (page) => page.getByText(/was written to/),
    },
  ],
};
