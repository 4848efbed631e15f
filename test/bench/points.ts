import { chromium } from '@playwright/test';
import { findBrowser } from '../../main/launch/findBrowser.ts';
import { FLAGS } from '../window/chromiumFlags.ts';
import type { ConeSpeed } from '../window/cone-harness/measure.ts';
import { serveCone } from '../window/coneServer.ts';

/** Orbiting galaxies without a GPU at 1280 x 800: the cone's software layer against a plain three.js cloud. */
export async function bench() {
  const browserFile = findBrowser({
    platform: process.platform,
    env: process.env,
    homeFolder: process.env.HOME ?? '',
  });
  if (browserFile === null) return { name: 'Points without a GPU: no Chromium here, not measured', rows: [] };
  const server = await serveCone();
  const browser = await chromium.launch({ executablePath: browserFile.path, args: FLAGS });
  try {
    const rows: { what: string; seconds: number; ratio: number }[] = [];
    for (const [count, plainFrames, frames] of [
      [1_000_000, 8, 60],
      [10_000_000, 2, 40],
    ] as const) {
      const page = await browser.newPage({ viewport: { width: 1280, height: 800 } });
      await page.goto(`${server.address}?n=${count}`);
      await page.waitForFunction(() => document.documentElement.dataset.rest === 'yes', null, {
        timeout: 300_000,
      });
      const speed = (await page.evaluate(`measure(${frames})`)) as ConeSpeed;
      const plain = (await page.evaluate(`measurePlain(${count}, ${plainFrames})`)) as number;
      const points = `${count / 1e6} million`;
      const row = (what: string, seconds: number) => rows.push({ what, seconds, ratio: plain / seconds });
      row(`${points}: plain cloud, a frame`, plain);
      row(`${points}: cone while moving (${speed.drawnWhileMoving} drawn), a frame`, speed.frameSeconds);
      row(`${points}: from input to picture, median`, speed.answerSeconds);
      row(`${points}: until all stand after moving`, speed.restSeconds);
      row(`${points}: picking a galaxy, at once`, speed.pickSeconds);
      row(`${points}: picking a galaxy, with its index`, speed.pickLaterSeconds);
      row(`${points}: from input to picture, the worst`, speed.worstAnswerSeconds);
      await page.close();
    }
    return { name: 'Points without a GPU (ratio: plain cloud to this)', rows };
  } finally {
    await browser.close();
    await server.close();
  }
}
