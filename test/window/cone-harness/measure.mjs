import { chromium } from '@playwright/test';

// Frames while orbiting: node measure.mjs QUERY [WIDTHxHEIGHT] [FRAMES]
const [query, size = '1280x800', frames = '60'] = process.argv.slice(2);
const [width, height] = size.split('x').map(Number);
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
await page.waitForFunction(() => window.cone && window.log.some((f) => f.total > 0 && f.atRest), null, {
  timeout: 300000,
});
await page.waitForTimeout(500);
console.log(
  JSON.stringify(
    await page.evaluate(async (count) => {
      const { cone, log } = window;
      const next = () => new Promise((resolve) => requestAnimationFrame(resolve));
      const frame = async (move) => {
        const before = log.length;
        move();
        while (log.length === before) await next();
      };
      for (let i = 0; i < 8; i++) await frame(() => cone.orbitBy(3, 1));
      const start = performance.now();
      const from = log.length;
      for (let i = 0; i < count; i++) await frame(() => cone.orbitBy(3, i < count / 2 ? 1 : -1));
      const ms = (performance.now() - start) / count;
      const moving = log.slice(from);
      const mean = (f) => moving.reduce((sum, x) => sum + f(x), 0) / moving.length;
      const restStart = performance.now();
      while (!log.at(-1).atRest) await next();
      const rest = performance.now() - restStart;
      const times = moving.map((f) => f.milliseconds).sort((a, b) => a - b);
      const pickStart = performance.now();
      for (let i = 0; i < 10; i++) await cone.galaxyAt(500 + 10 * i, 380);
      return {
        framesASecond: +(1000 / ms).toFixed(1),
        drawnWhileMoving: Math.round(mean((f) => f.drawn)),
        total: moving.at(-1).total,
        answerMs: { median: times[times.length >> 1], worst: times.at(-1) },
        restMs: Math.round(rest),
        pickMs: +((performance.now() - pickStart) / 10).toFixed(1),
        layer: moving.at(-1).layer,
      };
    }, Number(frames)),
  ),
);
await browser.close();
