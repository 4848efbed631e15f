import { roundTo } from '../../shared-core/base/roundTo.ts';
import { roundStepAbove } from '../strip/roundValues.ts';
import type { Place, SkyLines } from './outlines.ts';
import type { MapBox } from './skyFrames.ts';
import { outlineProjection, type SkyFrame, skyAt } from './skyProjection.ts';

/** A label of the graticule. */
interface SkyLabel {
  readonly text: string;
  readonly x: number;
  readonly y: number;
  readonly anchor: 'start' | 'middle' | 'end';
}

export interface Graticule {
  readonly lines: SkyLines;
  readonly labels: readonly SkyLabel[];
}

/** Round steps of degrees above 10; below, steps are 1, 2 or 5 times a power of ten. */
const WIDE_STEPS = [10, 15, 30, 45, 60, 90];
const LINES_WANTED = 4;
const POINTS_PER_LINE = 48;

/** Declinations along which right ascensions may be written on the map of the whole sky, the best first. */
const WRITING_DEC_DEG = [0, 45, -45];

/**
 * Circles of right ascension and declination with their values.
 * @param avoid pixels that the values written into the map of the whole sky should keep clear of
 */
export function graticule(
  frame: SkyFrame,
  box: MapBox,
  fontPx: number,
  avoid: readonly (readonly [x: number, y: number])[] = [],
): Graticule {
  return frame.kind === 'hammer' ? wholeSky(frame, fontPx, avoid) : closeLook(frame, box, fontPx);
}

function wholeSky(frame: SkyFrame, fontPx: number, avoid: readonly (readonly [number, number])[]): Graticule {
  const project = outlineProjection(frame);
  const coordinates: Place[][] = [];
  const labels: SkyLabel[] = [];
  const meridians: number[] = [];
  for (let ra = 0; ra < 360; ra += 60) {
    // The meridian opposite the centre is the rim itself.
    const away = (ra - frame.centreRaDeg + 540) % 360;
    coordinates.push(meridian(ra, -90, 90));
    if (away < 1 || away > 359) continue;
    meridians.push(ra);
  }
  const rows = WRITING_DEC_DEG.map((dec) =>
    meridians.map((ra): SkyLabel => {
      const [x, y] = project([ra, dec])!;
      return { text: raText(ra), x, y: y + fontPx * 0.4, anchor: 'middle' };
    }),
  );
  const hidden = (row: readonly SkyLabel[]) => row.filter((label) => isNear(label, avoid, fontPx)).length;
  const clearest = rows.reduce((best, row) => (hidden(row) < hidden(best) ? row : best));
  labels.push(...withoutCrowding(clearest, fontPx));
  for (const dec of [-60, -30, 0, 30, 60]) {
    coordinates.push(parallel(dec, frame.centreRaDeg - 179.999, frame.centreRaDeg + 179.999));
    const [x, y] = project([frame.centreRaDeg + 179.999, dec])!;
    labels.push({ text: decText(dec), x: x - 4, y: y + fontPx * 0.35, anchor: 'end' });
  }
  return { lines: { type: 'MultiLineString', coordinates }, labels };
}

function closeLook(frame: SkyFrame, box: MapBox, fontPx: number): Graticule {
  const seen = seenRange(frame, box);
  if (seen === null) return { lines: { type: 'MultiLineString', coordinates: [] }, labels: [] };
  const { decMin, decMax, raMin, raMax } = seen;
  const decStep = stepFor(decMax - decMin);
  const raStep = raMax - raMin >= 360 ? 30 : stepFor(raMax - raMin);
  const project = outlineProjection(frame);
  const coordinates: Place[][] = [];
  const labels: SkyLabel[] = [];
  for (let i = Math.ceil(decMin / decStep); i * decStep <= decMax; i++) {
    const dec = clean(i * decStep);
    if (Math.abs(dec) === 90) continue;
    const line = parallel(dec, raMin, raMax);
    coordinates.push(line);
    const points = line.map((p) => project(p));
    const y = crossing(points, box.left, 0);
    if (y === null) {
      // A circle that does not reach the left side is named inside, over the middle.
      const middle = (box.left + box.right) / 2;
      const inside = crossing(points, middle, 0);
      if (inside !== null && inside > box.top + fontPx && inside < box.bottom - fontPx * 0.3)
        labels.push({ text: decText(dec), x: middle, y: inside + fontPx * 0.35, anchor: 'middle' });
      continue;
    }
    if (y < box.top + fontPx * 0.3 || y > box.bottom - fontPx * 0.3) continue;
    const text = decText(dec);
    // What is too long for the room at the left stands inside.
    const fits = text.length * 0.6 * fontPx < box.left - 4;
    labels.push({
      text,
      x: fits ? box.left - 4 : box.left + 4,
      y: y + fontPx * 0.35,
      anchor: fits ? 'end' : 'start',
    });
  }
  for (let i = Math.ceil(raMin / raStep); i * raStep <= raMax && i * raStep < raMin + 360; i++) {
    const ra = clean(i * raStep);
    const line = meridian(ra, decMin, decMax);
    coordinates.push(line);
    const x = crossing(
      line.map((p) => project(p)),
      box.bottom,
      1,
    );
    const half = raText(ra).length * 0.31 * fontPx;
    if (x === null || x < box.left || x > box.right - half) continue;
    labels.push({
      text: raText(((ra % 360) + 360) % 360),
      x,
      y: box.bottom + fontPx * 1.1,
      anchor: 'middle',
    });
  }
  return { lines: { type: 'MultiLineString', coordinates }, labels: withoutCrowding(labels, fontPx) };
}

