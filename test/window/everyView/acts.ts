import type { Page } from '@playwright/test';

/** Acts that many views are reached by. */
export const press =
  (...keys: readonly string[]) =>
  async (page: Page): Promise<void> => {
    for (const key of keys) await page.keyboard.press(key);
  };

export const pressEscape = press('Escape');

export const clickButton = (name: string) => (page: Page) =>
  page.getByRole('button', { name, exact: true }).click();

/** Clicks, or only points at, a place of the cone, given as shares of its width and height. */
export async function atCone(page: Page, x: number, y: number, act: 'click' | 'point'): Promise<void> {
  const box = (await page.locator('.stage-cone').boundingBox())!;
  const place = [box.x + x * box.width, box.y + y * box.height] as const;
  await (act === 'click' ? page.mouse.click(...place) : page.mouse.move(...place));
}

export async function rename(page: Page, name: string): Promise<void> {
  await page.getByLabel('Name of the study').fill(name);
  await page.keyboard.press('Enter');
}

export async function saveAs(page: Page, name: string): Promise<void> {
  await page.keyboard.press('Control+Shift+s');
  await page.getByRole('textbox', { name: 'Name', exact: true }).fill(name);
  await page.getByRole('dialog').getByRole('button', { name: 'Save' }).click();
}

export async function choose(page: Page, menu: string, item: RegExp): Promise<void> {
  await page.getByRole('button', { name: menu, exact: true }).click();
  await page.getByRole('menuitem', { name: item }).click();
}

/** A dialog that stands open, as a selector. */
export const DIALOG = '.dialog[open]';
/** A menu that stands open. */
export const MENU = '[role=menu]:popover-open';
