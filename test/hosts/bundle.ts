import { join } from 'node:path';
import { fileURLToPath } from 'node:url';
import { build } from 'vite';

const top = fileURLToPath(new URL('../..', import.meta.url));

/** Bundles one of the project's modules for a plain Node process; answers the bundle's path. */
export async function bundleForNode(entry: string, outFolder: string): Promise<string> {
  await build({
    configFile: false,
    root: top,
    logLevel: 'error',
    build: {
      ssr: join(top, entry),
      outDir: outFolder,
      emptyOutDir: false,
      minify: false,
      rolldownOptions: { output: { entryFileNames: 'bundle.mjs' } },
    },
    ssr: { noExternal: true },
  });
  return join(outFolder, 'bundle.mjs');
}
