/**
 * Asks a worker, which ends at once, whether a GPU stands behind WebGL; false where it cannot be told: without a GPU
 * all is drawn as well, only slower.
 */
export function findGpu(signal: AbortSignal): Promise<boolean> {
  return new Promise((resolve) => {
    let worker: Worker;
    try {
      worker = new Worker(new URL('./probeWorker.ts', import.meta.url), { type: 'module' });
    } catch {
      resolve(false);
      return;
    }
    const end = (found: boolean) => {
      worker.terminate();
      resolve(found);
    };
    worker.onmessage = (event: MessageEvent<boolean>) => end(event.data);
    worker.onerror = (event) => {
      event.preventDefault();
      end(false);
    };
    signal.addEventListener('abort', () => end(false));
  });
}
