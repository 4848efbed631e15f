import { defineConfig } from 'vite';

// Relative addresses, so that the bundle works under the local host's token path and under the desktop's own scheme.
export default defineConfig({
  base: './',
  build: {
    outDir: '../build/window',
    emptyOutDir: true,
    target: 'es2022',
    assetsInlineLimit: 0,
    sourcemap: false,
    modulePreload: { polyfill: false },
    rolldownOptions: { input: ['index.html', 'picture.html'] },
  },
  worker: { format: 'es' },
});
