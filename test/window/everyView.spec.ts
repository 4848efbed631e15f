import { goThrough, inBothThemes } from './everyView/view.ts';
import { desk as deskWalk } from './everyView/walks/desk.ts';
import { WALKS } from './everyView/walks.ts';
import { accessible, test } from './window.ts';

for (const walk of WALKS)
  test(`axe finds nothing in any view, dark and light: ${walk.name}`, async ({ desk }) => {
    await goThrough(walk, desk, {}, (page, view) => inBothThemes(page, () => accessible(page, view.within)));
  });

test('in a large window too every view keeps within it', async ({ desk }) => {
  // Menus, dialogs and long panels: what could reach beyond. That nothing does is checked wherever a walk goes.
  await goThrough(deskWalk, desk, { theme: 'light', size: { width: 2560, height: 1440 } }, async () => {});
});
