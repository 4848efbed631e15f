import { copyFileSync, readdirSync, readFileSync, writeFileSync } from 'node:fs';
import { join } from 'node:path';
import { fileURLToPath } from 'node:url';
import type { Browser } from '@playwright/test';
import { build, preview } from 'vite';
import { PICTURE_VIEWS } from '../../shared-core/picture/options.ts';
import { emptyStudy, writeStudy } from '../../shared-core/study/document.ts';
import { mountSmallDisk } from '../hosts/smallDisk.ts';
import { conewright, conewrightIn } from './command.ts';
import { SHAPLEY } from './files.ts';
import { expect, test } from './window.ts';

/** A study of the Shapley galaxies with its catalogue beside it; answers the study's name. */
function shapleyStudy(folder: string): string {
  copyFileSync(SHAPLEY, join(folder, 'shapley.csv'));
  const study = {
    ...emptyStudy('Shapley'),
    source: { kind: 'file', name: 'shapley.csv', path: null, sizeBytes: 0, sha256: null } as const,
    mapping: {
      ra: 'RA',
      dec: 'Dec',
      radial: { column: 'V', kind: 'czKmS' } as const,
      weight: null,
      magnitude: 'Mag',
      id: null,
    },
    edges: [0.02, 0.04, 0.06, 0.09],
  };
  writeFileSync(join(folder, 'shapley.study.json'), writeStudy(study));
  return 'shapley.study.json';
}

/** What a browser sees in a picture's file. */
async function looked(chrome: Browser, bytes: Buffer, type: string) {
  const page = await chrome.newPage();
  const seen = await page.evaluate(
    async (address) => {
      const image = new Image();
      image.src = address;
      await image.decode();
      const canvas = new OffscreenCanvas(image.width, image.height);
      const context = canvas.getContext('2d')!;
      context.drawImage(image, 0, 0);
      const { data } = context.getImageData(0, 0, image.width, image.height);
      let coloured = 0;
      let clear = 0;
      for (let i = 0; i < data.length; i += 4) {
        const [r, g, b] = [data[i]!, data[i + 1]!, data[i + 2]!];
        if (data[i + 3] === 0) clear++;
        else if (Math.max(r, g, b) - Math.min(r, g, b) > 40) coloured++;
      }
      return { width: image.width, height: image.height, coloured, clear };
    },
    `data:${type};base64,${bytes.toString('base64')}`,
  );
  await page.close();
  return seen;
}

test('pictures by command are the same to the last byte, and keep what stands under their name', async ({
  chrome,
  desk,
}) => {
  const { folder } = desk;
  const study = shapleyStudy(folder);
  const read = (name: string) => readFileSync(join(folder, name));
  await conewright(folder, 'picture', study, '-o', 'cone.png', '--size', '1600x1000');
  await conewright(folder, 'picture', study, '-o', 'again.png', '--size', '1600x1000');
  expect(read('cone.png').equals(read('again.png'))).toBe(true);
  const dark = await looked(chrome, read('cone.png'), 'image/png');
  expect(dark).toMatchObject({ width: 1600, height: 1000, clear: 0 });
  expect(dark.coloured).toBeGreaterThan(3000);
  expect(read('cone.png').includes('study sha256:')).toBe(true);
  await expect(conewright(folder, 'picture', study, '-o', 'cone.png', '--size', '300x200')).rejects.toThrow(
    /exists already/,
  );
  expect((await looked(chrome, read('cone.png'), 'image/png')).width).toBe(1600);
});

test('pictures as SVG and PDF and with a clear ground; what a format cannot hold is said, and leaves no file', async ({
  chrome,
  desk,
}) => {
  const { folder } = desk;
  const study = shapleyStudy(folder);
  const read = (name: string) => readFileSync(join(folder, name));
  const wedge = ['--view', 'wedge', '--style', 'paper', '--size', '800x500', '--dpi', '96'];
  await conewright(
    folder,
    'picture',
    study,
    '-o',
    'wedge.svg',
    ...wedge,
    '--label',
    '201,-31,0.05,צביר גדול',
  );
  expect((await looked(chrome, read('wedge.svg'), 'image/svg+xml')).coloured).toBeGreaterThan(500);
  expect(read('wedge.svg').toString('utf8')).toContain('צביר גדול');
  const clear = ['--view', 'sky', '--transparent', '--size', '640x640'];
  await conewright(folder, 'picture', study, '-o', 'sky.png', ...clear);
  expect((await looked(chrome, read('sky.png'), 'image/png')).clear).toBeGreaterThan(100_000);
  await conewright(folder, 'picture', study, '-o', 'light.pdf', '--view', 'light-cone', '--size', 'a4');
  expect(read('light.pdf').toString('latin1')).toMatch(/^%PDF-1\.7[\s\S]*%%EOF\n$/);
  await expect(
    conewright(folder, 'picture', study, '-o', 'no.pdf', '--size', '300x200', '--title', 'סקר'),
  ).rejects.toThrow(/choose PNG or SVG/);
  expect(readdirSync(folder).filter((name) => name === 'no.pdf' || name.startsWith('.'))).toEqual([]);
});

