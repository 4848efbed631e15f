import { pickNear } from '../geometry/pickNear.ts';
import { type PointHit, pickPoint } from '../geometry/pickPoint.ts';
import type { Viewport } from '../geometry/projection.ts';
import type { GlStage } from '../graphics/glStage.ts';
import type { WebglPoints } from '../graphics/webglPoints.ts';
import type { ConeMemory, ConeWork } from '../jobs/coneWork.ts';
import { crowding, exposure, NOTHING, pointSizePx } from './exposure.ts';
import { Galaxies, type GalaxiesChange } from './galaxies.ts';
import { Pacing } from './pacing.ts';
import type { Emphasis, PointFrame, PointPart } from './pointLayer.ts';
import { RESERVED_BYTES } from './software/messages.ts';
import { SoftwarePoints } from './software/softwarePoints.ts';
import { SplatPool } from './software/splatPool.ts';
import { type ToneLook, ToneSource } from './toneSource.ts';

/** How points are drawn: as the machine suggests, or as one says. */
export type LayerChoice = 'auto' | 'software' | 'webgl';

/** Up to so many galaxies a search on the page is quicker than asking the workers. */
const PICK_ON_PAGE = 200_000;
/** So many points are drawn whatever it takes. */
const ALWAYS_DRAWN = 120_000;
/** Workers that end are started again so often. */
const MOST_RESTARTS = 2;

/** The galaxies and the layer that draws them. */
export class PointPainter {
  readonly galaxies: Galaxies;
  /** Rises whenever the points change, so that an unchanged picture need not be drawn again. */
  version = 0;
  readonly pacing = new Pacing();
  private readonly gl: GlStage;
  private readonly changed: () => void;
  private readonly tones = new ToneSource();
  private choice: LayerChoice = 'auto';
  private pool: SplatPool | null = null;
  private software: SoftwarePoints | null = null;
  private webgl: WebglPoints | null = null;
  private restarts = 0;

  /** @param trouble told why the galaxies cannot be drawn, and null once they can */
  constructor(gl: GlStage, work: ConeWork, changed: () => void, trouble: (sentence: string | null) => void) {
    this.gl = gl;
    this.changed = changed;
    this.startPool();
    const memory: ConeMemory = {
      base: RESERVED_BYTES,
      allocate: (layout) => this.pool?.allocate(layout) ?? new ArrayBuffer(layout.end),
      rows: (slots) => new Uint32Array(slots),
      adopt: (made) => this.pool?.adopt(made) ?? false,
    };
    this.galaxies = new Galaxies((what) => this.galaxiesChanged(what), work, memory, trouble);
    this.takeGl();
  }

  get layer(): 'software' | 'webgl' | 'none' {
    const state = this.gl.state;
    const hardware = state.webgl === 'ready' && !state.software;
    const wanted = this.choice === 'auto' ? (hardware ? 'webgl' : 'software') : this.choice;
    if (wanted === 'webgl' && this.gl.layers && this.webgl) return 'webgl';
    if (this.software) return 'software';
    return this.gl.layers && this.webgl ? 'webgl' : 'none';
  }

  /** The software layer's picture of the points; null when it is not the one in use. */
  get image(): ImageData | null {
    return this.layer === 'software' && this.software ? this.software.image : null;
  }

  choose(choice: LayerChoice): void {
    this.choice = choice;
    if (choice === 'webgl') this.gl.start();
    this.version++;
    this.changed();
  }

  /** WebGL came, went or came back. */
  takeGl(): void {
    const points = this.gl.layers?.points ?? null;
    if (points && !this.webgl) {
      this.webgl = points;
      points.setStore(this.galaxies.store);
    }
    this.version++;
  }

