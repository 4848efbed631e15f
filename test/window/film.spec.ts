import { readdirSync, readFileSync } from 'node:fs';
import { join } from 'node:path';
import { at, readBoxes, readEbml, tagsOf } from '../engine/picture/film/containers.ts';
import { conewright } from './command.ts';
import { differing, seenFilm } from './filmSeen.ts';
import { smallStudy } from './smallStudy.ts';
import { accessible, expect, ready, test } from './window.ts';

const TINY = ['--size', '320x192', '--seconds', '0.8', '--fps', '10'];
/** The middle of a frame of a tenth of a second. */
const middleOf = (frame: number): number => (frame + 0.5) / 10;

test('a film by command plays, has its frames, times and study, and is the same again', async ({
  chrome,
  desk,
}) => {
  test.setTimeout(240_000);
  const { folder } = desk;
  const study = smallStudy(folder);
  const read = (name: string) => readFileSync(join(folder, name));
  await conewright(folder, 'picture', study, '-o', 'a.webm', '--film', 'shell-by-shell', ...TINY);
  await conewright(folder, 'picture', study, '-o', 'b.webm', '--film', 'shell-by-shell', ...TINY);
  const parts = readEbml(read('a.webm'));
  expect(at(parts, '18538067', '1f43b675', 'a3')).toHaveLength(8);
  expect(tagsOf(parts).STUDY).toMatch(/^study sha256:[0-9a-f]{64}$/);
  expect(tagsOf(parts).TITLE).toBe('Three fields');
  // Not in their order: the player must find them without an index.
  const times = [6, 1, 3, 0].map(middleOf);
  const a = await seenFilm(chrome, read('a.webm'), 'video/webm', times);
  expect(a).toMatchObject({ width: 320, height: 192 });
  // To the millisecond of the file's clock.
  expect(a.seconds).toBeCloseTo(0.8, 2);
  const [sixth, first, third, start] = a.pictures;
  for (const [one, other] of [
    [sixth, first],
    [first, third],
    [third, start],
  ])
    expect(differing(one!, other!)).toBeGreaterThan(50);
  const b = await seenFilm(chrome, read('b.webm'), 'video/webm', times);
  expect(b.pictures).toEqual(a.pictures);
  await expect(
    conewright(folder, 'picture', study, '-o', 'a.webm', '--film', 'turntable', ...TINY),
  ).rejects.toThrow(/exists already/);
});

test('a film as MP4 where the browser can encode it, else a sentence and no file', async ({
  chrome,
  desk,
}) => {
  test.setTimeout(240_000);
  const { folder } = desk;
  const study = smallStudy(folder);
  const refused = await conewright(
    folder,
    'picture',
    study,
    '-o',
    'turn.mp4',
    '--film',
    'turntable',
    ...TINY,
  ).then(
    () => null,
    (error: unknown) => String(error),
  );
  if (refused !== null) {
    // A Chromium built without H.264.
    expect(refused).toMatch(/cannot encode H\.264 .* choose WebM/);
    expect(readdirSync(folder).filter((name) => name.includes('turn'))).toEqual([]);
    // Reason: what follows decodes an MP4, which this browser cannot make; the refusal above was tested.
    test.skip(true, 'not run beyond the refusal: this Chromium encodes no H.264');
    return;
  }
  const bytes = readFileSync(join(folder, 'turn.mp4'));
  const list = at(readBoxes(bytes), 'moov', 'udta', 'meta', 'ilst')[0]!;
  expect(Buffer.from(list.content).toString('utf8')).toMatch(/study sha256:[0-9a-f]{64}/);
  const seen = await seenFilm(chrome, bytes, 'video/mp4', [middleOf(4), middleOf(0)]);
  expect(seen).toMatchObject({ width: 320, height: 192 });
  expect(seen.seconds).toBeCloseTo(0.8, 3);
  expect(differing(seen.pictures[0]!, seen.pictures[1]!)).toBeGreaterThan(50);
});

test('a film from the bench: any moment is seen, it is written whole, and a cancel leaves nothing', async ({
  chrome,
  desk,
}) => {
  test.setTimeout(240_000);
  const page = await desk.open({ theme: 'light', files: [smallStudy(desk.folder)] });
  await ready(page);
  await page.keyboard.press('p');
  const bench = page.getByRole('dialog', { name: 'Picture' });
  await bench.getByText('Film', { exact: true }).click();
  await bench.getByLabel('Kind').selectOption('shell-by-shell');
  await bench.getByLabel('Size', { exact: true }).selectOption('own');
  await bench.getByLabel('Width').fill('321');
  await bench.getByLabel('Height').fill('192');
  await expect(bench.getByText(/films need even sides, such as 322/).first()).toBeVisible();
  await expect(bench.getByRole('button', { name: 'Export WebM' })).toBeDisabled();
  await bench.getByLabel('Width').fill('320');
  await bench.getByLabel('Length').fill('0.6');
  await bench.getByLabel('Frames').fill('5');
  const facts = bench.locator('.bench-facts');
  await expect(facts).toHaveText(/^320 × 192 pixels · 3 frames · takes .* · 0\.\d GB of memory$/, {
    timeout: 60_000,
  });
  // By the keyboard to the last moment: another picture.
  const picture = bench.locator('.bench-pane img');
  const first = await picture.getAttribute('src');
  const moment = bench.getByRole('slider', { name: 'Moment' });
  await expect(moment).toHaveAttribute('aria-valuetext', '0.0 of 0.6 s');
  await moment.focus();
  await page.keyboard.press('ArrowRight');
  await expect(moment).toHaveAttribute('aria-valuetext', '0.2 of 0.6 s');
  await expect(picture).not.toHaveAttribute('src', first!);
  await expect(facts).not.toHaveText(/drawing/, { timeout: 60_000 });
  await accessible(page);
  const [download] = await Promise.all([
    page.waitForEvent('download'),
    bench.getByRole('button', { name: 'Export WebM' }).click(),
  ]);
  expect(download.suggestedFilename()).toMatch(/shell-by-shell\.webm$/);
  const seen = await seenFilm(chrome, readFileSync(await download.path()), 'video/webm', [0.3, 0.1]);
  expect(seen).toMatchObject({ width: 320, height: 192 });
  expect(seen.seconds).toBeCloseTo(0.6, 2);
  expect(differing(seen.pictures[0]!, seen.pictures[1]!)).toBeGreaterThan(50);

  await bench.getByLabel('Size', { exact: true }).selectOption('4k');
  await bench.getByLabel('Length').fill('60');
  await expect(facts).toHaveText(/300 frames/);
  await bench.getByRole('button', { name: 'Export WebM' }).click();
  await expect(bench.getByRole('progressbar', { name: 'Writing WEBM' })).toBeVisible();
  await bench.getByRole('button', { name: 'Cancel' }).click();
  await expect(bench.getByText('The export was cancelled; no file was written.')).toBeVisible({
    timeout: 60_000,
  });
});
