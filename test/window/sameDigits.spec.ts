import { fileURLToPath } from 'node:url';
import { runInThisContext } from 'node:vm';
import { build } from 'vite';
import { expect, test } from './window.ts';

/** The core's numbers as a plain script that leaves them in `coreNumbers`: of this test only, not of the product. */
async function plainScript(): Promise<string> {
  const built = await build({
    configFile: false,
    logLevel: 'error',
    build: {
      write: false,
      minify: false,
      lib: {
        entry: fileURLToPath(new URL('./sameDigits/numbers.ts', import.meta.url)),
        formats: ['iife'],
        name: 'coreNumbers',
      },
    },
  });
  const outputs = (Array.isArray(built) ? built : [built]).flatMap((b) => ('output' in b ? b.output : []));
  return outputs.map((part) => (part.type === 'chunk' ? part.code : '')).join('\n');
}

test('browser and Node agree to the last digit', async ({ chrome }) => {
  const script = await plainScript();
  const page = await chrome.newPage();
  await page.addScriptTag({ content: script });
  const here = JSON.parse(runInThisContext(`${script};coreNumbers.numbers()`));
  const there = JSON.parse(await page.evaluate<string>('coreNumbers.numbers()'));
  expect(here.ledgers.length).toBeGreaterThan(2);
  expect(there).toEqual(here);
});
