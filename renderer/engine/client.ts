import type { Preview } from '../../shared-core/catalogue/preview.ts';
import type { Region } from '../../shared-core/sky/region.ts';
import type {
  EngineAnswer,
  EngineEvent,
  EngineRequest,
  EngineSource,
  GalaxyRow,
  Wanted,
} from './protocol.ts';

/** The page's end of the engine. A worker that dies is told once and replaced at the next wish. */
export class EngineClient {
  readonly #onEvent: (event: EngineEvent) => void;
  readonly #onDeath: (sentence: string) => void;
  readonly #makeWorker: () => Worker;
  #worker: Worker | null = null;
  #asked = 0;
  readonly #waiting = new Map<number, { resolve: (value: never) => void; reject: (error: Error) => void }>();

  constructor(options: {
    onEvent: (event: EngineEvent) => void;
    onDeath: (sentence: string) => void;
    makeWorker?: () => Worker;
  }) {
    this.#onEvent = options.onEvent;
    this.#onDeath = options.onDeath;
    this.#makeWorker =
      options.makeWorker ??
      (() => new Worker(new URL('./engine.worker.ts', import.meta.url), { type: 'module' }));
  }

  /** `serial` comes back with the idle event that follows. */
  want(wanted: Wanted, serial: number): void {
    this.#send({ kind: 'want', serial, wanted });
  }

  row(index: number): Promise<GalaxyRow> {
    return this.#ask<GalaxyRow>((id) => ({ kind: 'row', id, index }));
  }

  /** What the name column says in the row at a line; null for nothing. */
  name(line: number): Promise<string | null> {
    return this.#ask<string | null>((id) => ({ kind: 'name', id, line }));
  }

  preview(source: EngineSource): Promise<Preview> {
    return this.#ask<Preview>((id) => ({ kind: 'preview', id, source }));
  }

  /** Why one of the regions cannot be; null when each can. */
  checkRegions(regions: readonly Region[]): Promise<string | null> {
    return this.#ask<string | null>((id) => ({ kind: 'checkRegions', id, regions }));
  }

  setAsideList(): Promise<Blob> {
    return this.#ask<Blob>((id) => ({ kind: 'setAsideList', id }));
  }

  repeatsList(): Promise<Blob> {
    return this.#ask<Blob>((id) => ({ kind: 'repeatsList', id }));
  }

  /** Ends the worker; the next wish starts a new one, which does all its stages again. */
  stop(): void {
    this.#worker?.terminate();
    this.#worker = null;
    const why = 'The part of Conewright that reads catalogues was stopped before it answered: ask again.';
    for (const { reject } of this.#waiting.values()) reject(new Error(why));
    this.#waiting.clear();
  }

  #send(request: EngineRequest): void {
    this.#worker ??= this.#start();
    this.#worker.postMessage(request);
  }

  #ask<T>(request: (id: number) => EngineRequest): Promise<T> {
    const id = ++this.#asked;
    return new Promise<T>((resolve, reject) => {
      this.#waiting.set(id, { resolve: resolve as (value: never) => void, reject });
      this.#send(request(id));
    });
  }

  #start(): Worker {
    const worker = this.#makeWorker();
    worker.onmessage = ({ data }: MessageEvent<EngineEvent | EngineAnswer>) => {
      if (data.kind !== 'answer' && data.kind !== 'refused') {
        this.#onEvent(data);
        return;
      }
      const waiting = this.#waiting.get(data.id);
      this.#waiting.delete(data.id);
      if (data.kind === 'answer') waiting?.resolve(data.value as never);
      else waiting?.reject(new Error(data.sentence));
    };
    worker.onerror = (event) => {
      event.preventDefault?.();
      this.stop();
      this.#onDeath(
        `The part of Conewright that reads catalogues stopped (${event.message || 'out of memory'}). Your study is kept: press "Read again".`,
      );
    };
    return worker;
  }
}
