import type { Locator, Page } from '@playwright/test';
import { type Desk, expect, test, type WindowOptions } from '../window.ts';

/** Something that a person can have before them. */
export interface View {
  readonly name: string;
  /** The parts of the window that are judged here, as a selector: what was judged in a view before need not be again. */
  readonly within: string;
  /** From the view before; not given where the window opens on it. */
  readonly reach?: (page: Page) => Promise<unknown>;
  /** What must be visible once it is reached. */
  readonly shows: (page: Page) => Locator;
  /** Back to where the next view sets out. */
  readonly leave?: (page: Page) => Promise<unknown>;
}

/** Views that are reached one after another in one window. */
export interface Walk {
  readonly name: string;
  /** Opens the window, with its catalogue read where it has one. */
  readonly open: (desk: Desk, look: WindowOptions) => Promise<Page>;
  readonly views: readonly View[];
}

/** Goes the whole walk and hands each view over once it stands, with nothing of the page outside of the window. */
export async function goThrough(
  walk: Walk,
  desk: Desk,
  look: WindowOptions,
  see: (page: Page, view: View, number: number) => Promise<void>,
): Promise<void> {
  const page = await walk.open(desk, look);
  for (const [i, view] of walk.views.entries())
    await test.step(view.name, async () => {
      await view.reach?.(page);
      await expect(view.shows(page)).toBeVisible();
      expect(await overhang(page)).toEqual({ wide: 0, high: 0 });
      await see(page, view, i + 1);
      await view.leave?.(page);
    });
}

/** How much larger than the window the page is. */
const overhang = (page: Page) =>
  page.evaluate(() => ({
    wide: document.documentElement.scrollWidth - document.documentElement.clientWidth,
    high: document.documentElement.scrollHeight - document.documentElement.clientHeight,
  }));

/** Acts in the theme that a view is shown in and then in the other, in which it stays. */
export async function inBothThemes(page: Page, act: (theme: string) => Promise<void>): Promise<void> {
  const theme = () => page.locator('html').getAttribute('data-theme');
  const first = await theme();
  await act(String(first));
  // By script: under a dialog the button cannot be reached, and a click elsewhere would close a menu.
  await page.evaluate(() => document.querySelector<HTMLElement>('.head [aria-label$=" theme"]')!.click());
  await expect.poll(theme).not.toBe(first);
  await act(String(await theme()));
}
