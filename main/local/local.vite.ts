import { defineConfig } from 'vite';

// One file for Node with every package inside: what npm start needs to find a host and to run the local one.
export default defineConfig({
  root: import.meta.dirname,
  build: {
    ssr: 'entry.ts',
    outDir: '../../build/local',
    emptyOutDir: true,
    target: 'node20',
    sourcemap: false,
    minify: false,
    rolldownOptions: { output: { entryFileNames: 'local.js' } },
  },
  ssr: { noExternal: true },
});
