import { existsSync, readFileSync, writeFileSync } from 'node:fs';
import { join } from 'node:path';
import type { Locator, Page } from '@playwright/test';
import { downloaded, expect, ready, test } from './window.ts';

/** More stops than the window has. */
const MOST_STOPS = 250;

/**
 * Walks by Tab until the focus is there. Every stop on the way must show that it has the focus: an outline, or in a
 * drawing a line in the accent, and must lie in the window.
 */
async function reach(page: Page, wanted: Locator): Promise<void> {
  for (let i = 0; i < MOST_STOPS; i++) {
    if ((await wanted.count()) === 1 && (await wanted.evaluate((e) => e === document.activeElement))) return;
    await page.keyboard.press('Tab');
    expect(await page.evaluate(unseenFocus)).toBeNull();
  }
  throw new Error(`not reached by Tab: ${wanted}`);
}

/** What has the focus without showing it, or out of the window; null when all is well. */
function unseenFocus(): string | null {
  const at = document.activeElement;
  if (at === null || at === document.body) return null;
  const outlined = (e: Element | null) => e !== null && getComputedStyle(e).outlineStyle !== 'none';
  const accent = Object.assign(document.createElement('i'), { style: 'color: var(--accent)' });
  document.body.append(accent);
  const { color } = getComputedStyle(accent);
  accent.remove();
  const drawn =
    at instanceof SVGElement && [...at.children].some((e) => getComputedStyle(e).stroke === color);
  // A radio button is the unseen part of its label.
  const shown = outlined(at) || (at.matches('.segment input') && outlined(at.nextElementSibling)) || drawn;
  const { top, bottom, left, right } = at.getBoundingClientRect();
  const inside = bottom > 0 && right > 0 && top < innerHeight && left < innerWidth;
  return shown && inside ? null : `${at.tagName} ${at.getAttribute('aria-label') ?? at.textContent}`;
}

/** Reaches a control and presses it. */
async function press(page: Page, wanted: Locator): Promise<void> {
  await reach(page, wanted);
  await page.keyboard.press('Enter');
}

/** Opens a menu by its button; its first command has the focus then. */
async function openMenu(page: Page, button: Locator): Promise<void> {
  await press(page, button);
  await expect(page.locator('[role=menuitem]:focus')).toBeVisible();
}

/** A file given to the browser's own dialog, which a test cannot see, opened by what the keys do. */
async function choose(page: Page, path: string, keys: () => Promise<void>): Promise<void> {
  const [chooser] = await Promise.all([page.waitForEvent('filechooser'), keys()]);
  await chooser.setFiles(path);
}

const now = (edge: Locator) => edge.getAttribute('aria-valuenow').then(Number);

