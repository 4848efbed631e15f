import type { Page } from '@playwright/test';

/** Something a person does in the window, and how long what follows from it may take. */
export interface Act {
  readonly what: string;
  act(page: Page): Promise<void>;
  /** Waited after it, so that its tasks are its own. */
  readonly settleMs: number;
}

const kept = (page: Page, timeout: number) =>
  page.locator('.engine-line', { hasText: /kept · .* set aside/ }).waitFor({ timeout });

/** Waits for the galaxies of the study. */
export const ready = (page: Page) => kept(page, 300_000);

async function drag(page: Page, from: [number, number], by: [number, number], steps: number): Promise<void> {
  await page.mouse.move(...from);
  await page.mouse.down();
  for (let i = 1; i <= steps; i++) {
    await page.mouse.move(from[0] + (by[0] * i) / steps, from[1] + (by[1] * i) / steps);
    await page.waitForTimeout(16);
  }
  await page.mouse.up();
}

/** Opens a catalogue by the dialog, as a person does. */
export const opening = (path: string, rows: number): Act => ({
  what: `open ${rows / 1e6} million rows`,
  settleMs: 3000 + rows / 2000,
  act: async (page) => {
    const chooser = page.waitForEvent('filechooser');
    await page.getByRole('button', { name: /^Open (your catalogue|another)…/ }).click();
    await (await chooser).setFiles(path);
    await page.locator('.engine-line', { hasText: new RegExp(grouped(rows)) }).waitFor({ timeout: 300_000 });
  },
});

/** A count as the window writes it, whatever parts its thousands. */
const grouped = (count: number): string => String(count).replace(/\B(?=(\d{3})+$)/g, '\\D?');

/** What is done with a catalogue that is open. */
export function everydayActs(rows: number): Act[] {
  const settleMs = 1200 + rows / 4000;
  const key = (what: string, keys: readonly string[]): Act => ({
    what,
    settleMs,
    act: async (page) => {
      for (const one of keys) {
        await page.keyboard.press(one);
        await page.waitForTimeout(700);
      }
    },
  });
  return [
    {
      what: 'five shells of equal count',
      settleMs,
      act: async (page) => {
        const number = page.getByRole('textbox', { name: 'Number of shells' });
        await number.fill('5');
        await number.press('Enter');
        await page.getByRole('button', { name: /^count: shells of equal/ }).click();
      },
    },
    {
      what: 'drag an edge',
      settleMs,
      act: async (page) => {
        const box = (await page.getByRole('slider', { name: /^Edge 3 of/ }).boundingBox())!;
        await drag(page, [box.x + box.width / 2, box.y + box.height - 6], [40, 0], 30);
      },
    },
    {
      what: 'orbit',
      settleMs,
      act: async (page) => {
        const box = (await page.locator('.stage-cone').boundingBox())!;
        await drag(page, [box.x + box.width / 2, box.y + box.height / 2], [160, 60], 60);
      },
    },
    key('every view', ['2', '3', '4', '5', '1']),
    key('every reading of the radius', ['r', 'r', 'r']),
    key('units, there and back', ['h', 'h']),
    ...['lookback time', 'shell', 'magnitude', 'redshift'].map((colour) => ({
      what: `colour by ${colour}`,
      settleMs,
      act: async (page: Page) => {
        await page.locator('.stage-colour select').selectOption({ label: colour });
      },
    })),
    {
      what: 'another cosmology',
      settleMs,
      act: async (page) => {
        await open(page, /^Cosmology/);
        await page.getByLabel('published set').selectOption({ index: 1 });
        await page.waitForTimeout(300);
        await ready(page);
      },
    },
    {
      what: 'a cut',
      settleMs,
      act: async (page) => {
        await open(page, /^Cuts/);
        await page.getByRole('button', { name: 'Add a cut' }).click();
        const to = page.getByRole('listitem', { name: /^Cut 1/ }).getByLabel('to');
        await to.fill('23');
        await to.press('Enter');
        await page.waitForTimeout(300);
        await ready(page);
      },
    },
    {
      what: 'a region',
      settleMs,
      act: async (page) => {
        await open(page, /^Region/);
        await page.getByRole('button', { name: /Add a shape/ }).click();
        await page.getByRole('menuitem', { name: /^Cap/ }).click();
        await page.getByLabel('centre RA').fill('160');
        await page.getByLabel('centre Dec').fill('1');
        await page.getByLabel('radius', { exact: true }).fill('7');
        await page.getByRole('button', { name: 'Add', exact: true }).click();
        await page.waitForTimeout(300);
        await ready(page);
      },
    },
    {
      what: 'export the ledger',
      settleMs,
      act: async (page) => {
        const download = page.waitForEvent('download');
        await page.getByRole('button', { name: 'Export' }).click();
        await page.getByRole('menuitem', { name: /^JSON/ }).click();
        await download;
      },
    },
    {
      what: 'export a picture',
      settleMs,
      act: async (page) => {
        await page.keyboard.press('p');
        const bench = page.getByRole('dialog', { name: 'Picture' });
        await bench.locator('.bench-pane img').waitFor({ timeout: 120_000 });
        const download = page.waitForEvent('download', { timeout: 120_000 });
        await bench.getByRole('button', { name: 'Export PNG' }).click();
        await download;
        await page.keyboard.press('Escape');
      },
    },
    {
      what: 'the other theme',
      settleMs,
      act: async (page) => {
        await page.getByRole('button', { name: /^(Light|Dark) theme/ }).click();
      },
    },
  ];
}

/** Opens a section of the desk if it is closed. */
async function open(page: Page, name: RegExp): Promise<void> {
  const head = page.getByRole('button', { name, expanded: false });
  if ((await head.count()) > 0) await head.first().click();
}
