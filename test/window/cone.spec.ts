import type { Page } from '@playwright/test';
import { serveCone } from './coneServer.ts';
import { expect, ready, test } from './window.ts';

/** Counts the WebGL contexts that the page itself makes; runs before anything of it. */
function countContexts(): void {
  const made: string[] = [];
  Object.assign(globalThis, { contexts: made });
  const original = HTMLCanvasElement.prototype.getContext as (kind: string, ...more: unknown[]) => unknown;
  HTMLCanvasElement.prototype.getContext = function (
    this: HTMLCanvasElement,
    kind: string,
    ...more: unknown[]
  ) {
    made.push(kind);
    return original.call(this, kind, ...more);
  } as typeof HTMLCanvasElement.prototype.getContext;
}

const contexts = (page: Page) =>
  page.evaluate(() => (globalThis as unknown as { contexts: string[] }).contexts);

test('without a GPU the page makes no WebGL context, not for a whole sky either', async ({ desk }) => {
  const page = await desk.open({ init: countContexts });
  await ready(page);
  await page.getByRole('button', { name: /Add a shape/ }).click();
  await page.getByRole('menuitem', { name: /^Whole sky/ }).click();
  await page.getByRole('button', { name: 'Add', exact: true }).click();
  await expect(page.getByText(/41.?25\d/).first()).toBeVisible();
  await ready(page);
  await page.keyboard.press('4');
  await page.waitForTimeout(800);
  const made = await contexts(page);
  expect(made).toContain('2d');
  expect(made.filter((kind) => kind !== '2d')).toEqual([]);
  await expect(page.locator('.stage-notice')).toHaveCount(0);
});

interface Harness {
  readonly log: { readonly layer: string; readonly drawn: number }[];
  readonly cone: { drawingState(): { readonly webgl: string }; orbitBy(x: number, y: number): void };
}

test('WebGL by choice: it draws, its loss is told and drawn around, and it is taken up again', async ({
  chrome,
}) => {
  const server = await serveCone();
  const page = await chrome.newPage({ viewport: { width: 900, height: 600 } });
  try {
    await page.goto(`${server.address}?n=5000&layer=webgl&view=whole`);
    const drawnBy = () =>
      page.evaluate(() => {
        const { log, cone } = globalThis as unknown as Harness;
        cone.orbitBy(2, 0);
        const last = log.at(-1);
        return last && last.drawn > 0 ? `${cone.drawingState().webgl}, ${last.layer}` : '';
      });
    await expect.poll(drawnBy).toBe('ready, webgl');
    await page.evaluate(() => {
      const canvas = [...document.querySelectorAll('canvas')].find((one) => one.getContext('webgl2'))!;
      const extension = canvas.getContext('webgl2')!.getExtension('WEBGL_lose_context')!;
      Object.assign(globalThis, { extension });
      extension.loseContext();
    });
    await expect.poll(drawnBy).toBe('lost, software');
    await page.evaluate(() => {
      (globalThis as unknown as { extension: WEBGL_lose_context }).extension.restoreContext();
    });
    await expect.poll(drawnBy).toBe('ready, webgl');
  } finally {
    await page.close();
    await server.close();
  }
});
