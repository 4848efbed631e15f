import { readFileSync } from 'node:fs';
import { SHAPLEY, SHAPLEY_WINDOW } from '../../files.ts';
import { ready } from '../../window.ts';
import { choose } from '../acts.ts';
import type { Walk } from '../view.ts';

/** A real catalogue with velocities for redshifts. */
export const shapley: Walk = {
  name: 'shapley',
  async open(desk, look) {
    const page = await desk.open({ ...look, files: [SHAPLEY] });
    await ready(page);
    return page;
  },
  views: [
    { name: 'just opened', within: 'body', shows: (page) => page.getByText(/estimate/i).first() },
    {
      name: 'its window, and shells of equal volume',
      within: 'body',
      async reach(page) {
        await choose(page, 'Add a shape', /^Polygon/);
        await page.getByLabel(/vertices/).fill(readFileSync(SHAPLEY_WINDOW, 'utf8'));
        await page.getByRole('button', { name: 'Add', exact: true }).click();
        await page.getByRole('textbox', { name: 'Number of shells' }).fill('4');
        await page.getByRole('button', { name: /^volume: shells of equal/ }).click();
        await page.getByRole('button', { name: /^Columns/ }).click();
      },
      shows: (page) => page.locator('tr[data-shell="3"]').first(),
    },
  ],
};
