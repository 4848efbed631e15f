import { join } from 'node:path';
import { writeInventedField } from '../../../bench/inventedField.ts';
import { ready } from '../../window.ts';
import { press } from '../acts.ts';
import type { Walk } from '../view.ts';

/** A million galaxies in one field. */
export const million: Walk = {
  name: 'million',
  async open(desk, look) {
    const file = join(desk.folder, 'million.csv');
    writeInventedField(file, 1_000_000, false);
    const page = await desk.open({ ...look, files: [file] });
    await ready(page);
    return page;
  },
  views: [
    {
      name: 'a million side-on',
      within: 'body',
      reach: (page) => page.getByRole('button', { name: /^count: shells of equal/ }).click(),
      shows: (page) => page.locator('tr[data-shell="4"]').first(),
    },
    {
      name: 'a million down the cone',
      within: '.stage',
      reach: press('2'),
      shows: (page) => page.locator('.stage-bar'),
    },
  ],
};