test('lines and text have no seam between bands, and are as wide as the layout counted', async ({
  chrome,
  desk,
}) => {
  const outDir = join(desk.folder, 'harness');
  await build({
    configFile: false,
    root: fileURLToPath(new URL('./picture-harness', import.meta.url)),
    base: './',
    logLevel: 'error',
    build: { outDir, emptyOutDir: true, modulePreload: { polyfill: false } },
  });
  const server = await preview({
    configFile: false,
    root: desk.folder,
    build: { outDir },
    preview: { port: 0, host: '127.0.0.1' },
  });
  const page = await chrome.newPage();
  await page.goto(server.resolvedUrls!.local[0]!);
  await page.waitForFunction(() => window.picture !== undefined);
  for (const view of PICTURE_VIEWS) {
    for (const [rows, count] of [
      [9, 50],
      [37, 13],
    ] as const) {
      const found = await page.evaluate(([name, pixels]) => window.picture.compared(name, pixels), [
        view,
        700 * rows,
      ] as const);
      expect(found).toMatchObject({ bands: [1, count], bytes: [1_260_000, 1_260_000] });
      // The browser steps along a slanted edge in fixed point from where what is drawn begins: a few of 255; a line or
      // letter cut or shifted at a border would differ by most of the range.
      expect(found.most).toBeLessThan(10);
    }
  }
  for (const weight of [400, 700]) {
    const ratio = await page.evaluate(
      (w) => window.picture.widthRatio('Comoving distance, 0.123 Gyr', w),
      weight,
    );
    // Kerning, which the layout leaves out, takes a few thousandths.
    expect(ratio).toBeGreaterThan(0.98);
    expect(ratio).toBeLessThan(1.01);
  }
  await page.close();
  await server.close();
});

test('any column colours a picture by command; one that is not there, or holds no number, is refused', async ({
  desk,
}) => {
  const { folder } = desk;
  const study = shapleyStudy(folder);
  const by = (colour: string, name: string) =>
    conewright(folder, 'picture', study, '-o', name, '--size', '640x400', '--colour', colour);
  await by('column:V', 'v.svg');
  const svg = readFileSync(join(folder, 'v.svg'), 'utf8');
  expect(svg).toMatch(/>V<\/text>/);
  expect(svg).toMatch(/Colour shows V, from \d+ to \d+\./);
  await expect(by('column:Vmag', 'no.svg')).rejects.toThrow(/Vmag/);
  await expect(by('brightness', 'no.svg')).rejects.toThrow(/"brightness", expected redshift/);
  expect(readdirSync(folder)).not.toContain('no.svg');
});

test('a disk that fills in the middle of a picture is told, and no half file stands there', async ({
  desk,
}) => {
  const disk = mountSmallDisk(join(desk.folder, 'disk'));
  // Reason: a real full disk needs a mount, which only root may make.
  test.skip(disk === null, 'not run: only root on Linux can mount a disk for this');
  try {
    const wishes = ['picture', 'demo', '-o', 'disk/cone.png', '--size', '2400x1600'];
    await expect(conewright(desk.folder, ...wishes)).rejects.toThrow(/is full/);
    expect(readdirSync(disk!.folder)).toEqual([]);
  } finally {
    disk?.remove();
  }
});

test('a machine without a browser is told what to install', async ({ desk }) => {
  const none = { PATH: '', CHROME_PATH: '' };
  await expect(
    conewrightIn(desk.folder, none, 'picture', 'demo', '-o', 'cone.png', '--size', '400x300'),
  ).rejects.toThrow(/No Chromium, Chrome or Edge was found/);
  expect(readdirSync(desk.folder).filter((name) => name.endsWith('.png'))).toEqual([]);
});
