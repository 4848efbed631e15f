import type { PointLayout } from '../pointArrays.ts';
import type { PointStore } from '../pointStore.ts';
import { nextTask } from '../slices.ts';
import type { Tone } from '../tone.ts';
import { BARRIER_AT, MOST_WORKERS, type Run, SCRATCH_AT } from './messages.ts';
import { PAGE_BYTES, sharedMemory } from './sharedMemory.ts';
import { sumsLength } from './splat.ts';
import { SplatHands } from './splatHands.ts';
import { SCRATCH_BYTES } from './wideKernel.ts';

/** So many single points are one worker's work: more hands would only bring more sums to add. */
const WORK_OF_ONE = 300_000;
/** Slots sent at once to a worker with its own memory. */
const SENT_AT_ONCE = 262144;

export interface SplatPicture {
  readonly width: number;
  readonly height: number;
  readonly diameter: number;
  readonly emphasis: readonly [min: number, max: number, dim: number];
}

/** Workers that splat, tone and pick. One picture at a time; picks may come in between. */
export class SplatPool {
  /** Whether page and workers share memory. */
  readonly shared: boolean;
  private readonly hands: SplatHands;
  private readonly memories = new WeakMap<ArrayBufferLike, WebAssembly.Memory>();
  private memory: WebAssembly.Memory | null = null;
  private layout: PointLayout | null = null;
  private tone: Tone | null = null;
  /** Workers whose sums hold the picture. */
  private used = 1;
  /** Whether all sums are zero, and for which size. */
  private clean = false;
  private cleanSize = '';
  /** Kernel in use, known once the points are there. */
  wide = false;

  /** @param failed told once, when workers end or cannot go on */
  constructor(failed: (reason: string) => void) {
    this.shared = globalThis.crossOriginIsolated === true;
    const cores = navigator.hardwareConcurrency || 2;
    const count = this.shared ? Math.max(1, Math.min(MOST_WORKERS, cores)) : 1;
    this.hands = new SplatHands(count, failed);
  }

  /** Hands for a large picture. */
  get size(): number {
    return this.hands.count;
  }

  /** Memory for a store: shared with the workers where that is allowed. */
  allocate(layout: PointLayout): ArrayBufferLike {
    if (!this.shared) return new ArrayBuffer(layout.end);
    const memory = sharedMemory(layout.end);
    this.adopt(memory);
    return memory.buffer;
  }

  /** Takes shared memory made elsewhere, so that a store in it can be set; false where the workers share none. */
  adopt(memory: WebAssembly.Memory): boolean {
    this.memories.set(memory.buffer, memory);
    return this.shared;
  }

  /** Tells the workers of a store whose memory came from `allocate`. */
  async setStore(store: PointStore, wide: boolean): Promise<void> {
    this.layout = store.layout;
    this.clean = false;
    this.tone = null;
    const memory = this.memories.get(store.arrays.x.buffer);
    this.memory = memory ?? null;
    if (memory) {
      const answers = await this.hands.askEach(this.size, (i) => ({
        kind: 'shared',
        memory,
        layout: store.layout,
        scratchAt: SCRATCH_AT + i * Math.ceil(SCRATCH_BYTES / 64) * 64,
        wide,
      }));
      this.wide = answers.every((m) => m.kind === 'done' && m.wide === true);
      return;
    }
    const answer = await this.hands.ask(0, { kind: 'own', slots: store.layout.slots, wide });
    this.wide = answer.kind === 'done' && answer.wide === true;
    await this.send(store, ['x', 'y', 'z', 'radius', 'value']);
  }

  /** Changed arrays of the store; with shared memory the workers see them anyway. */
  async send(store: PointStore, names: readonly ('x' | 'y' | 'z' | 'radius' | 'value')[]): Promise<void> {
    if (this.memory) return;
    for (let at = 0; at < store.layout.slots; at += SENT_AT_ONCE) {
      const part = Object.fromEntries(
        names.map((name) => [name, store.arrays[name].slice(at, at + SENT_AT_ONCE)]),
      );
      const transfer = Object.values(part).map((array) => array.buffer as ArrayBuffer);
      await this.hands.ask(0, { kind: 'fill', at, ...part }, transfer);
      await nextTask();
    }
  }

