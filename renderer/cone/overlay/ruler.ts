import type { Tick } from '../types.ts';
import type { Pen, Point } from './pen.ts';

/** A ruler along a line of the picture. */
export interface Ruler {
  readonly title: string;
  readonly ticks: readonly Tick[];
  /** Pixel of a comoving distance on the ruler; null when it is not in the picture. */
  readonly at: (comovingMpc: number) => Point | null;
  /** Ends of the ruler, comoving Mpc. */
  readonly fromMpc: number;
  readonly toMpc: number;
  /** A pixel away from which the marks point. */
  readonly awayFrom: Point;
  /** The title stands between the numbers, in their row, rather than outside them. */
  readonly inline?: boolean;
}

const NUMBER_OUT_PX = 15.5;
const TITLE_OUT_PX = 40;
const NUMBER_GAP_PX = 9;
/** From the numbers to the middle of a title outside of them. */
const TITLE_ROOM_PX = 15;
/** Places for a title along its ruler, the best first. */
const TITLE_SHARES = [0.62, 0.5, 0.75, 0.4, 0.86, 0.3, 0.66, 0.54, 0.46, 0.58, 0.7, 0.34, 0.8, 0.26, 0.2];
const MARK_PX = [6, 4.5, 3] as const;

/** Draws line, marks, numbers and title. Numbers give way to earlier texts, the less important first. */
export function drawRuler(pen: Pen, ruler: Ruler): void {
  const start = ruler.at(ruler.fromMpc);
  const end = ruler.at(ruler.toMpc);
  if (!start || !end) return;
  const length = Math.hypot(end[0] - start[0], end[1] - start[1]);
  if (length < 24) return;
  const along: Point = [(end[0] - start[0]) / length, (end[1] - start[1]) / length];
  const middle: Point = [(start[0] + end[0]) / 2, (start[1] + end[1]) / 2];
  let normal: Point = [-along[1], along[0]];
  const away = (middle[0] - ruler.awayFrom[0]) * normal[0] + (middle[1] - ruler.awayFrom[1]) * normal[1];
  if (away < 0) normal = [-normal[0], -normal[1]];
  pen.line([start, end], pen.theme.line, 1);
  /** Half of what a number takes across the ruler. */
  const halfOf = (text: string): number =>
    (Math.abs(normal[0]) * pen.measure(text)) / 2 + Math.abs(normal[1]) * 6.5;
  const widest = Math.max(0, ...ruler.ticks.map(({ text }) => (text === '' ? 0 : halfOf(text))));
  const outside = Math.max(TITLE_OUT_PX, NUMBER_GAP_PX + 2 * widest + TITLE_ROOM_PX);
  if (!ruler.inline) drawTitle(pen, ruler, start, end, along, normal, length, outside);
  const shown = ruler.ticks
    .filter(
      (tick) =>
        tick.comovingMpc >= ruler.fromMpc * (1 - 1e-9) && tick.comovingMpc <= ruler.toMpc * (1 + 1e-9),
    )
    .map((tick) => ({ tick, p: ruler.at(tick.comovingMpc) }))
    .filter((entry) => entry.p !== null);
  // Neither between the numbers nor outside of them is room: some numbers give way to the title.
  const gaps = ruler.inline === true && !fitsOutside(pen, middle, normal, outside);
  const first = gaps && widestGap(shown, along) < pen.measure(ruler.title) + 2 * widest + 4 * NUMBER_GAP_PX;
  if (first) drawTitle(pen, ruler, start, end, along, normal, length, NUMBER_OUT_PX);
  const marks = new Float64Array(shown.length);
  shown.sort((a, b) => a.tick.level - b.tick.level);
  for (const [i, { tick, p }] of shown.entries()) {
    const place = (p![0] - start[0]) * along[0] + (p![1] - start[1]) * along[1];
    marks[i] = place;
    // Marks nearer than this to a more important one would run into a grey band.
    const crowded = marks.subarray(0, i).some((other) => Math.abs(other - place) < 4.5);
    if (crowded) continue;
    const long = MARK_PX[Math.min(tick.level, 2)]!;
    pen.line([p!, [p![0] + normal[0] * long, p![1] + normal[1] * long]], pen.theme.inkMuted, 1);
    if (tick.text === '') continue;
    const out = NUMBER_GAP_PX + halfOf(tick.text);
    pen.text(tick.text, p![0] + normal[0] * out, p![1] + normal[1] * out, pen.theme.inkMuted, { gap: 4 });
  }
  // Where no gap between numbers is wide enough the title goes outside after all.
  if (ruler.inline && !first && !drawTitle(pen, ruler, start, end, along, normal, length, NUMBER_OUT_PX)) {
    drawTitle(pen, ruler, start, end, along, normal, length, outside);
  }
}

