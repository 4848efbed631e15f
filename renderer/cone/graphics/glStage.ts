import type { DrawingState } from '../types.ts';
import type { GpuLayers } from './gpuLayers.ts';
import { findGpu } from './probe.ts';

class NotLoaded extends Error {}

const whyAbsent = (error: unknown): string =>
  error instanceof NotLoaded
    ? 'the part of Conewright that draws them could not be loaded'
    : 'this machine offers no WebGL';

/**
 * WebGL where a GPU stands behind it: made once it is known, told when it is lost, taken up again when it is restored.
 * Until then, and without a GPU, the processor draws.
 */
export class GlStage {
  state: DrawingState = { webgl: 'unused' };
  private made: GpuLayers | null = null;
  private readonly canvas: HTMLCanvasElement;
  private readonly changed: (state: DrawingState) => void;
  private readonly end = new AbortController();
  private looked = false;
  private started = false;

  constructor(canvas: HTMLCanvasElement, changed: (state: DrawingState) => void) {
    this.canvas = canvas;
    this.changed = changed;
    const { signal } = this.end;
    canvas.addEventListener(
      'webglcontextlost',
      (event) => {
        // Without this the browser never gives the context back.
        event.preventDefault();
        this.tell({
          webgl: 'lost',
          reason: 'the graphics driver took its context away; they are drawn flat until it comes back',
        });
      },
      { signal },
    );
    canvas.addEventListener('webglcontextrestored', () => this.tellReady(), { signal });
  }

  /** What three.js draws; null while it cannot. */
  get layers(): GpuLayers | null {
    return this.state.webgl === 'ready' ? this.made : null;
  }

  /** Looks for a GPU, once. While one is looked for the browser may keep other canvases waiting: not before a picture. */
  look(): void {
    if (this.looked) return;
    this.looked = true;
    const { signal } = this.end;
    void findGpu(signal).then((found) => {
      if (found && !signal.aborted) this.start();
    });
  }

  /** Makes the context if there is none yet, whatever stands behind it: without a GPU the page waits for that. */
  start(): void {
    if (this.started) return;
    this.started = true;
    void this.make().then(
      (made) => {
        if (made === null) return;
        this.made = made;
        this.tellReady();
      },
      (error: unknown) => this.tell({ webgl: 'absent', reason: `${whyAbsent(error)}; they are drawn flat` }),
    );
  }

  dispose(): void {
    this.end.abort();
    this.made?.dispose();
    this.made = null;
  }

  /** Three.js is large, and not needed where there is no GPU: it comes with the first use. */
  private async make(): Promise<GpuLayers | null> {
    const { GpuLayers } = await import('./gpuLayers.ts').catch(() => {
      throw new NotLoaded();
    });
    return this.end.signal.aborted ? null : new GpuLayers(this.canvas);
  }

  private tell(state: DrawingState): void {
    this.state = state;
    this.changed(state);
  }

  private tellReady(): void {
    const { name, software } = this.made!.describe();
    this.tell({ webgl: 'ready', renderer: name, software });
  }
}
