import type { Pen } from '../../cone/overlay/pen.ts';

/** Text from its left end on its baseline, without a halo. */
export function writeLeft(
  pen: Pen,
  text: string,
  x: number,
  y: number,
  size: number,
  colour: string,
  weight = 400,
): void {
  const { context } = pen;
  pen.font(size, weight);
  context.textAlign = 'left';
  context.textBaseline = 'alphabetic';
  context.fillStyle = colour;
  context.fillText(text, x, y);
}
