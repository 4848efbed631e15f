import { build, defineConfig, type Plugin } from 'vite';

const external = ['electron'];

// A sandboxed preload script must be one CommonJS file; the main process is a module. One bundle cannot be both.
function preloadBeside(): Plugin {
  let outDir = '';
  return {
    name: 'preload script beside the main process',
    configResolved(config) {
      outDir = config.build.outDir;
    },
    async closeBundle() {
      await build({
        configFile: false,
        root: import.meta.dirname,
        logLevel: 'warn',
        build: {
          ssr: 'preload.ts',
          outDir,
          emptyOutDir: false,
          target: 'node22',
          minify: false,
          rolldownOptions: { external, output: { format: 'cjs', entryFileNames: 'preload.cjs' } },
        },
        ssr: { noExternal: true },
      });
    },
  };
}

export default defineConfig({
  root: import.meta.dirname,
  plugins: [preloadBeside()],
  build: {
    ssr: 'main.ts',
    outDir: '../../build/desktop',
    emptyOutDir: true,
    target: 'node22',
    minify: false,
    rolldownOptions: { external, output: { format: 'es', entryFileNames: 'main.js' } },
  },
  ssr: { noExternal: true, external },
});
