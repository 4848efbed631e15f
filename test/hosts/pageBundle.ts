import { fileURLToPath } from 'node:url';
import { build } from 'vite';

/** Builds the test's page as the window is built: files beside each other, addressed relatively. */
export async function buildTestPage(outDir: string): Promise<void> {
  await build({
    configFile: false,
    root: fileURLToPath(new URL('./page', import.meta.url)),
    base: './',
    logLevel: 'error',
    build: { outDir, emptyOutDir: true, modulePreload: { polyfill: false } },
    worker: { format: 'es' },
  });
}