function isNear(label: SkyLabel, avoid: readonly (readonly [number, number])[], fontPx: number): boolean {
  return avoid.some(([x, y]) => Math.abs(x - label.x) < 2.6 * fontPx && Math.abs(y - label.y) < 1.6 * fontPx);
}

/** Ranges of RA (continuous, around the centre) and Dec that the box shows. */
function seenRange(frame: SkyFrame, box: MapBox) {
  let [decMin, decMax, raMin, raMax] = [90, -90, Infinity, -Infinity];
  const steps = 12;
  for (let i = 0; i <= steps; i++)
    for (let j = 0; j <= steps; j++) {
      const x = box.left + ((box.right - box.left) * i) / steps;
      const y = box.top + ((box.bottom - box.top) * j) / steps;
      const at = skyAt(frame, x, y);
      if (at === null) continue;
      const ra = frame.centreRaDeg + ((at.raDeg - frame.centreRaDeg + 540) % 360) - 180;
      decMin = Math.min(decMin, at.decDeg);
      decMax = Math.max(decMax, at.decDeg);
      raMin = Math.min(raMin, ra);
      raMax = Math.max(raMax, ra);
    }
  if (!(raMax > raMin)) return null;
  const project = outlineProjection(frame);
  for (const pole of [-90, 90]) {
    const [x, y] = project([0, pole])!;
    if (x < box.left || x > box.right || y < box.top || y > box.bottom) continue;
    [raMin, raMax] = [frame.centreRaDeg - 180, frame.centreRaDeg + 180];
    [decMin, decMax] = [Math.min(decMin, pole), Math.max(decMax, pole)];
  }
  return { decMin, decMax, raMin, raMax };
}

function stepFor(rangeDeg: number): number {
  const wanted = rangeDeg / LINES_WANTED;
  return wanted <= 5 ? roundStepAbove(wanted) : (WIDE_STEPS.find((s) => s >= wanted) ?? 90);
}

/** Where a run of points first crosses x = at (axis 0) or y = at (axis 1): the other coordinate. */
function crossing(points: readonly ([number, number] | null)[], at: number, axis: 0 | 1): number | null {
  for (let i = 1; i < points.length; i++) {
    const [a, b] = [points[i - 1], points[i]];
    if (a == null || b == null || (a[axis] - at) * (b[axis] - at) > 0 || a[axis] === b[axis]) continue;
    const t = (at - a[axis]) / (b[axis] - a[axis]);
    const other = axis === 0 ? 1 : 0;
    return a[other] + t * (b[other] - a[other]);
  }
  return null;
}

function withoutCrowding(labels: readonly SkyLabel[], fontPx: number): SkyLabel[] {
  const kept: SkyLabel[] = [];
  for (const label of labels) {
    const crowded = kept.some((other) => {
      const width =
        label.anchor === 'middle' ? (label.text.length + other.text.length) * 0.31 * fontPx + 6 : 1;
      return Math.abs(other.x - label.x) < width && Math.abs(other.y - label.y) < fontPx * 1.2;
    });
    if (!crowded) kept.push(label);
  }
  return kept;
}

function meridian(ra: number, decMin: number, decMax: number): Place[] {
  return Array.from({ length: POINTS_PER_LINE + 1 }, (_, i) => [
    ra,
    decMin + ((decMax - decMin) * i) / POINTS_PER_LINE,
  ]);
}

function parallel(dec: number, raMin: number, raMax: number): Place[] {
  return Array.from({ length: POINTS_PER_LINE + 1 }, (_, i) => [
    raMin + ((raMax - raMin) * i) / POINTS_PER_LINE,
    dec,
  ]);
}

export function raText(raDeg: number): string {
  return `${clean(raDeg)}°`;
}

export function decText(decDeg: number): string {
  const value = clean(decDeg);
  return value === 0 ? '0°' : `${value > 0 ? '+' : '−'}${Math.abs(value)}°`;
}

function clean(value: number): number {
  return roundTo(value, 10);
}
