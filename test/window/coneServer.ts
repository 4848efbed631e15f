import { fileURLToPath } from 'node:url';
import { createServer } from 'vite';

/** Serves the cone alone (cone-harness), with shared memory allowed as in the program. */
export async function serveCone(): Promise<{ readonly address: string; close(): Promise<void> }> {
  const server = await createServer({
    configFile: false,
    root: fileURLToPath(new URL('./cone-harness/', import.meta.url)),
    logLevel: 'error',
    server: {
      host: '127.0.0.1',
      port: 0,
      ws: false,
      headers: {
        'Cross-Origin-Opener-Policy': 'same-origin',
        'Cross-Origin-Embedder-Policy': 'require-corp',
      },
      fs: { allow: [fileURLToPath(new URL('../..', import.meta.url))] },
    },
    worker: { format: 'es' },
  });
  await server.listen();
  return { address: server.resolvedUrls?.local[0] ?? '', close: () => server.close() };
}
