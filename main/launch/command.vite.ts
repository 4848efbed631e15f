import { defineConfig } from 'vite';

// One file for Node with every package inside, so that a start reads one file.
export default defineConfig({
  build: {
    ssr: '../command/conewright.ts',
    outDir: '../../build/command',
    emptyOutDir: true,
    target: 'node20',
    sourcemap: false,
    minify: false,
    rolldownOptions: { output: { entryFileNames: 'conewright.js' } },
  },
  ssr: { noExternal: true },
});
