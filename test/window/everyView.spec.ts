import { goThrough, inBothThemes } from './everyView/view.ts';
import { WALKS } from './everyView/walks.ts';
import { accessible, test } from './window.ts';

// Films and a million galaxies, and every view in a large window, are for the gallery: see DEVELOPERS.md.
for (const walk of WALKS)
  test(`axe finds nothing in any view, dark and light: ${walk.name}`, async ({ desk }) => {
    await goThrough(walk, desk, {}, (page, view) => inBothThemes(page, () => accessible(page, view.within)));
  });
