import { useEffect, useRef } from 'preact/hooks';
import { useApp } from '../state/app.ts';
import type { MapBox } from './skyFrames.ts';
import { countPoints, tonePoints } from './skyPoints.ts';
import type { SkyFrame } from './skyProjection.ts';

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
    // The theme's colours stand in the page by the next frame.
    const wait = requestAnimationFrame(() => {
      const element = canvas.current;
      const context = element?.getContext('2d', { willReadFrequently: true });
      if (element == null || context == null) return;
      const ratio = devicePixelRatio;
      element.width = Math.max(1, Math.round(size.widthPx * ratio));
      element.height = Math.max(1, Math.round(size.heightPx * ratio));
      if (selected === null) return;
      const counted = countPoints(selected.directions, frame, box, size, ratio);
      const image = context.createImageData(counted.width, counted.height);
      tonePoints(counted, colourOf(getComputedStyle(element).color), image.data);
      context.putImageData(image, 0, 0);
    });
    return () => cancelAnimationFrame(wait);
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
