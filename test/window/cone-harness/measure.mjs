import { chromium } from '@playwright/test';

// Frames while orbiting: node measure.mjs QUERY [WIDTHxHEIGHT] [FRAMES]
const [query, size = '1280x800', frames = '60'] = process.argv.slice(2);
const [width = 1280, height = 800] = size.split('x').map(Number);
const browser = await chromium.launch({
  executablePath: process.env.CHROME_PATH ?? '/usr/bin/chromium',
  args: [
    '--no-sandbox',
    '--use-angle=swiftshader',
    '--enable-unsafe-swiftshader',
    '--ignore-gpu-blocklist',
    '--disable-background-networking',
    '--disable-component-update',
    '--disable-sync',
    '--no-first-run',
  ],
});
const page = await browser.newPage({ viewport: { width, height } });
page.on('pageerror', (error) => console.log('PAGE ERROR', error.stack));
await page.goto(`http://localhost:${process.env.PORT ?? 5199}/?${query}`);
await page.waitForFunction(() => document.documentElement.dataset.rest === 'yes', null, {
  timeout: 300000,
});
await page.waitForTimeout(500);
console.log(JSON.stringify(await page.evaluate(`measure(${Number(frames)})`)));
await browser.close();
