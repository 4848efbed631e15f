import type { Page } from '@playwright/test';
import type { ConeView } from '../../renderer/cone/coneView.ts';
import type { FrameStatistics, GalaxyInput } from '../../renderer/cone/types.ts';
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

/** Notes what the page asks of its workers; runs before anything of it. */
function noteTasks(): void {
  const asked: string[] = [];
  Object.assign(globalThis, { asked });
  const original = Worker.prototype.postMessage as (message: unknown, ...more: unknown[]) => void;
  Worker.prototype.postMessage = function (this: Worker, message: unknown, ...more: unknown[]) {
    const { task } = message as { task?: { kind?: string } | null };
    if (task?.kind !== undefined) asked.push(task.kind);
    return original.call(this, message, ...more);
  } as typeof Worker.prototype.postMessage;
}

test('region, galaxies and colours are made ready in a worker', async ({ desk }) => {
  const page = await desk.open({ init: noteTasks });
  await ready(page);
  const asked = () => page.evaluate(() => (globalThis as unknown as { asked: string[] }).asked);
  await expect.poll(asked).toContain('store');
  expect(await asked()).toContain('fields');
  await page.locator('.stage-colour select').selectOption('shell');
  await expect.poll(asked).toContain('colours');
});

test('a region that changes while galaxies are drawn and sorted: the newest wins, nothing throws', async ({
  chrome,
}) => {
  const server = await serveCone();
  const page = await chrome.newPage({ viewport: { width: 900, height: 600 } });
  const errors: string[] = [];
  page.on('pageerror', (error) => errors.push(String(error)));
  try {
    await page.goto(`${server.address}?n=300000`);
    await page.waitForFunction(() => document.documentElement.dataset.rest === 'yes');
    await page.evaluate(async () => {
      const { cone, galaxies } = globalThis as unknown as Harness;
      const box = (raDeg: number) => ({
        centreRaDeg: raDeg,
        centreDecDeg: 4,
        radiusDeg: 3,
        positionAngleDeg: 90,
        rings: [
          {
            raDeg: Float64Array.of(raDeg - 2, raDeg + 2, raDeg + 2, raDeg - 2),
            decDeg: Float64Array.of(2, 2, 6, 6),
          },
        ],
      });
      for (const fields of [1, 3, 2, 4, 2]) {
        cone.setFootprint({
          fields: Array.from({ length: fields }, (_, i) => box(152 + 5 * i)),
          wide: false,
        });
        cone.setGalaxies(galaxies);
        for (let i = 0; i < 4; i++) {
          cone.orbitBy(3, 1);
          await new Promise(requestAnimationFrame);
        }
      }
    });
    const fields = () =>
      page.evaluate(() => {
        const { cone, log } = globalThis as unknown as Harness;
        return log.at(-1)?.atRest ? `${cone.state().fieldCount} fields, ${log.at(-1)!.total} galaxies` : '';
      });
    await expect.poll(fields).toBe('2 fields, 300000 galaxies');
    expect(errors).toEqual([]);
  } finally {
    await page.close();
    await server.close();
  }
});

interface Harness {
  readonly log: readonly FrameStatistics[];
  readonly cone: ConeView;
  readonly galaxies: GalaxyInput;
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

test('WebGL that cannot be had is told with its reason, and drawn around', async ({ chrome }) => {
  const server = await serveCone();
  const page = await chrome.newPage({ viewport: { width: 900, height: 600 } });
  const reason = () =>
    page.evaluate(() => {
      const { log, cone } = globalThis as unknown as Harness;
      const state = cone.drawingState();
      cone.orbitBy(2, 0);
      return state.webgl === 'absent' ? `${state.reason}, ${log.at(-1)?.layer}` : '';
    });
  try {
    await page.route(/gpuLayers/, (route) => route.abort());
    await page.goto(`${server.address}?n=5000&layer=webgl&view=whole`);
    await expect
      .poll(reason)
      .toBe('the part of Conewright that draws them could not be loaded; they are drawn flat, software');
    await page.unroute(/gpuLayers/);
    await page.addInitScript(() => {
      const own = HTMLCanvasElement.prototype.getContext as (kind: string, ...more: unknown[]) => unknown;
      HTMLCanvasElement.prototype.getContext = function (
        this: HTMLCanvasElement,
        kind: string,
        ...more: unknown[]
      ) {
        return kind === '2d' ? own.call(this, kind, ...more) : null;
      } as typeof HTMLCanvasElement.prototype.getContext;
    });
    await page.reload();
    await expect.poll(reason).toBe('this machine offers no WebGL; they are drawn flat, software');
  } finally {
    await page.close();
    await server.close();
  }
});
