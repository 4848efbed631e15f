import { WebGLRenderer } from 'three';
import type { DrawingState } from '../types.ts';
import { findGpu } from './probe.ts';
import { rendererOf } from './rendererName.ts';

/**
 * WebGL where a GPU stands behind it: made once it is known, told when it is lost, taken up again when it is restored.
 * Until then, and without a GPU, the processor draws.
 */
export class GlStage {
  renderer: WebGLRenderer | null = null;
  state: DrawingState = { webgl: 'unused' };
  private readonly canvas: HTMLCanvasElement;
  private readonly changed: (state: DrawingState) => void;
  private readonly end = new AbortController();
  private looked = false;

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
    canvas.addEventListener('webglcontextrestored', () => this.tell(this.describe()), { signal });
  }

  get usable(): boolean {
    return this.state.webgl === 'ready' && this.renderer !== null;
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
    if (this.renderer) return;
    try {
      this.renderer = new WebGLRenderer({
        canvas: this.canvas,
        alpha: true,
        antialias: false,
        depth: false,
        stencil: false,
        premultipliedAlpha: true,
        powerPreference: 'high-performance',
      });
      this.renderer.autoClear = false;
      this.tell(this.describe());
    } catch {
      this.tell({ webgl: 'absent', reason: 'this machine offers no WebGL; they are drawn flat' });
    }
  }

  dispose(): void {
    this.end.abort();
    this.renderer?.dispose();
    this.renderer?.forceContextLoss();
    this.renderer = null;
  }

  private tell(state: DrawingState): void {
    this.state = state;
    this.changed(state);
  }

  private describe(): DrawingState {
    const { name, software } = rendererOf(this.renderer!.getContext() as WebGL2RenderingContext);
    return { webgl: 'ready', renderer: name, software };
  }
}
