import { project } from '../geometry/projection.ts';
import type { Pen } from './pen.ts';
import type { OverlayScene } from './scene.ts';

/** Room beside the observer's name, in pixels. */
const WORD_GAP_PX = 8;

/** The observer: a small eye at the apex. */
export function paintObserver(
  pen: Pen,
  scene: OverlayScene,
  lane: { readonly lift: number },
  named: boolean,
): void {
  const p = project(scene.pixels, 0, lane.lift, 0);
  if (!p || p[0] < -20 || p[0] > pen.width + 20 || p[1] < -20 || p[1] > pen.height + 20) return;
  pen.disc(p, 4.7, pen.theme.background);
  pen.ring(p, 4, pen.theme.ink, 1.4);
  pen.disc(p, 1.4, pen.theme.ink);
  pen.labels.reserve({ x: p[0] - 5, y: p[1] - 5, width: 10, height: 10 });
  if (!named) return;
  const half = pen.measure('observer') / 2;
  const places = [
    [half + 8, -24],
    [half + 8, 24],
    [-half - 12, 0],
    [0, 18],
    [0, -18],
  ] as const;
  for (const [dx, dy] of places) {
    const [x, y] = [p[0] + dx, p[1] + dy];
    if (!pen.text('observer', x, y, pen.theme.inkMuted)) continue;
    // A number right beside the word would read as a part of it.
    pen.labels.reserve({ x: x - half - WORD_GAP_PX, y: y - 6, width: 2 * (half + WORD_GAP_PX), height: 12 });
    return;
  }
}
