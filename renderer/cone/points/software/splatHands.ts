import type { FromWorker, ToWorker } from './messages.ts';

/** Longer than any honest step takes. */
const LONGEST_ANSWER_MS = 15_000;

type Unsent<M = ToWorker> = M extends { id: number } ? Omit<M, 'id'> : never;

/** Workers that are asked and answer. When one fails all have: they are told of once, and asked nothing more. */
export class SplatHands {
  private readonly workers: Worker[] = [];
  private readonly waiting = new Map<
    number,
    { resolve: (m: FromWorker) => void; reject: (e: Error) => void }
  >();
  private readonly failed: (reason: string) => void;
  private nextId = 1;
  private ended = false;

  /** @throws where the host has no module workers */
  constructor(count: number, failed: (reason: string) => void) {
    this.failed = failed;
    for (let i = 0; i < count; i++) {
      const worker = new Worker(new URL('./splatWorker.ts', import.meta.url), { type: 'module' });
      worker.onmessage = (event: MessageEvent<FromWorker>) => this.receive(event.data);
      worker.onerror = (event) => this.fail(event.message || 'a drawing worker ended');
      this.workers.push(worker);
    }
  }

  get count(): number {
    return this.workers.length;
  }

  /** Asks one worker. @throws Error when the workers fail or are ended before it answers */
  ask(worker: number, message: Unsent, transfer: Transferable[] = []): Promise<FromWorker> {
    if (this.ended) return Promise.reject(new Error('the drawing workers were ended'));
    const id = this.nextId++;
    return new Promise((resolve, reject) => {
      // A worker that is ended for want of memory says nothing.
      const late = setTimeout(() => this.fail('a drawing worker does not answer'), LONGEST_ANSWER_MS);
      const settled = () => clearTimeout(late);
      this.waiting.set(id, {
        resolve: (m) => {
          settled();
          resolve(m);
        },
        reject: (e) => {
          settled();
          reject(e);
        },
      });
      this.workers[worker]!.postMessage({ ...message, id }, transfer);
    });
  }

  /** Asks the first so many at once. */
  askEach(count: number, message: (worker: number) => Unsent): Promise<FromWorker[]> {
    return Promise.all(Array.from({ length: count }, (_, worker) => this.ask(worker, message(worker))));
  }

  dispose(): void {
    this.ended = true;
    for (const worker of this.workers) worker.terminate();
    this.rejectAll('the drawing workers were ended');
  }

  private receive(message: FromWorker): void {
    const asked = this.waiting.get(message.id);
    this.waiting.delete(message.id);
    if (!asked) return;
    if (message.kind !== 'failed') {
      asked.resolve(message);
      return;
    }
    asked.reject(new Error(message.reason));
    this.fail(message.reason);
  }

  private fail(reason: string): void {
    if (this.ended) return;
    this.ended = true;
    this.rejectAll(reason);
    this.failed(reason);
  }

  private rejectAll(reason: string): void {
    for (const { reject } of this.waiting.values()) reject(new Error(reason));
    this.waiting.clear();
  }
}
