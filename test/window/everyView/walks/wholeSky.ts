import { join } from 'node:path';
import { writeInventedField } from '../../../bench/inventedField.ts';
import { ready } from '../../window.ts';
import { choose, press } from '../acts.ts';
import type { Walk } from '../view.ts';

/** Galaxies on all sides. */
export const wholeSky: Walk = {
  name: 'whole-sky',
  async open(desk, look) {
    const file = join(desk.folder, 'all around.csv');
    writeInventedField(file, 40_000, true);
    const page = await desk.open({ ...look, files: [file] });
    await ready(page);
    return page;
  },
  views: [
    {
      name: 'all around',
      within: 'body',
      async reach(page) {
        await choose(page, 'Add a shape', /^Whole sky/);
        await page.getByRole('button', { name: /^Mpc: shells of equal/ }).click();
      },
      shows: (page) => page.locator('tr[data-shell="0"]').first(),
    },
    {
      name: 'all around, whole',
      within: '.stage',
      reach: press('4'),
      shows: (page) => page.locator('.stage-bar'),
    },
  ],
};
