import { ready } from '../../window.ts';
import { clickButton, pressEscape } from '../acts.ts';
import type { Walk } from '../view.ts';

/** The depth strip at work. */
export const strip: Walk = {
  name: 'strip',
  async open(desk, look) {
    const page = await desk.open(look);
    await ready(page);
    return page;
  },
  views: [
    {
      name: 'an edge spoken',
      within: '.depth',
      reach: (page) => page.getByRole('slider', { name: 'Edge 6 of 6' }).focus(),
      shows: (page) => page.locator('.strip-bubble'),
    },
    {
      name: 'an edge typed, its way barred',
      within: '.depth',
      async reach(page) {
        await page.keyboard.press('Enter');
        await page.getByRole('textbox', { name: 'Edge 6' }).fill('1.3');
        await page.keyboard.press('Enter');
      },
      shows: (page) => page.getByRole('button', { name: 'Remove edge 5 and move' }),
      leave: pressEscape,
    },
    {
      name: 'an edge added',
      within: '.depth',
      reach: clickButton('Add edge'),
      shows: (page) => page.getByRole('textbox', { name: 'New edge' }),
      leave: pressEscape,
    },
    {
      name: 'the depth read under the pointer',
      within: '.depth',
      async reach(page) {
        const box = (await page.locator('.strip-drawing').boundingBox())!;
        await page.mouse.move(box.x + 0.48 * box.width, box.y + 0.3 * box.height);
        await page.mouse.move(box.x + 0.5 * box.width, box.y + 0.3 * box.height);
      },
      shows: (page) => page.locator('.strip-tip'),
    },
    {
      name: 'shells from behind to before',
      within: '.depth',
      async reach(page) {
        await page.getByRole('textbox', { name: 'Shells from redshift' }).fill('0.6');
        await page.getByRole('textbox', { name: 'Shells up to redshift' }).fill('0.3');
        await page.keyboard.press('Enter');
      },
      shows: (page) => page.locator('.strip-trouble'),
      async leave(page) {
        await page.getByRole('textbox', { name: 'Shells from redshift' }).fill('');
        await page.getByRole('textbox', { name: 'Shells up to redshift' }).fill('');
      },
    },
    {
      name: 'many shells, less depth',
      within: '.depth, .worth',
      async reach(page) {
        await page.getByRole('textbox', { name: 'Number of shells' }).fill('24');
        await page.getByRole('button', { name: /^count: shells of equal/ }).click();
        for (let i = 0; i < 6; i++)
          await page.getByRole('button', { name: 'Show less depth', exact: true }).click();
      },
      shows: (page) => page.locator('tr[data-shell="23"]').first(),
    },
    {
      name: 'snapping, a split shell chosen',
      within: '.depth, .worth',
      async reach(page) {
        await page.getByRole('button', { name: 'Show the shells', exact: true }).click();
        await page.locator('tr[data-shell="3"]').first().click();
        await page.getByRole('button', { name: 'Split shell', exact: true }).click();
        await page.getByRole('button', { name: 'Snap', exact: true }).click();
      },
      shows: (page) => page.locator('tr[data-shell="24"]').first(),
    },
  ],
};
