import { mkdirSync, writeFileSync } from 'node:fs';
import { join, resolve } from 'node:path';
import type { Page } from '@playwright/test';
import { accessible, test } from '../window.ts';
import { goThrough, inBothThemes } from './view.ts';
import { LONG_WALKS, WALKS } from './walks.ts';

const SIZES = [
  { width: 1280, height: 800 },
  { width: 2560, height: 1440 },
] as const;
const MOST_LOOKS = 12;
const BETWEEN_LOOKS_MS = 250;

const folder = process.env.GALLERY;
if (folder === undefined || folder === '')
  throw new Error(
    'GALLERY names no folder: set it to the one that the pictures go to, such as GALLERY=/tmp/gallery.',
  );
const into = resolve(process.env.INIT_CWD ?? '.', folder);

for (const size of SIZES)
  for (const walk of [...WALKS, ...LONG_WALKS])
    test(`${walk.name} at ${size.width} by ${size.height}`, async ({ desk }) => {
      const here = join(into, walk.name);
      mkdirSync(here, { recursive: true });
      await goThrough(walk, desk, { size }, (page, view, number) =>
        inBothThemes(page, async (theme) => {
          const name = `${String(number).padStart(2, '0')} ${view.name}`;
          writeFileSync(join(here, `${name} ${size.width} ${theme}.png`), await atRest(page));
          await accessible(page, view.within);
        }),
      );
    });

/** The window once two looks at it are alike; what never rests is taken as it is. */
async function atRest(page: Page): Promise<Buffer> {
  let before = await page.screenshot();
  for (let look = 0; look < MOST_LOOKS; look++) {
    await page.waitForTimeout(BETWEEN_LOOKS_MS);
    const now = await page.screenshot();
    if (now.equals(before)) break;
    before = now;
  }
  return before;
}
