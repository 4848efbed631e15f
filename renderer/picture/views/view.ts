import type { PictureOptions } from '../../../shared-core/picture/options.ts';
import type { Point } from '../../cone/overlay/pen.ts';
import { Pen } from '../../cone/overlay/pen.ts';
import type { PictureNumbers } from '../numbers.ts';
import { RecordingContext } from '../recorder.ts';
import type { SceneItem } from '../scene.ts';
import type { PictureTheme } from '../themes.ts';

/** Where a view is drawn, in units of the scene. */
export interface ViewBox {
  readonly left: number;
  readonly top: number;
  readonly width: number;
  readonly height: number;
}

export interface ViewInput {
  readonly box: ViewBox;
  readonly options: PictureOptions;
  readonly numbers: PictureNumbers;
  readonly theme: PictureTheme;
}

/** A view drawn: what lies under the galaxies and what over them, and where things of the sky stand. */
export interface ViewDrawing {
  readonly under: readonly SceneItem[];
  readonly over: readonly SceneItem[];
  /** What a reader must know, such as what is not to scale. */
  readonly notes: readonly string[];
  /** What is seen, as the beginning of a sentence. */
  readonly words: string;
  /** Place in the box of a position on the sky at a comoving distance; null when the view does not show it. */
  readonly place: (direction: readonly [number, number, number], comovingMpc: number) => Point | null;
  /**
   * The same for every galaxy, in units of the scene; NaN where it is not shown. Where an array for light comes (all 1),
   * a view that has depth fills in each galaxy's part of it.
   */
  readonly placeAll: (x: Float32Array, y: Float32Array, light: Float32Array | null) => void;
}

/** A pen on a fresh recording of the box. */
export function penOn({ box, theme }: Pick<ViewInput, 'box' | 'theme'>): { pen: Pen; items: SceneItem[] } {
  const recorder = new RecordingContext(box.left, box.top);
  // The overlay uses no more of a context than the recorder has.
  const pen = new Pen(recorder as unknown as CanvasRenderingContext2D, theme, box.width, box.height);
  return { pen, items: recorder.items };
}

/** Fills closed runs of points; with `evenOdd` the inner ones are holes. */
export function fillRuns(pen: Pen, runs: readonly (readonly (Point | null)[])[], css: string): void {
  const { context } = pen;
  context.beginPath();
  for (const run of runs) {
    let first = true;
    for (const p of run) {
      if (!p) continue;
      if (first) context.moveTo(p[0], p[1]);
      else context.lineTo(p[0], p[1]);
      first = false;
    }
  }
  context.closePath();
  context.fillStyle = css;
  context.fill('evenodd');
}
