import { engineWith, stallingDisk } from '../../engineFaults.ts';
import { csv, drop, pick, SHAPLEY, table } from '../../files.ts';
import { ready } from '../../window.ts';
import { pressEscape } from '../acts.ts';
import type { Walk } from '../view.ts';

/** A catalogue on its way, given up, and files that are none. */
export const reading: Walk = {
  name: 'reading',
  async open(desk, look) {
    const page = await desk.open({
      ...look,
      files: [SHAPLEY],
      prepare: (page) => engineWith(page, stallingDisk),
    });
    await ready(page);
    return page;
  },
  views: [
    {
      name: 'half read',
      within: 'body',
      reach: (page) => pick(page, csv('big.csv', table(250_000))),
      shows: (page) => page.getByRole('progressbar', { name: 'Reading the catalogue' }),
      leave: pressEscape,
    },
    {
      name: 'reading cancelled',
      within: '.notices',
      shows: (page) => page.getByText(/^Reading big\.csv was cancelled/),
    },
    {
      name: 'no catalogue',
      within: 'body',
      reach: (page) => drop(page, 'letter.txt', 'nothing of a table\njust words\n'),
      shows: (page) => page.getByText(/is a single column/).first(),
    },
    {
      name: 'columns that cannot be guessed',
      within: 'body',
      reach: (page) => drop(page, 'odd.csv', 'a,b,c\n1,2,3\n'),
      shows: (page) => page.locator('#fold-columns').getByRole('combobox').first(),
    },
    {
      name: 'no usable row',
      within: 'body',
      reach: (page) => drop(page, 'bad.csv', 'ra,dec,z\n10,95,0.5\n400,5,0.5\n'),
      shows: (page) => page.getByText(/^No row of the catalogue can be used/),
    },
    {
      name: 'no row',
      within: 'body',
      reach: (page) => drop(page, 'none.csv', 'ra,dec,z\n'),
      shows: (page) => page.getByText(/has a header and no rows/),
    },
  ],
};