const fitsOutside = (pen: Pen, [x, y]: Point, normal: Point, out: number): boolean => {
  const [px, py] = [x + normal[0] * out, y + normal[1] * out];
  return Math.abs(normal[0]) > Math.abs(normal[1])
    ? px > 8 && px < pen.width - 8
    : py > 8 && py < pen.height - 8;
};

/** The widest gap between neighbouring numbers, in pixels. */
function widestGap(
  shown: readonly { readonly tick: Tick; readonly p: Point | null }[],
  along: Point,
): number {
  const places = shown
    .filter(({ tick }) => tick.text !== '')
    .map(({ p }) => p![0] * along[0] + p![1] * along[1])
    .sort((a, b) => a - b);
  return places.reduce(
    (widest, place, i) => (i === 0 ? widest : Math.max(widest, place - places[i - 1]!)),
    0,
  );
}

/** The title runs along the ruler where the ruler is on the stage; says whether there was room. */
function drawTitle(
  pen: Pen,
  ruler: Ruler,
  start: Point,
  end: Point,
  along: Point,
  normal: Point,
  length: number,
  out: number,
): boolean {
  if (ruler.title === '') return true;
  const sizePx = 11;
  const width = pen.measure(ruler.title, sizePx);
  if (length < width + 60) return false;
  const [from, to] = shareOnStage(pen, start, end);
  for (const place of TITLE_SHARES) {
    const share = from + place * (to - from);
    const x = start[0] + (end[0] - start[0]) * share + normal[0] * out;
    const y = start[1] + (end[1] - start[1]) * share + normal[1] * out;
    const halfX = (Math.abs(along[0]) * width) / 2 + Math.abs(along[1]) * 7;
    const halfY = (Math.abs(along[1]) * width) / 2 + Math.abs(along[0]) * 7;
    const boxes = slices(x, y, along, width, sizePx);
    const inStage = x - halfX > 4 && x + halfX < pen.width - 4 && y - halfY > 4 && y + halfY < pen.height - 4;
    if (!inStage || !boxes.every((box) => pen.labels.isFree(box, out === NUMBER_OUT_PX ? 6 : -2))) continue;
    for (const box of boxes) pen.labels.reserve(box);
    const { context } = pen;
    let angle = Math.atan2(along[1], along[0]);
    // Read from left to right, whatever the ruler's direction.
    if (angle > Math.PI / 2) angle -= Math.PI;
    if (angle < -Math.PI / 2) angle += Math.PI;
    context.save();
    context.translate(x, y);
    context.rotate(angle);
    pen.font(sizePx);
    pen.write(ruler.title, 0, 0, pen.theme.inkMuted);
    context.restore();
    return true;
  }
  return false;
}

/** The part of a line that lies on the stage, as shares of its length (Liang and Barsky's clipping). */
function shareOnStage(pen: Pen, start: Point, end: Point): [from: number, to: number] {
  let [from, to] = [0, 1];
  for (const [axis, size] of [
    [0, pen.width],
    [1, pen.height],
  ] as const) {
    const step = end[axis] - start[axis];
    if (step === 0) continue;
    const [a, b] = [(0 - start[axis]) / step, (size - start[axis]) / step];
    from = Math.max(from, Math.min(a, b));
    to = Math.min(to, Math.max(a, b));
  }
  return from < to ? [from, to] : [0, 1];
}

/** A slanted text as a row of small boxes. */
function slices(x: number, y: number, along: Point, width: number, sizePx: number) {
  const count = Math.max(1, Math.ceil(width / (sizePx * 1.5)));
  return Array.from({ length: count }, (_, i) => {
    const at = ((i + 0.5) / count - 0.5) * width;
    const half = sizePx * 0.75;
    return { x: x + along[0] * at - half, y: y + along[1] * at - half, width: 2 * half, height: 2 * half };
  });
}
