import { WebGLRenderer } from 'three';
import type { DrawingState } from './types.ts';

const SOFTWARE = /swiftshader|llvmpipe|softpipe|software|basic render/i;

/** WebGL where there is some: made once, told when it is lost, taken up again when it is restored. */
export class GlStage {
  renderer: WebGLRenderer | null = null;
  state: DrawingState;
  private readonly end = new AbortController();

  constructor(canvas: HTMLCanvasElement, changed: (state: DrawingState) => void) {
    this.state = this.start(canvas);
    const { signal } = this.end;
    canvas.addEventListener(
      'webglcontextlost',
      (event) => {
        // Without this the browser never gives the context back.
        event.preventDefault();
        this.state = {
          webgl: 'lost',
          reason: 'the graphics driver took its context away; they are drawn flat until it comes back',
        };
        changed(this.state);
      },
      { signal },
    );
    canvas.addEventListener(
      'webglcontextrestored',
      () => {
        this.state = this.describe();
        changed(this.state);
      },
      { signal },
    );
  }

  get usable(): boolean {
    return this.state.webgl === 'ready' && this.renderer !== null;
  }

  dispose(): void {
    this.end.abort();
    this.renderer?.dispose();
    this.renderer?.forceContextLoss();
    this.renderer = null;
  }

  private start(canvas: HTMLCanvasElement): DrawingState {
    try {
      this.renderer = new WebGLRenderer({
        canvas,
        alpha: true,
        antialias: false,
        depth: false,
        stencil: false,
        premultipliedAlpha: true,
        powerPreference: 'high-performance',
      });
      this.renderer.autoClear = false;
      return this.describe();
    } catch {
      return {
        webgl: 'absent',
        reason: 'this machine offers no WebGL; they are drawn flat',
      };
    }
  }

  private describe(): DrawingState {
    const gl = this.renderer!.getContext();
    const info = gl.getExtension('WEBGL_debug_renderer_info');
    const name = String(gl.getParameter(info ? info.UNMASKED_RENDERER_WEBGL : gl.RENDERER));
    return { webgl: 'ready', renderer: name, software: SOFTWARE.test(name) };
  }
}
