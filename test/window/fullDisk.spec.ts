import { existsSync, readdirSync, readFileSync, rmSync, writeFileSync } from 'node:fs';
import { join } from 'node:path';
import { mountSmallDisk } from '../hosts/smallDisk.ts';
import { downloaded, expect, ready, test } from './window.ts';

test('a real disk that is full, or can only be read: told on saving, nothing lost, a copy can be had', async ({
  desk,
}) => {
  const disk = mountSmallDisk(join(desk.folder, 'disk'));
  // Reason: a real full disk needs a mount, which only root may make; test/hosts/atomicSave.test.ts plays one for others.
  test.skip(disk === null, 'not run: only root on Linux can mount a disk for this; test/hosts plays one');
  try {
    const page = await desk.open({ folder: disk!.folder });
    await ready(page);
    const rename = async (name: string) => {
      await page.getByLabel('Name of the study').fill(name);
      await page.keyboard.press('Enter');
    };
    const study = join(disk!.folder, 'deep.study.json');
    const savedName = () => (existsSync(study) ? JSON.parse(readFileSync(study, 'utf8')).name : null);
    await rename('deep');
    await page.keyboard.press('Control+s');
    await page.getByRole('dialog').getByRole('button', { name: 'Save' }).click();
    await expect.poll(savedName).toBe('deep');

    const filler = join(disk!.folder, 'filler');
    expect(() => writeFileSync(filler, new Uint8Array(400_000))).toThrow(/ENOSPC/);
    await rename('deeper');
    await page.keyboard.press('Control+s');
    await expect(
      page.getByText(/deep\.study\.json could not be saved: .* is full; free some space/),
    ).toBeVisible();
    await expect(page.getByText('not saved', { exact: true })).toBeVisible();
    await expect(page.locator('tr[data-shell]').first()).toBeVisible();
    expect(savedName()).toBe('deep');
    const copy = await downloaded(page, () => page.getByRole('button', { name: 'Download a copy' }).click());
    expect(copy.name).toBe('deeper.study.json');
    expect(JSON.parse(copy.text).name).toBe('deeper');
    await expect(page.getByText('not saved', { exact: true })).toBeVisible();

    rmSync(filler);
    await page.keyboard.press('Control+s');
    await expect.poll(savedName).toBe('deeper');
    await expect(page.getByText('not saved', { exact: true })).toHaveCount(0);

    disk!.readOnly();
    await rename('deepest');
    await page.keyboard.press('Control+s');
    await expect(page.getByText(/can only be read; choose another folder/)).toBeVisible();
    await expect(page.getByLabel('Name of the study')).toHaveValue('deepest');
    expect(savedName()).toBe('deeper');
    expect(readdirSync(disk!.folder)).toEqual(['deep.study.json']);
  } finally {
    disk?.remove();
  }
});
