import { useEffect, useRef } from 'preact/hooks';
import { runSliced } from '../cone/points/slices.ts';
import { useApp } from '../state/app.ts';
import type { MapBox } from './skyFrames.ts';
import { countPoints, tonePoints } from './skyPoints.ts';
import type { SkyFrame } from './skyProjection.ts';

const NONE = { x: new Float32Array(0), y: new Float32Array(0), z: new Float32Array(0) };

/** The galaxies on a canvas, in the colour of the text. */
export function SkyPoints(props: {
  readonly frame: SkyFrame;
  readonly box: MapBox;
  readonly size: { readonly widthPx: number; readonly heightPx: number };
}) {
  const { frame, box, size } = props;
  const { engine, view } = useApp();
  const canvas = useRef<HTMLCanvasElement>(null);
  const selected = engine.selected.value;
  const theme = view.theme.value;
  useEffect(() => {
    const job = new AbortController();
    const draw = async () => {
      const element = canvas.current;
      const context = element?.getContext('2d', { willReadFrequently: true });
      if (element == null || context == null) return;
      const ratio = devicePixelRatio;
      const directions = selected?.directions ?? NONE;
      const counted = await runSliced(countPoints(directions, frame, box, size, ratio), job.signal);
      if (counted === null) return;
      const image = context.createImageData(counted.width, counted.height);
      tonePoints(counted, colourOf(getComputedStyle(element).color), image.data);
      // A new size empties the canvas: not before the picture is there.
      if (element.width !== counted.width) element.width = counted.width;
      if (element.height !== counted.height) element.height = counted.height;
      context.putImageData(image, 0, 0);
    };
    // The theme's colours stand in the page by the next frame.
    const wait = requestAnimationFrame(() => void draw());
    return () => {
      cancelAnimationFrame(wait);
      job.abort();
    };
  }, [selected, theme, frame, box, size]);
  return (
    // biome-ignore lint/a11y/noAriaHiddenOnFocusable: a canvas takes no focus; the caption says what it shows
    <canvas
      ref={canvas}
      class="sky-points"
      style={{ width: `${size.widthPx}px`, height: `${size.heightPx}px` }}
      aria-hidden="true"
    />
  );
}

function colourOf(css: string): [number, number, number] {
  const [red = 128, green = 128, blue = 128] = (css.match(/[\d.]+/g) ?? []).map(Number);
  return [red, green, blue];
}