test('the whole main job by keyboard alone, and the focus is seen at every stop', async ({ desk }) => {
  test.setTimeout(240_000);
  const page = await desk.open();
  await ready(page);
  const button = (name: string | RegExp) => page.getByRole('button', { name, exact: true });
  const line = page.locator('.engine-line');

  // A catalogue whose columns no name gives away, with velocities.
  const catalogue = join(desk.folder, 'odd.csv');
  const rows = Array.from(
    { length: 900 },
    (_, i) => `${i};${200 + (i % 40) / 5};${-30 + (i % 37) / 6};${9000 + 15 * i}`,
  );
  writeFileSync(catalogue, `objno;alpha_sky;delta_sky;vhel\n${rows.join('\n')}\n`);
  await choose(page, catalogue, () => press(page, button('Open your catalogue…')));
  await expect(line).toHaveText('catalogue not read');
  for (const [label, column] of [
    ['right ascension, deg', 'alpha'],
    ['declination, deg', 'delta'],
    ['redshift', 'vhel'],
  ] as const) {
    await reach(page, page.getByRole('combobox', { name: label, exact: true }));
    await page.keyboard.type(column);
  }
  await expect(line).toHaveText('0 kept · 900 set aside');
  await expect(page.getByRole('combobox', { name: 'redshift', exact: true })).toBeFocused();
  await reach(page, page.getByRole('radio', { name: 'z', exact: true }));
  await page.keyboard.press('ArrowRight');
  await expect(line).toHaveText('900 kept · 0 set aside');

  // A region: the second of the menu is a cap.
  await openMenu(page, button('Add a shape'));
  await page.keyboard.press('ArrowDown');
  await page.keyboard.press('Enter');
  await expect(page.getByLabel('centre RA')).toBeFocused();
  for (const number of ['204', '-27', '3']) {
    await page.keyboard.type(number);
    await page.keyboard.press(number === '3' ? 'Enter' : 'Tab');
  }
  await expect(page.getByText('exact area')).toBeVisible();
  await expect(button('Add a shape')).toBeFocused();
  await expect(line).toHaveText(/^[1-8]\d\d kept/);

  // Shells, and one of their edges: by a step, and typed as a redshift.
  await reach(page, page.getByRole('textbox', { name: 'Number of shells' }));
  await page.keyboard.press('Control+a');
  await page.keyboard.type('4');
  await press(page, button(/^z: shells of equal/));
  const edge = page.getByRole('slider', { name: 'Edge 2 of 5' });
  await page.keyboard.press('r');
  await reach(page, edge);
  const before = await now(edge);
  await page.keyboard.press('ArrowRight');
  expect(await now(edge)).toBeGreaterThan(before);
  await page.keyboard.press('Enter');
  await page.keyboard.press('Control+a');
  await page.keyboard.type('0.044');
  await page.keyboard.press('Enter');
  await expect(edge).toBeFocused();
  await expect.poll(() => now(edge)).toBe(0.044);
  await page.keyboard.press('Control+z');
  await page.keyboard.press('Control+z');
  await expect.poll(() => now(edge)).toBe(before);
  await page.keyboard.press('Control+Shift+z');
  await page.keyboard.press('Control+Shift+z');
  await expect.poll(() => now(edge)).toBe(0.044);
  await page.keyboard.press(']');
  await expect(page.locator('tr[data-shell="0"]')).toHaveAttribute('aria-selected', 'true');
  await page.keyboard.press('h');
  await expect(page.locator('.ledger').first()).toContainText('(Mpc/h)³');

  // Save, leave, and open again.
  await page.keyboard.press('Control+s');
  await page.keyboard.press('Control+a');
  await page.keyboard.type('by hand');
  await page.keyboard.press('Enter');
  const saved = join(desk.folder, 'by hand.study.json');
  await expect.poll(() => existsSync(saved)).toBe(true);
  expect(JSON.parse(readFileSync(saved, 'utf8')).edges[1]).toBe(0.044);
  await expect(edge).toBeFocused();
  // The file is there before the page knows of it, and would ask about work that is not saved.
  await expect(page).not.toHaveTitle(/not saved/);
  await page.keyboard.press('Control+n');
  await expect(line).toHaveText('no catalogue');
  await choose(page, saved, () => page.keyboard.press('Control+o'));
  await expect(line).toHaveText(/^[1-8]\d\d kept/);
  expect(await now(edge)).toBe(0.044);

  // Give out: the ledger to the clipboard and as CSV, and the picture.
  await openMenu(page, button('Copy'));
  await page.keyboard.press('Enter');
  await expect(page.getByText('The ledger of 4 shells is on the clipboard.')).toBeVisible();
  await expect(button('Copy')).toBeFocused();
  const csv = await downloaded(page, async () => {
    await openMenu(page, button('Export'));
    await page.keyboard.press('ArrowDown');
    await page.keyboard.press('Enter');
  });
  expect(csv.name).toBe('odd shells.csv');
  expect(csv.text).toContain('0.044');
  await page.keyboard.press('p');
  await expect(page.getByRole('dialog', { name: 'Picture' })).toBeVisible();
  const picture = await downloaded(page, () => press(page, button('Export SVG')));
  expect(picture.text).toMatch(/^<\?xml|^<svg/);
  await page.keyboard.press('Escape');
  await expect(button('Export')).toBeFocused();
});

test('the focus comes back to where it was, or to what is nearest, when what had it goes', async ({
  desk,
}) => {
  const page = await desk.open();
  await ready(page);
  const button = (name: string | RegExp) => page.getByRole('button', { name, exact: true });
  for (const opener of ['Keys', 'Whole ledger']) {
    await button(opener).focus();
    await page.keyboard.press('Enter');
    await expect(button('Close')).toBeFocused();
    await page.keyboard.press('Escape');
    await expect(button(opener)).toBeFocused();
  }
  await button(/^Cuts/).focus();
  await page.keyboard.press('Enter');
  await press(page, button('Add a cut'));
  await button(/^Remove the cut/).focus();
  await page.keyboard.press('Enter');
  await expect(button('Add a cut')).toBeFocused();
  await button(/^Remove: cap of radius 0.65/).focus();
  await page.keyboard.press('Enter');
  await expect(button('Add a shape')).toBeFocused();
  await button(/^Change: box/).focus();
  await page.keyboard.press('Enter');
  await page.keyboard.press('Escape');
  await expect(button('Add a shape')).toBeFocused();
  await page.keyboard.press('Control+s');
  await expect(page.getByRole('textbox', { name: 'Name', exact: true })).toBeFocused();
  await page.keyboard.press('Escape');
  await expect(button('Add a shape')).toBeFocused();
  await openMenu(page, button('Copy'));
  await page.keyboard.press('Enter');
  await expect(page.getByText(/is on the clipboard/)).toBeVisible();
  await press(page, button('Dismiss'));
  await expect(button('Dismiss')).toHaveCount(0);
  expect(await page.evaluate(() => document.activeElement !== document.body)).toBe(true);
});
