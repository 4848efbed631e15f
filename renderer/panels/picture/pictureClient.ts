import { Cancelled } from '../../../shared-core/base/cancelled.ts';
import { Refusal } from '../../../shared-core/base/refusal.ts';
import type { FilmOptions } from '../../../shared-core/picture/film.ts';
import type { DrawnFormat } from '../../../shared-core/picture/job.ts';
import type { PictureOptions } from '../../../shared-core/picture/options.ts';
import type { PictureFacts } from '../../picture/numbers.ts';
import type { BenchAnswer, BenchRequest, FilmMoment, PicturePreview } from './benchMessages.ts';

const DIED =
  'The part of Conewright that draws pictures stopped, most likely for want of memory: choose a smaller size, or close other programs, and try again.';

/** The page's end of the picture worker. One that dies is replaced at the next wish. */
export class PictureClient {
  readonly #makeWorker: () => Worker;
  #worker: Worker | null = null;
  #facts: Omit<PictureFacts, 'fingerprint'> | null = null;
  #asked = 0;
  readonly #listeners = new Map<number, (answer: BenchAnswer) => void>();

  constructor(makeWorker?: () => Worker) {
    this.#makeWorker =
      makeWorker ?? (() => new Worker(new URL('./picture.worker.ts', import.meta.url), { type: 'module' }));
  }

  /** What the pictures are made from. */
  setFacts(facts: Omit<PictureFacts, 'fingerprint'>): void {
    this.#facts = facts;
    this.#worker?.postMessage({ kind: 'facts', facts } satisfies BenchRequest);
  }

  /** @returns null when a newer wish overtook this one. @throws Refusal */
  async preview(
    options: PictureOptions,
    moment: FilmMoment | null,
    room: readonly [number, number],
  ): Promise<PicturePreview | null> {
    const id = ++this.#asked;
    const answer = await new Promise<BenchAnswer>((resolve) => {
      this.#listeners.set(id, resolve);
      this.#send({ kind: 'preview', id, options, moment, room });
    });
    this.#listeners.delete(id);
    if (answer.kind === 'refused') throw new Refusal(answer.sentence);
    return answer.kind === 'preview' ? answer.preview : null;
  }

  /**
   * A picture's file in pieces; the next is made when the one before has been taken.
   * @throws Refusal; Cancelled once the signal is up
   */
  async *pieces(
    format: DrawnFormat,
    options: PictureOptions,
    film: FilmOptions | null,
    { signal, onProgress }: { signal: AbortSignal; onProgress: (fraction: number) => void },
  ): AsyncGenerator<Uint8Array<ArrayBuffer>, void, undefined> {
    if (signal.aborted) throw new Cancelled();
    const id = ++this.#asked;
    const waiting: BenchAnswer[] = [];
    let wake = (): void => undefined;
    this.#listeners.set(id, (answer) => {
      if (answer.kind === 'progress') onProgress(answer.fraction);
      else {
        waiting.push(answer);
        wake();
      }
    });
    const cancel = (): void => this.#send({ kind: 'cancel', id });
    signal.addEventListener('abort', cancel);
    let ended = false;
    try {
      this.#send({ kind: 'export', id, format, options, film });
      for (;;) {
        if (waiting.length === 0)
          await new Promise<void>((resolve) => {
            wake = resolve;
          });
        const answer = waiting.shift();
        if (answer?.kind === 'piece') {
          yield answer.bytes;
          this.#send({ kind: 'more', id });
          continue;
        }
        ended = true;
        if (answer?.kind === 'refused') throw new Refusal(answer.sentence);
        if (answer?.kind !== 'done' || signal.aborted) throw new Cancelled();
        return;
      }
    } finally {
      signal.removeEventListener('abort', cancel);
      this.#listeners.delete(id);
      if (!ended && this.#worker !== null) cancel();
    }
  }

  /** Ends the worker; what is waited for ends as cancelled. */
  stop(): void {
    this.#end((id) => ({ kind: 'cancelled', id }));
  }

  #end(last: (id: number) => BenchAnswer): void {
    this.#worker?.terminate();
    this.#worker = null;
    for (const [id, listen] of [...this.#listeners]) listen(last(id));
  }

  #send(request: BenchRequest): void {
    if (this.#worker === null) {
      this.#worker = this.#makeWorker();
      this.#worker.onmessage = ({ data }: MessageEvent<BenchAnswer>) => this.#listeners.get(data.id)?.(data);
      this.#worker.onerror = (event) => {
        event.preventDefault?.();
        this.#end((id) => ({ kind: 'refused', id, sentence: DIED }));
      };
      if (this.#facts !== null)
        this.#worker.postMessage({ kind: 'facts', facts: this.#facts } satisfies BenchRequest);
    }
    this.#worker.postMessage(request);
  }
}
