import type { Pen, Point } from './pen.ts';
import type { Marks } from './scene.ts';

/** Room around a galaxy's ring. */
const RING_ROOM_PX = 11;

/** Keeps later labels off the galaxies pointed out, and off the line between two. */
export function keepClearOfMarks(pen: Pen, { hovered, picked }: Marks): void {
  const [a, b] = picked;
  const between = a && b ? [0.2, 0.4, 0.6, 0.8].map((t): Point => mixed(a, b, t)) : [];
  for (const p of [hovered, ...picked, ...between])
    if (p)
      pen.labels.reserve({
        x: p[0] - RING_ROOM_PX,
        y: p[1] - RING_ROOM_PX,
        width: 2 * RING_ROOM_PX,
        height: 2 * RING_ROOM_PX,
      });
}

const mixed = (a: Point, b: Point, t: number): Point => [a[0] + t * (b[0] - a[0]), a[1] + t * (b[1] - a[1])];

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

/** Above a flat line, beside a steep one; on the stage whatever the line does. */
function paintPairText(pen: Pen, a: Point, b: Point, text: string): void {
  const half = pen.measure(text, 12, 600) / 2 + 8;
  const flat = Math.abs(b[0] - a[0]) > Math.abs(b[1] - a[1]);
  const middleX = (a[0] + b[0]) / 2;
  const middleY = (a[1] + b[1]) / 2;
  const x = flat ? middleX : middleX + half + 10;
  const y = flat ? Math.min(a[1], b[1]) - 20 : middleY;
  pen.text(
    text,
    Math.min(pen.width - half, Math.max(half, x)),
    Math.min(pen.height - 14, Math.max(14, y)),
    pen.theme.ink,
    { sizePx: 12, weight: 600, must: true },
  );
}
