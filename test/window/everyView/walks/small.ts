import { drop } from '../../files.ts';
import { expect, ready } from '../../window.ts';
import type { Walk } from '../view.ts';

const file = (rows: readonly string[]) => `ra,dec,z\n${rows.join('\n')}\n`;

/** Catalogues of one row, of one redshift, of a dozen rows. */
export const small: Walk = {
  name: 'small',
  async open(desk, look) {
    const page = await desk.open(look);
    await ready(page);
    return page;
  },
  views: [
    {
      name: 'one row',
      within: 'body',
      reach: (page) => drop(page, 'one.csv', file(['150,2,0.5'])),
      shows: (page) => page.locator('.engine-line', { hasText: /^1 kept/ }),
    },
    {
      name: 'one redshift',
      within: 'body',
      async reach(page) {
        await drop(page, 'same.csv', file(['150,2,0.5', '151,2,0.5', '152,2,0.5']));
        await expect(page.locator('.engine-line')).toHaveText(/^3 kept/);
        await page.getByRole('button', { name: /^volume: shells of equal/ }).click();
      },
      shows: (page) => page.getByText(/All galaxies have the same redshift 0\.5/),
    },
    {
      name: 'twelve rows in shells',
      within: 'body',
      async reach(page) {
        const rows = Array.from(
          { length: 12 },
          (_, i) => `${150 + i / 4},${2 + (i % 5) / 3},${0.3 + i / 20}`,
        );
        await drop(page, 'twelve.csv', file(rows));
        await expect(page.locator('.engine-line')).toHaveText(/^12 kept/);
        await page.getByRole('button', { name: /^z: shells of equal/ }).click();
      },
      shows: (page) => page.locator('tr[data-shell="0"]').first(),
    },
  ],
};
