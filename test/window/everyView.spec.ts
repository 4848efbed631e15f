import { goThrough, inBothThemes } from './everyView/view.ts';
import { WALKS } from './everyView/walks.ts';
import { accessible, test } from './window.ts';

/** What a theme decides. Of all rules in both themes, and of films and a million galaxies, the gallery judges. */
const OF_THE_THEME = ['color-contrast'];

for (const walk of WALKS)
  test(`axe finds nothing in any view, dark and light: ${walk.name}`, async ({ desk }) => {
    await goThrough(walk, desk, {}, async (page, view) => {
      let rules: readonly string[] = [];
      await inBothThemes(page, async () => {
        await accessible(page, view.within, rules);
        rules = OF_THE_THEME;
      });
    });
  });
