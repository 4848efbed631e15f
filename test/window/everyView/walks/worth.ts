import { expect, ready } from '../../window.ts';
import { press, pressEscape } from '../acts.ts';
import type { Walk } from '../view.ts';

/** Ledger, whole ledger and sheet of the demo. */
export const worth: Walk = {
  name: 'worth',
  async open(desk, look) {
    const page = await desk.open(look);
    await ready(page);
    return page;
  },
  views: [
    {
      name: 'a shell chosen',
      within: '.worth',
      reach: press(']'),
      shows: (page) => page.locator('tr[data-shell="0"][aria-selected=true]').first(),
    },
    {
      name: 'an explanation',
      within: '.worth',
      reach: (page) => page.locator('.sheet button[data-quantity="effectiveVolumeMpc3"]').click(),
      shows: (page) => page.getByText(/Tegmark 1997/).first(),
    },
    {
      name: 'all digits',
      within: '.worth',
      reach: (page) => page.getByLabel('all digits').check(),
      shows: (page) => page.locator('.sheet-digits'),
      leave: (page) => page.getByLabel('all digits').uncheck(),
    },
    {
      name: 'sorted, an edge typed in its row',
      within: '.worth',
      async reach(page) {
        await page.locator('.ledger-part').getByRole('button', { name: 'N', exact: true }).click();
        await page
          .locator('tr[data-shell="1"]')
          .first()
          .getByRole('button', { name: /^z max/ })
          .dblclick();
      },
      shows: (page) => page.getByRole('textbox', { name: 'Move this edge to' }),
    },
    {
      name: 'whole ledger',
      within: '.wide-ledger',
      async reach(page) {
        await page.getByRole('button', { name: 'Whole ledger', exact: true }).click();
        // It lies over the cone, and nothing of it is cut off.
        const [ledger, stage] = [page.locator('.wide-ledger'), page.locator('.stage')];
        expect(await ledger.boundingBox()).toEqual(await stage.boundingBox());
      },
      shows: (page) => page.locator('.wide-ledger'),
      leave: pressEscape,
    },
  ],
};
