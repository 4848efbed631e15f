import type { Pen } from './pen.ts';

/**
 * A round length (1, 2 or 5 times a power of ten, in the unit) that is between 70 and 175 pixels long.
 *
 * @param mpcPerPixel comoving Mpc of one pixel
 * @param unitMpc the unit in which the length is to be round
 */
export function roundLengthMpc(mpcPerPixel: number, unitMpc: number): number {
  const most = (175 * mpcPerPixel) / unitMpc;
  const power = 10 ** Math.floor(Math.log10(most));
  const lead = most / power;
  const nice = lead >= 5 ? 5 : lead >= 2 ? 2 : 1;
  return nice * power * unitMpc;
}

/** The bar at the left at a height of the stage, with its length above it. */
export function drawScaleBar(
  pen: Pen,
  yPx: number,
  mpcPerPixel: number,
  unitMpc: number,
  format: (mpc: number) => string,
): void {
  const mpc = roundLengthMpc(mpcPerPixel, unitMpc);
  const widthPx = mpc / mpcPerPixel;
  if (!(widthPx > 20) || widthPx > pen.width / 2) return;
  const x = 20.5;
  const y = Math.round(yPx) + 0.5;
  const text = format(mpc);
  const textWidth = pen.measure(text);
  const box = { x: x - 4, y: y - 22, width: Math.max(widthPx, textWidth) + 8, height: 30 };
  if (!pen.labels.place(box, 2)) return;
  pen.line(
    [
      [x, y - 4],
      [x, y + 4],
    ],
    pen.theme.ink,
    1,
  );
  pen.line(
    [
      [x, y],
      [x + widthPx, y],
    ],
    pen.theme.ink,
    1,
  );
  pen.line(
    [
      [x + widthPx, y - 4],
      [x + widthPx, y + 4],
    ],
    pen.theme.ink,
    1,
  );
  pen.font(11.5);
  pen.write(text, x + Math.max(widthPx, textWidth) / 2, y - 13, pen.theme.ink);
}
