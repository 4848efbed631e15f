import { prepareFields } from '../geometry/preparedField.ts';
import { indexer } from '../points/colouring.ts';
import { type PickIndex, pickIndex } from '../points/pickIndex.ts';
import { PointStore } from '../points/pointStore.ts';
import { runSliced } from '../points/slices.ts';
import { sharedMemory } from '../points/software/sharedMemory.ts';
import type { ConeResults, ConeTask, FromConeWorker, ToConeWorker } from './messages.ts';
import { storeSteps } from './storeSteps.ts';

const sharedWords = (length: number) => new Uint32Array(new SharedArrayBuffer(4 * length));

const running = new Map<number, AbortController>();

function* steps(task: ConeTask): Generator<void, ConeResults[keyof ConeResults]> {
  switch (task.kind) {
    case 'fields':
      return prepareFields(task.footprint);
    case 'store': {
      let memory: WebAssembly.Memory | null = null;
      const store = yield* storeSteps(task.basis, {
        base: task.base,
        allocate: (layout) => {
          memory = sharedMemory(layout.end);
          return memory.buffer;
        },
        rows: sharedWords,
      });
      const { count, ranges, layout, rows } = store;
      return { parts: { count, ranges, layout, rows }, memory: memory! };
    }
    case 'colours': {
      const { colouring, shells, table } = task.basis;
      const store = new PointStore(task.parts, task.buffer);
      return yield* store.colour(indexer(colouring, shells, table));
    }
    case 'index': {
      const { ranges, arrays } = new PointStore(task.parts, task.buffer);
      const made: PickIndex[] = [];
      for (const range of ranges) made.push(yield* pickIndex(arrays, range, sharedWords));
      return made;
    }
  }
}

const answer = (message: FromConeWorker): void => postMessage(message);

addEventListener('message', ({ data }: MessageEvent<ToConeWorker>) => {
  const { id, task } = data;
  if (task === null) {
    running.get(id)?.abort();
    return;
  }
  const job = new AbortController();
  running.set(id, job);
  runSliced(steps(task), job.signal)
    .then(
      (result) => answer({ id, result }),
      (error: unknown) => answer({ id, failed: String(error) }),
    )
    .finally(() => running.delete(id));
});
