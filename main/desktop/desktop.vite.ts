import { build, defineConfig, type InlineConfig } from 'vite';

const outDir = '../../build/desktop';

// A sandboxed preload script must be one CommonJS file; the main process is a module. One bundle cannot be both.
const preload: InlineConfig = {
  configFile: false,
  root: import.meta.dirname,
  logLevel: 'warn',
  build: {
    ssr: 'preload.ts',
    outDir,
    emptyOutDir: false,
    target: 'node22',
    minify: false,
    rolldownOptions: {
      external: ['electron'],
      output: { format: 'cjs', entryFileNames: 'preload.cjs' },
    },
  },
  ssr: { noExternal: true },
};

export default defineConfig({
  root: import.meta.dirname,
  plugins: [
    {
      name: 'preload beside the main process',
      async closeBundle() {
        await build(preload);
      },
    },
  ],
  build: {
    ssr: 'main.ts',
    outDir,
    emptyOutDir: true,
    target: 'node22',
    minify: false,
    rolldownOptions: { external: ['electron'], output: { format: 'es', entryFileNames: 'main.js' } },
  },
  ssr: { noExternal: true, external: ['electron'] },
});
