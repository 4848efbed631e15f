import type { PreparedField } from '../geometry/preparedField.ts';
import { indexer } from '../points/colouring.ts';
import type { PickIndex } from '../points/pickIndex.ts';
import { PointStore, type StoreMemory } from '../points/pointStore.ts';
import { runSliced } from '../points/slices.ts';
import type { FootprintInput } from '../types.ts';
import type {
  ColourBasis,
  ConeResults,
  ConeTask,
  FromConeWorker,
  StoreBasis,
  ToConeWorker,
} from './messages.ts';
import { storeSteps } from './storeSteps.ts';

/** Memory for stores made on the page, and for those made by the worker. */
export interface ConeMemory extends StoreMemory {
  /** Takes shared memory made by the worker; false where it cannot be used. */
  adopt(memory: WebAssembly.Memory): boolean;
}

/**
 * The heavy one-off work of the cone: in a worker where the galaxies are in shared memory, else on the page in slices,
 * so that the page answers meanwhile. Work that a signal gives up answers null.
 */
export class ConeWork {
  private worker: Worker | null = null;
  private ended = false;
  private nextId = 1;
  private readonly waiting = new Map<number, { resolve: (m: unknown) => void; reject: (e: Error) => void }>();

  async fields(footprint: FootprintInput): Promise<readonly PreparedField[]> {
    const task = { kind: 'fields', footprint } as const;
    const fields = await this.ask<'fields'>(task, null).catch(() => null);
    if (fields) return fields;
    const { prepareFields } = await import('../geometry/preparedField.ts');
    return prepareFields(footprint);
  }

  async store(basis: StoreBasis, memory: ConeMemory, signal: AbortSignal): Promise<PointStore | null> {
    if (isShared(basis)) {
      const task = { kind: 'store', basis, base: memory.base } as const;
      const made = await this.ask<'store'>(task, signal).catch(() => null);
      if (signal.aborted) return null;
      if (made && memory.adopt(made.memory)) return new PointStore(made.parts, made.memory.buffer);
    }
    return runSliced(storeSteps(basis, memory), signal);
  }

  async colours(store: PointStore, basis: ColourBasis, signal: AbortSignal): Promise<true | null> {
    const { buffer } = store.arrays.value;
    const { colouring } = basis;
    const values = colouring.kind !== 'values' || inSharedMemory(colouring.values);
    if (!(buffer instanceof ArrayBuffer) && inSharedMemory(store.rows) && values) {
      const { count, ranges, layout, rows } = store;
      const task = { kind: 'colours', parts: { count, ranges, layout, rows }, buffer, basis } as const;
      const done = await this.ask<'colours'>(task, signal).catch(() => null);
      if (done || signal.aborted) return done;
    }
    return runSliced(store.colour(indexer(colouring, basis.shells, basis.table)), signal);
  }

  /** An index of each field for pointing, where a worker can make it; null where not. */
  async index(store: PointStore, signal: AbortSignal): Promise<readonly PickIndex[] | null> {
    const { buffer } = store.arrays.x;
    if (buffer instanceof ArrayBuffer) return null;
    const { count, ranges, layout } = store;
    // Its rows are not asked for.
    const rows = new Uint32Array(0);
    const task = { kind: 'index', parts: { count, ranges, layout, rows }, buffer } as const;
    return this.ask<'index'>(task, signal).catch(() => null);
  }

  dispose(): void {
    this.ended = true;
    this.stop();
  }

  private ask<K extends ConeTask['kind']>(
    task: Extract<ConeTask, { kind: K }>,
    signal: AbortSignal | null,
  ): Promise<ConeResults[K] | null> {
    const id = this.nextId++;
    return new Promise((resolve, reject) => {
      if (this.ended || signal?.aborted) {
        resolve(null);
        return;
      }
      this.waiting.set(id, { resolve: resolve as (m: unknown) => void, reject });
      this.post({ id, task });
      signal?.addEventListener('abort', () => this.worker?.postMessage({ id, task: null }), { once: true });
    });
  }

  private post(message: ToConeWorker): void {
    try {
      this.worker ??= this.start();
      this.worker.postMessage(message);
    } catch (error) {
      this.receive({ id: message.id, failed: String(error) });
    }
  }

  private start(): Worker {
    const worker = new Worker(new URL('./coneWorker.ts', import.meta.url), { type: 'module' });
    worker.onmessage = (event: MessageEvent<FromConeWorker>) => this.receive(event.data);
    worker.onerror = (event) => {
      event.preventDefault();
      this.stop();
    };
    return worker;
  }

  private receive(message: FromConeWorker): void {
    const asked = this.waiting.get(message.id);
    this.waiting.delete(message.id);
    if ('failed' in message) asked?.reject(new Error(message.failed));
    else asked?.resolve(message.result);
  }

  /** The next task starts another worker; what this one had is done on the page. */
  private stop(): void {
    this.worker?.terminate();
    this.worker = null;
    for (const { reject } of this.waiting.values()) reject(new Error("the cone's worker ended"));
    this.waiting.clear();
  }
}

const inSharedMemory = ({ buffer }: { readonly buffer: ArrayBufferLike }): boolean =>
  typeof SharedArrayBuffer !== 'undefined' && buffer instanceof SharedArrayBuffer;

/** Whether a worker can read all of it without a copy. */
function isShared({ galaxies, colouring }: StoreBasis): boolean {
  const arrays = [galaxies.comovingMpc, ...Object.values(galaxies.directions)];
  if (colouring.kind === 'values') arrays.push(colouring.values);
  return arrays.every(inSharedMemory);
}
