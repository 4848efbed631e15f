import { createServer } from 'vite';

// A server for looking at the cone alone: node test/window/cone-harness/serve.mjs [port].
const port = Number(process.argv[2] ?? 5199);
const headers =
  process.env.CONE_PLAIN === '1'
    ? {}
    : { 'Cross-Origin-Opener-Policy': 'same-origin', 'Cross-Origin-Embedder-Policy': 'require-corp' };
const server = await createServer({
  root: new URL('.', import.meta.url).pathname,
  configFile: false,
  logLevel: 'error',
  cacheDir: new URL('../../../node_modules/.vite-cone-harness', import.meta.url).pathname,
  server: { port, strictPort: true, headers, hmr: false, watch: null, fs: { allow: ['../../..'] } },
  worker: { format: 'es' },
});
await server.listen();