  /** The picture to draw: as many points as there is time for, all of them at rest. */
  frame(
    parts: readonly PointPart[],
    viewport: Viewport,
    ratio: number,
    look: ToneLook,
    emphasis: Emphasis | null,
    moving: boolean,
  ): PointFrame {
    const { store, ready } = this.galaxies;
    const crowd = store ? crowding(store.arrays, parts, viewport) : NOTHING;
    const sizePx = look.light.pointSize * pointSizePx(crowd.onStage, viewport, crowd.middlePerPixel);
    // Large sets move at one pixel a CSS pixel: sharper is for rest.
    const many = crowd.onStage > 400_000;
    const pixelRatio = moving && many && this.layer === 'software' ? Math.min(1, ratio) : ratio;
    const sums = exposure(crowd, pixelRatio, sizePx * pixelRatio);
    const tone = this.tones.tone(look, sums);
    const frame: PointFrame = { viewport, pixelRatio, parts, fraction: ready, emphasis, sizePx, tone };
    if (!moving || this.layer !== 'software' || !this.software) return frame;
    const total = parts.reduce((sum, part) => sum + part.range.count, 0);
    const affordable = this.software.affordable(this.pacing.budgetMs, frame);
    // A little over is better than a second picture at rest, and a thin sample would flicker.
    if (total <= Math.max(1.4 * affordable, ALWAYS_DRAWN)) return frame;
    return { ...frame, fraction: Math.min(ready, Math.max(affordable, ALWAYS_DRAWN) / total) };
  }

  /** Draws by the layer in use; false when it was stopped and the old picture stands. */
  async draw(frame: PointFrame, stop: () => boolean): Promise<boolean> {
    if (this.layer === 'webgl') {
      this.webgl!.draw(frame);
      return true;
    }
    return this.software ? this.software.draw(frame, stop) : true;
  }

  async pick(
    parts: readonly PointPart[],
    xPx: number,
    yPx: number,
    reachPx: number,
  ): Promise<PointHit | null> {
    const { store, index, ready } = this.galaxies;
    if (!store) return null;
    if (index && ready === 1) {
      return parts.reduce<PointHit | null>((best, { matrix, range }) => {
        const own = index[store.ranges.indexOf(range)];
        return own ? pickNear(store.arrays, own, matrix, xPx, yPx, reachPx, best) : best;
      }, null);
    }
    const total = parts.reduce((sum, part) => sum + part.range.count, 0);
    if (total > PICK_ON_PAGE && this.pool && this.software) {
      const runs = parts.map(({ matrix, range }) => ({
        from: range.start,
        to: range.start + range.count,
        matrix: Float32Array.from(matrix),
        light: 1,
        depth: null,
        least: 1,
      }));
      return this.pool.pick(runs, xPx, yPx, reachPx);
    }
    let best: PointHit | null = null;
    for (const { matrix, range } of parts) {
      const end = range.start + range.count;
      best = pickPoint(store.arrays, matrix, range.start, end, xPx, yPx, reachPx, best);
    }
    return best;
  }

  dispose(): void {
    this.galaxies.dispose();
    this.software?.dispose();
    this.pool?.dispose();
  }

  private startPool(): void {
    try {
      this.pool = new SplatPool(() => this.poolFailed());
      this.software = new SoftwarePoints(this.pool);
    } catch {
      // A host without module workers: WebGL draws the points, whatever stands behind it.
      this.pool = null;
      this.software = null;
      queueMicrotask(() => this.gl.start());
    }
  }

  private poolFailed(): void {
    this.software?.dispose();
    this.pool?.dispose();
    this.pool = null;
    this.software = null;
    if (this.restarts++ < MOST_RESTARTS) this.startPool();
    else this.gl.start();
    // The new workers do not know the memory: the points are laid out again.
    this.galaxies.relay();
    this.version++;
    this.changed();
  }

  private galaxiesChanged(what: GalaxiesChange): void {
    this.version++;
    const { store } = this.galaxies;
    for (const layer of [this.software, this.webgl]) {
      if (what === 'store') layer?.setStore(store);
      else if (what === 'values') layer?.valuesChanged();
      else layer?.radiiChanged();
    }
    this.changed();
  }
}
