import type { PointFrame, PointLayer } from '../pointLayer.ts';
import type { PointStore } from '../pointStore.ts';
import type { Run } from './messages.ts';
import type { SplatPicture, SplatPool } from './splatPool.ts';

/** A step of a large picture takes about so long, so that input is answered in between. */
const STEP_MS = 22;
/** First guesses of one worker's milliseconds for a million points; measured from the first picture on. */
const FIRST_COST = { pixel: 14, disc: 60 };

/**
 * Points without a GPU: workers sum light into buffers, and a table turns it into colours. The old picture stays until
 * the new one is whole.
 */
export class SoftwarePoints implements PointLayer {
  readonly kind = 'software';
  /** The finished picture of the points, ground included. */
  image: ImageData = new ImageData(1, 1);
  private readonly pool: SplatPool;
  private store: PointStore | null = null;
  private ready: Promise<void> = Promise.resolve();
  private readonly cost = { ...FIRST_COST };

  constructor(pool: SplatPool) {
    this.pool = pool;
  }

  setStore(store: PointStore | null): void {
    this.store = store;
    if (store) this.wait(this.pool.setStore(store, true));
  }

  valuesChanged(): void {
    this.resend('value');
  }

  radiiChanged(): void {
    this.resend('radius');
  }

  /** Points that can be drawn in so many milliseconds. */
  affordable(milliseconds: number, frame: PointFrame): number {
    return (1e6 * milliseconds * this.pool.size) / this.cost[this.costOf(frame)];
  }

  /**
   * Draws the picture into `image`.
   *
   * @param stop asked between the steps of a large picture: true gives it up and leaves the old one standing
   * @returns whether the image is the picture asked for
   */
  async draw(frame: PointFrame, stop: () => boolean): Promise<boolean> {
    const width = Math.max(1, Math.round(frame.viewport.widthPx * frame.pixelRatio));
    const height = Math.max(1, Math.round(frame.viewport.heightPx * frame.pixelRatio));
    const points = frame.parts.reduce((sum, part) => sum + part.range.count, 0) * frame.fraction;
    if (points === 0) {
      this.blank(width, height, frame);
      return true;
    }
    // New workers wait for their points: the old picture stands.
    const { store } = this;
    if (!store) return false;
    await this.ready;
    // Other points meanwhile: the frame counts the slots of those before, and a new one has been asked for.
    if (this.store !== store) return false;
    const picture: SplatPicture = {
      width,
      height,
      diameter: frame.sizePx * frame.pixelRatio,
      emphasis: frame.emphasis
        ? [frame.emphasis.min, frame.emphasis.max, frame.emphasis.dim]
        : [0, Number.MAX_VALUE, 1],
    };
    const steps = Math.max(1, Math.ceil(points / this.affordable(STEP_MS, frame)));
    const image = this.imageOf(width, height);
    let spent = 0;
    for (let step = 0; step < steps; step++) {
      const last = step === steps - 1;
      const runs = runsOf(frame, step / steps, (step + 1) / steps);
      spent += await this.pool.draw(runs, picture, step === 0, last ? { tone: frame.tone, image } : null);
      if (!last && stop()) return false;
    }
    this.learn(frame, points, spent);
    this.image = image;
    return true;
  }

  dispose(): void {
    this.store = null;
  }

  private blank(width: number, height: number, { tone }: PointFrame): void {
    const [r, g, b] = tone.background;
    this.image = this.imageOf(width, height);
    new Uint32Array(this.image.data.buffer).fill((0xff000000 | (b << 16) | (g << 8) | r) >>> 0);
  }

  private imageOf(width: number, height: number): ImageData {
    const { image } = this;
    return image.width === width && image.height === height ? image : new ImageData(width, height);
  }

  private resend(name: 'value' | 'radius'): void {
    const { store } = this;
    if (!store || this.pool.shared) return;
    this.wait(this.ready.then(() => this.pool.send(store, [name])));
  }

  /** A failure is met by the next picture, which waits for it. */
  private wait(work: Promise<void>): void {
    this.ready = work;
    work.catch(() => undefined);
  }

  private costOf(frame: PointFrame): keyof typeof FIRST_COST {
    return frame.sizePx * frame.pixelRatio <= 1.5 ? 'pixel' : 'disc';
  }

  private learn(frame: PointFrame, points: number, milliseconds: number): void {
    // Small pictures say little about the cost of a point.
    if (points < 20_000) return;
    const which = this.costOf(frame);
    const measured = (1e6 * milliseconds) / points;
    this.cost[which] += 0.3 * (Math.min(measured, 4 * this.cost[which]) - this.cost[which]);
  }
}

/** The part of every range between two shares of what is drawn, in device pixels. */
function runsOf(frame: PointFrame, from: number, to: number): Run[] {
  const ratio = frame.pixelRatio;
  return frame.parts.map(({ matrix, range, depth }) => {
    const drawn = Math.ceil(range.count * frame.fraction);
    const cut = (share: number): number => range.start + 4 * Math.round(Math.ceil(drawn / 4) * share);
    const device = Float32Array.from(matrix, (v, i) => (i < 8 ? v * ratio : v));
    return {
      from: cut(from),
      to: cut(to),
      matrix: device,
      light: drawn > 0 ? range.count / drawn : 0,
      depth: depth && Float32Array.from(depth.row),
      least: depth?.least ?? 1,
    };
  });
}
