import { accessible, expect, ready, test } from './window.ts';

test('from one galaxy to another: a button, the next click, and a card that covers neither', async ({
  desk,
}) => {
  const page = await desk.open();
  await ready(page);
  // One field alone, as large as it fits.
  await page.keyboard.press('1');
  await page.waitForTimeout(600);
  const stage = (await page.locator('.stage-cone').boundingBox())!;
  const card = page.getByRole('region', { name: 'Galaxy pointed at' });
  const at = (x: number, y: number) => [stage.x + x * stage.width, stage.y + y * stage.height] as const;
  // In the dense near shells of the demo there is a galaxy within reach of any pixel.
  await page.mouse.click(...at(0.45, 0.46));
  const measure = card.getByRole('button', { name: 'Measure to another' });
  await measure.click();
  await page.keyboard.press('Escape');
  await expect(measure).toHaveAttribute('aria-pressed', 'false');
  await measure.click();
  await accessible(page, '.galaxy-card');
  await page.mouse.click(...at(0.6, 0.48));
  await expect(card.getByText('apart')).toBeVisible();
  // The shell was chosen by the first click, not by the one that measures.
  const box = (await card.boundingBox())!;
  for (const [x, y] of [at(0.45, 0.46), at(0.6, 0.48)])
    expect(x >= box.x && x <= box.x + box.width && y >= box.y && y <= box.y + box.height).toBe(false);
  // The view is moved until the first of them stands where the card is: at rest the card has made way.
  const [x, y] = [box.x + box.width / 2, box.y + box.height / 2];
  await page.mouse.move(...at(0.45, 0.46));
  await page.mouse.down({ button: 'right' });
  await page.mouse.move(x, y, { steps: 4 });
  await page.mouse.up({ button: 'right' });
  const covers = async () => {
    const now = (await card.boundingBox())!;
    return x >= now.x && x <= now.x + now.width && y >= now.y && y <= now.y + now.height;
  };
  await expect.poll(covers).toBe(false);
  // One line of small type.
  for (const value of await card.locator('dd').all())
    expect((await value.boundingBox())!.height).toBeLessThan(24);
  await page.getByRole('button', { name: 'Keys' }).click();
  await expect(page.getByRole('dialog').getByText('Shift+click')).toBeVisible();
});
