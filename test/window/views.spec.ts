import { writeFileSync } from 'node:fs';
import { join } from 'node:path';
import type { Page } from '@playwright/test';
import { accessible, expect, ready, test } from './window.ts';

/** Both themes and both sizes; the other two combinations are looked at by eye. */
const LOOKS = [
  { theme: 'dark', size: { width: 1280, height: 800 } },
  { theme: 'light', size: { width: 2560, height: 1440 } },
] as const;

/** Nothing on the page is wider than the page, and no control lies under another. */
async function tidy(page: Page): Promise<void> {
  const overflow = await page.evaluate(() => ({
    wide: document.documentElement.scrollWidth - document.documentElement.clientWidth,
    high: document.documentElement.scrollHeight - document.documentElement.clientHeight,
  }));
  expect(overflow).toEqual({ wide: 0, high: 0 });
}

for (const { theme, size } of LOOKS)
  test(`every view, ${theme}, ${size.width} by ${size.height}`, async ({ desk }, info) => {
    const page = await desk.open({ theme, size });
    await ready(page);
    const shot = (name: string) => page.screenshot({ path: info.outputPath(`${name}.png`) });
    await tidy(page);
    await accessible(page);
    await shot('start');
    // Each view of the cone by its key, then the readings of the radius.
    for (const key of ['2', '3', '4', '5', '6', '1']) {
      await page.keyboard.press(key);
      await page.waitForTimeout(650);
      await shot(`view ${key}`);
    }
    for (const reading of ['redshift', 'lookback', 'comoving']) {
      await page.keyboard.press('r');
      await page.waitForTimeout(650);
      await shot(reading);
    }
    // A shell, its sheet, an explanation, the whole ledger.
    await page.keyboard.press(']');
    await expect(page.locator('tr[data-shell="0"]')).toHaveAttribute('aria-selected', 'true');
    await page.locator('.sheet button[data-quantity="effectiveVolumeMpc3"]').click();
    await expect(page.getByText(/Tegmark 1997/).first()).toBeVisible();
    await shot('explanation');
    await page.keyboard.press('?');
    await expect(page.getByRole('dialog')).toBeVisible();
    await page.keyboard.press('Escape');
    await tidy(page);
  });

test('empty, a plan alone, twelve rows, one row, all at one redshift', async ({ desk }) => {
  const page = await desk.open();
  await ready(page);
  await page.keyboard.press('Control+n');
  await expect(page.getByText(/No catalogue is open/)).toBeVisible();
  await accessible(page);
  await tidy(page);

  // A plan: a region and shells, no galaxies; volumes are there, and N is not known.
  await page.getByRole('button', { name: /Add a shape/ }).click();
  await page.getByRole('menuitem', { name: /^Cap/ }).click();
  await page.getByLabel('centre RA').fill('180');
  await page.getByLabel('centre Dec').fill('0');
  await page.getByLabel('radius', { exact: true }).fill('10');
  await page.getByRole('button', { name: 'Add', exact: true }).click();
  await page.getByRole('button', { name: /^volume: shells of equal/ }).click();
  await expect(page.locator('tr[data-shell="0"] [data-quantity=count]')).toHaveText('-');
  await expect(page.locator('tr[data-shell="0"] [data-quantity=volumeMpc3]')).toHaveText(/\d/);
  await tidy(page);

  const open = async (name: string, rows: readonly string[]) => {
    const path = join(desk.folder, name);
    writeFileSync(path, `ra,dec,z\n${rows.join('\n')}\n`);
    const fresh = await desk.open({ files: [path] });
    await expect(fresh.locator('.engine-line')).toHaveText(`${rows.length} kept · 0 set aside`);
    await tidy(fresh);
    return fresh;
  };
  await open(
    'twelve.csv',
    Array.from({ length: 12 }, (_, i) => `${150 + i / 4},${2 + (i % 5) / 3},${0.3 + i / 20}`),
  );
  await open('one.csv', ['150,2,0.5']);
  const same = await open('same.csv', ['150,2,0.5', '151,2,0.5', '152,2,0.5']);
  await same.getByRole('button', { name: /^volume: shells of equal/ }).click();
  await expect(same.getByText(/All galaxies have the same redshift 0\.5/)).toBeVisible();
});
