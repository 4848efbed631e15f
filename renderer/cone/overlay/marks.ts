import type { Pen, Point } from './pen.ts';
import type { Marks } from './scene.ts';

/** Rings around the galaxies pointed out, and the line between a picked pair with its text. */
export function paintMarks(pen: Pen, { hovered, picked, pairText }: Marks): void {
  const [a, b] = picked;
  if (a && b) {
    pen.line([a, b], pen.theme.background, 4);
    pen.line([a, b], pen.theme.accent, 1.5);
    if (pairText !== '') paintPairText(pen, a, b, pairText);
  }
  for (const p of picked) {
    if (!p) continue;
    pen.ring(p, 7, pen.theme.background, 4);
    pen.ring(p, 7, pen.theme.accent, 2);
  }
  if (hovered) {
    pen.ring(hovered, 6, pen.theme.background, 3);
    pen.ring(hovered, 6, pen.theme.ink, 1.2);
  }
}

/** Beside the middle of the line, on the stage whatever the line does. */
function paintPairText(pen: Pen, a: Point, b: Point, text: string): void {
  const half = pen.measure(text, 12, 600) / 2 + 8;
  const x = Math.min(pen.width - half, Math.max(half, (a[0] + b[0]) / 2));
  const y = Math.min(pen.height - 14, Math.max(14, (a[1] + b[1]) / 2 - 16));
  pen.text(text, x, y, pen.theme.ink, { sizePx: 12, weight: 600, must: true });
}
