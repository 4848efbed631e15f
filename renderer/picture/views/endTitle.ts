import type { Pen, Point } from '../../cone/overlay/pen.ts';

/** Writes a ruler's title level beyond its end, farther out where the first place is taken. */
export function paintEndTitle(pen: Pen, title: string, start: Point, end: Point): void {
  const length = Math.hypot(end[0] - start[0], end[1] - start[1]);
  if (length === 0) return;
  const [x, y] = [(end[0] - start[0]) / length, (end[1] - start[1]) / length];
  const half = pen.measure(title) / 2;
  // Nearly upright rulers have their title centred above or below the end, others beside it.
  const sideways = Math.abs(x) > 0.35 ? Math.sign(x) * half : 0;
  for (const out of [12, 28, 44]) {
    if (pen.text(title, end[0] + x * out + sideways, end[1] + y * out, pen.theme.inkMuted)) return;
  }
}
