import type { Triple } from '../colour/oklab.ts';

let probe: CanvasRenderingContext2D | null = null;

/** sRGB bytes of any CSS colour the browser knows; its opacity is not used. */
export function parseCssColour(css: string): Triple {
  if (!probe) {
    const canvas = document.createElement('canvas');
    canvas.width = 1;
    canvas.height = 1;
    probe = canvas.getContext('2d', { willReadFrequently: true });
  }
  if (!probe) return [0, 0, 0];
  probe.fillStyle = css;
  probe.fillRect(0, 0, 1, 1);
  const [r, g, b] = probe.getImageData(0, 0, 1, 1).data;
  return [r!, g!, b!];
}
