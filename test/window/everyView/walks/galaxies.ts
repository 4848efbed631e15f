import { expect, ready } from '../../window.ts';
import { atCone, press } from '../acts.ts';
import type { Walk } from '../view.ts';

/** The card of a galaxy. In the dense near shells of the demo there is one within reach of any pixel. */
export const galaxies: Walk = {
  name: 'galaxies',
  async open(desk, look) {
    const page = await desk.open(look);
    await ready(page);
    return page;
  },
  views: [
    {
      name: 'a galaxy pointed at',
      within: '.stage',
      async reach(page) {
        // Galaxies that are not drawn yet cannot be pointed at: the pointer comes again.
        await page.keyboard.press('1');
        await expect(async () => {
          await atCone(page, 0.44, 0.46, 'point');
          await atCone(page, 0.45, 0.46, 'point');
          await expect(page.locator('.galaxy-card dl')).toBeVisible({ timeout: 1000 });
        }).toPass();
      },
      shows: (page) => page.locator('.galaxy-card dl'),
    },
    {
      name: 'a galaxy picked, and its shell',
      within: '.stage, .worth',
      reach: (page) => atCone(page, 0.45, 0.46, 'click'),
      shows: (page) => page.getByRole('button', { name: 'Measure to another' }),
    },
    {
      name: 'measuring',
      within: '.stage',
      reach: (page) => page.getByRole('button', { name: 'Measure to another' }).click(),
      shows: (page) => page.getByRole('button', { name: 'Click a galaxy; Esc ends' }),
    },
    {
      name: 'two galaxies measured',
      within: '.stage',
      reach: (page) => atCone(page, 0.6, 0.48, 'click'),
      shows: (page) => page.getByText('apart', { exact: true }),
    },
    {
      name: 'two galaxies measured in the whole',
      within: '.stage',
      reach: press('4'),
      shows: (page) => page.getByText('apart', { exact: true }),
    },
  ],
};
