import type { Pen, Point } from './pen.ts';
import type { Marks } from './scene.ts';

/** Room around a galaxy's ring. */
const RING_ROOM_PX = 11;

/** Keeps later labels off the galaxies pointed out, and off the line between two and its text. */
export function keepClearOfMarks(pen: Pen, { hovered, picked, pairText }: Marks): void {
  const [a, b] = picked;
  if (a && b && pairText !== '') {
    const [x, y] = pairTextPlace(pen, a, b, pairText);
    const width = pen.measure(pairText, PAIR_SIZE_PX, PAIR_WEIGHT);
    pen.labels.reserve({ x: x - width / 2, y: y - 8, width, height: 16 });
  }
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
    if (pairText !== '')
      pen.text(pairText, ...pairTextPlace(pen, a, b, pairText), pen.theme.ink, {
        sizePx: PAIR_SIZE_PX,
        weight: PAIR_WEIGHT,
        must: true,
      });
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

const PAIR_SIZE_PX = 12;
const PAIR_WEIGHT = 600;

/** Above a flat line, beside a steep one; on the stage whatever the line does. */
function pairTextPlace(pen: Pen, a: Point, b: Point, text: string): Point {
  const half = pen.measure(text, PAIR_SIZE_PX, PAIR_WEIGHT) / 2 + 8;
  const flat = Math.abs(b[0] - a[0]) > Math.abs(b[1] - a[1]);
  const x = (a[0] + b[0]) / 2 + (flat ? 0 : half + 10);
  const y = flat ? Math.min(a[1], b[1]) - 20 : (a[1] + b[1]) / 2;
  return [Math.min(pen.width - half, Math.max(half, x)), Math.min(pen.height - 14, Math.max(14, y))];
}