  /**
   * Adds runs to the sums; every worker takes its share of each run, but a small picture is the work of one. With the
   * last runs of a picture the sums become an image. Answers the milliseconds of splatting by all of them together.
   *
   * @param fresh begins a new picture
   */
  async draw(
    runs: readonly Run[],
    picture: SplatPicture,
    fresh: boolean,
    finish: { readonly tone: Tone; readonly image: ImageData } | null,
  ): Promise<number> {
    const { width, height } = picture;
    const { sumsAt, imageAt } = this.room(picture);
    const all = this.size;
    if (fresh) {
      const points = runs.reduce((sum, run) => sum + run.to - run.from, 0);
      this.used = points * (picture.diameter > 1.5 ? 4 : 1) < WORK_OF_ONE ? 1 : all;
    }
    // Toning leaves the sums at zero; they are cleared only where a picture was given up or has another size.
    const clear = fresh && !this.clean;
    this.clean = false;
    // The table is made anew only when the tone changed.
    const tone = finish && finish.tone !== this.tone ? finish.tone : null;
    if (tone) this.tone = tone;
    if (this.memory) Atomics.store(new Int32Array(this.memory.buffer, BARRIER_AT, 1), 0, 0);
    const answers = await this.hands.askEach(clear || finish ? all : this.used, (i) => ({
      kind: 'draw',
      ...picture,
      runs: i < this.used ? share(runs, i, this.used) : [],
      clear,
      sumsAt: sumsAt[i]!,
      finish: finish && {
        rows: [Math.floor((height * i) / all), Math.floor((height * (i + 1)) / all)],
        allSumsAt: sumsAt.slice(0, this.used),
        imageAt,
        hands: all,
        tone: i === 0 ? tone : null,
      },
    }));
    if (finish) {
      this.clean = true;
      this.cleanSize = `${width} ${height}`;
      const first = answers[0]!;
      // ImageData takes no shared memory: one copy is needed.
      if (first.kind === 'image') finish.image.data.set(new Uint8Array(first.image.buffer));
      else if (this.memory)
        finish.image.data.set(new Uint8Array(this.memory.buffer, imageAt, 4 * width * height));
    }
    return answers.reduce((sum, m) => sum + ('milliseconds' in m ? (m.milliseconds ?? 0) : 0), 0);
  }

  /** The slot drawn nearest to a pixel, searched by all workers. */
  async pick(runs: readonly Run[], xPx: number, yPx: number, reachPx: number) {
    const answers = await this.hands.askEach(this.size, (i) => ({
      kind: 'pick',
      runs: share(runs, i, this.size),
      xPx,
      yPx,
      reachPx,
    }));
    const hits = answers.flatMap((m) => (m.kind === 'hit' && m.hit ? [m.hit] : []));
    hits.sort((a, b) => a.distance2 - b.distance2);
    return hits[0] ?? null;
  }

  dispose(): void {
    this.hands.dispose();
  }

  /** Where sums and picture stand behind the points; the memory grows when they need more. */
  private room({ width, height }: SplatPicture): { sumsAt: number[]; imageAt: number } {
    if (this.cleanSize !== `${width} ${height}`) this.clean = false;
    const bytes = Math.ceil((4 * sumsLength(width, height)) / 64) * 64;
    if (!this.memory || !this.layout) return { sumsAt: [0], imageAt: 0 };
    const sumsAt = Array.from({ length: this.size }, (_, i) => this.layout!.end + i * bytes);
    const imageAt = this.layout.end + this.size * bytes;
    const missing = imageAt + 4 * width * height - this.memory.buffer.byteLength;
    if (missing > 0) this.memory.grow(Math.ceil(missing / PAGE_BYTES));
    return { sumsAt, imageAt };
  }
}

/** Part i of n of each run, cut at groups of four. */
function share(runs: readonly Run[], i: number, n: number): Run[] {
  return runs.map((run) => {
    const groups = Math.ceil((run.to - run.from) / 4);
    return {
      ...run,
      from: run.from + 4 * Math.floor((groups * i) / n),
      to: run.from + 4 * Math.floor((groups * (i + 1)) / n),
    };
  });
}
