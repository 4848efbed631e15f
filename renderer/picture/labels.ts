import type { PictureOptions } from '../../shared-core/picture/options.ts';
import { direction } from '../cone/geometry/vector.ts';
import type { Pen, Point } from '../cone/overlay/pen.ts';
import type { PictureNumbers } from './numbers.ts';
import { fitText, textWidth, wrapText } from './text/measure.ts';
import type { ViewDrawing } from './views/view.ts';

const SIZE = 12;
const LEADING = 15;
const WIDTH = 200;
const MOST_LINES = 3;
/** Where a label may stand from its place, the best first. */
const OFFSETS: readonly Point[] = [
  [26, -26],
  [-26, -26],
  [26, 26],
  [-26, 26],
  [46, -60],
  [-46, -60],
  [46, 60],
  [-46, 60],
];

/**
 * Labels tied to places in the survey: a small ring, a leader and the text, clear of each other where there is room.
 * @param moving in a film a label stays at one side of its place: it would jump if it looked for room in each frame
 */
export function paintLabels(
  pen: Pen,
  options: PictureOptions,
  numbers: PictureNumbers,
  drawing: Pick<ViewDrawing, 'place'>,
  moving = false,
): void {
  for (const { text, raDeg, decDeg, redshift } of options.labels) {
    const at = drawing.place(direction(raDeg, decDeg), numbers.cosmology.comovingMpc(redshift));
    if (!at || !(at[0] > 0 && at[0] < pen.width && at[1] > 0 && at[1] < pen.height)) continue;
    pen.ring(at, 4, pen.theme.background, 3.5);
    pen.ring(at, 4, pen.theme.ink, 1.2);
    paintText(pen, at, linesOf(text), moving ? [steadyOffset(pen, at)] : OFFSETS, moving);
  }
}

/** A long text is broken into a few lines and ends with an ellipsis; the whole of it is in the description. */
function linesOf(text: string): string[] {
  const lines = wrapText(text, WIDTH, SIZE, 600);
  if (lines.length <= MOST_LINES) return lines;
  const rest = lines.slice(MOST_LINES - 1).join(' ');
  return [...lines.slice(0, MOST_LINES - 1), fitText(rest, WIDTH, SIZE, 600)];
}

/** Toward the middle of the stage and upward, where there is height for it. */
const steadyOffset = (pen: Pen, [x, y]: Point): Point => [x < pen.width / 2 ? 26 : -26, y < 80 ? 26 : -26];

function paintText(
  pen: Pen,
  at: Point,
  lines: readonly string[],
  offsets: readonly Point[],
  must: boolean,
): void {
  const width = Math.max(...lines.map((line) => textWidth(line, SIZE, 600)));
  const height = lines.length * LEADING;
  for (const [dx, dy] of offsets) {
    const x = at[0] + dx + (dx < 0 ? -width : 0);
    const y = at[1] + dy - (dy < 0 ? height : 0);
    if (!must && !pen.labels.place({ x, y, width, height })) continue;
    const length = Math.hypot(dx, dy);
    const end: Point = [at[0] + dx * 0.92, at[1] + dy * 0.92];
    pen.line([[at[0] + (5 * dx) / length, at[1] + (5 * dy) / length], end], pen.theme.ink, 0.9);
    for (const [i, line] of lines.entries()) {
      pen.font(SIZE, 600);
      const half = textWidth(line, SIZE, 600) / 2;
      const middle = dx < 0 ? x + width - half : x + half;
      pen.write(line, middle, y + (i + 0.5) * LEADING, pen.theme.ink);
    }
    return;
  }
}
