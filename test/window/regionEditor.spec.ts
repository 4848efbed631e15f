import type { Page } from '@playwright/test';
import { engineWith, regionsWait } from './engineFaults.ts';
import { SHAPLEY } from './files.ts';
import { type Desk, expect, ready, test } from './window.ts';

/** The window with a cap in its region's editor, and what the engine is asked about it held back. */
async function editorWith(desk: Desk, radius: string) {
  const page = await desk.open({
    files: [SHAPLEY],
    prepare: (page) => engineWith(page, regionsWait),
  });
  await ready(page);
  await page.evaluate(() => {
    const channel = new BroadcastChannel('regions');
    const state = { asked: 0, answer: () => channel.postMessage('go') };
    channel.onmessage = () => state.asked++;
    Object.assign(globalThis, { regions: state });
  });
  await page.getByRole('button', { name: 'Add a shape' }).click();
  await page.getByRole('menuitem', { name: /^Cap/ }).click();
  await page.getByLabel('centre RA').fill('201');
  await page.getByLabel('centre Dec').fill('-31');
  await page.getByLabel('radius').fill(radius);
  return page;
}

interface Held {
  readonly regions: { readonly asked: number; answer(): void };
}
const add = (page: Page) => page.getByRole('button', { name: 'Add', exact: true });
const shapes = (page: Page) => page.getByRole('list', { name: 'Observed shapes' }).getByRole('listitem');
const asked = (page: Page, times: number) =>
  expect.poll(() => page.evaluate(() => (globalThis as unknown as Held).regions.asked)).toBe(times);
const answer = (page: Page) => page.evaluate(() => (globalThis as unknown as Held).regions.answer());

test('a shape that was cancelled while the engine looked at it is not added', async ({ desk }) => {
  const page = await editorWith(desk, '2');
  await add(page).click();
  await asked(page, 1);
  await page.getByRole('button', { name: 'Cancel', exact: true }).click();
  await answer(page);
  // The next is asked about after it: whatever came of the first is there by now.
  await page.getByRole('button', { name: 'Add a shape' }).click();
  await page.getByRole('menuitem', { name: /^Whole sky/ }).click();
  await asked(page, 2);
  await answer(page);
  await expect(page.getByText('exact area')).toBeVisible();
  await expect(shapes(page)).toHaveText(/whole sky/i);
});

test('a shape changed while the engine looked at it is taken as it is now, and once', async ({ desk }) => {
  const page = await editorWith(desk, '2');
  await add(page).click();
  await add(page).click();
  await asked(page, 1);
  await page.getByLabel('radius').fill('1.5');
  await answer(page);
  // What was asked before is not taken: the form stands as it was left.
  await add(page).click();
  await asked(page, 2);
  await expect(shapes(page)).toHaveCount(0);
  await expect(page.getByLabel('radius')).toHaveValue('1.5');
  await answer(page);
  await asked(page, 3);
  await answer(page);
  await expect(shapes(page)).toHaveCount(1);
  await expect(shapes(page)).toContainText('1.5');
  await expect(page.getByRole('button', { name: 'Add a shape' })).toBeFocused();
  // One step back and there is no region.
  await page.keyboard.press('Control+z');
  await expect(shapes(page)).toHaveCount(0);
});

test('whoever goes on elsewhere while the engine looks at a shape stays there', async ({ desk }) => {
  const page = await editorWith(desk, '2');
  await add(page).click();
  await asked(page, 1);
  const name = page.getByLabel('Name of the study');
  await name.focus();
  await answer(page);
  await asked(page, 2);
  await answer(page);
  await expect(shapes(page)).toHaveCount(1);
  await page.evaluate(
    () => new Promise((drawn) => requestAnimationFrame(() => requestAnimationFrame(drawn))),
  );
  await expect(name).toBeFocused();
  // Who waits comes to the button that the form came from.
  await page.getByRole('button', { name: /^Remove: cap/ }).click();
  await expect(shapes(page)).toHaveCount(0);
  await expect(page.getByRole('button', { name: 'Add a shape' })).toBeFocused();
});
