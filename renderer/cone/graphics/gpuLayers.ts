import { Color, WebGLRenderer } from 'three';
import type { Triple } from '../../colour/oklab.ts';
import type { Viewport } from '../geometry/projection.ts';
import { rendererOf } from './rendererName.ts';
import { ShellSolids } from './shellSolids.ts';
import { WebglPoints } from './webglPoints.ts';

/** What three.js draws on one canvas: points and shell solids. Loaded only where it is used. */
export class GpuLayers {
  /** Null where the machine has no float target to sum light in: the software layer draws the points. */
  readonly points: WebglPoints | null;
  readonly solids: ShellSolids;
  private readonly renderer: WebGLRenderer;

  /** @throws Error where the machine offers no WebGL */
  constructor(canvas: HTMLCanvasElement) {
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
    this.solids = new ShellSolids(this.renderer);
    this.points = pointsOf(this.renderer);
  }

  /** Who draws, and whether that is the processor standing in for a GPU. */
  describe(): { readonly name: string; readonly software: boolean } {
    return rendererOf(this.renderer.getContext() as WebGL2RenderingContext);
  }

  /** Clears the canvas: to the ground where it carries the points, else to nothing. */
  clear({ widthPx, heightPx }: Viewport, pixelRatio: number, ground: Triple | null): void {
    const { renderer } = this;
    const width = Math.max(1, Math.round(widthPx * pixelRatio));
    const height = Math.max(1, Math.round(heightPx * pixelRatio));
    if (renderer.domElement.width !== width || renderer.domElement.height !== height) {
      renderer.setPixelRatio(1);
      renderer.setSize(width, height, false);
    }
    const [r, g, b] = ground ?? [0, 0, 0];
    renderer.setClearColor(new Color(r / 255, g / 255, b / 255), ground ? 1 : 0);
    renderer.clear();
  }

  dispose(): void {
    this.solids.dispose();
    this.points?.dispose();
    this.renderer.dispose();
    this.renderer.forceContextLoss();
  }
}

function pointsOf(renderer: WebGLRenderer): WebglPoints | null {
  try {
    return new WebglPoints(renderer);
  } catch {
    return null;
  }
}
