import { chromium } from '@playwright/test';

// Pictures of the harness: node shoot.mjs OUT.png QUERY [WIDTHxHEIGHT] [SCRIPT]
const [out = 'cone.png', query = '', size = '1280x500', script] = process.argv.slice(2);
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
const page = await browser.newPage({
  viewport: { width, height },
  deviceScaleFactor: Number(process.env.DPR ?? 1),
});
page.on('console', (message) => console.log(message.text()));
page.on('pageerror', (error) => console.log('PAGE ERROR', error.stack));
await page.goto(`http://localhost:${process.env.PORT ?? 5199}/?${query}`);
await page.waitForFunction(() => document.documentElement.dataset.rest === 'yes', null, {
  timeout: 120000,
});
await page.waitForTimeout(900);
if (script) console.log(JSON.stringify(await page.evaluate(script)));
if (script) await page.waitForTimeout(900);
await page.screenshot({ path: out });
await browser.close();
