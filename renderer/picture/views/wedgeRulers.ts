import type { Pen, Point } from '../../cone/overlay/pen.ts';
import { drawRuler } from '../../cone/overlay/ruler.ts';
import type { RadialScaleInput, Tick } from '../../cone/types.ts';
import { multiples, roundStepAbove, roundValues } from '../../strip/roundValues.ts';
import type { PictureNumbers } from '../numbers.ts';
import { paintEndTitle } from './endTitle.ts';
import type { WedgeLayout } from './wedgeLayout.ts';
import type { WedgeSlab } from './wedgeSlab.ts';

/** From the edge to the ruler that runs beside it. */
const BESIDE = 40;
const AGE_GAP = 52;
const ANGLE_GAP = 70;

/** Lookback time and age along one edge, redshift and distance along the other; on a full circle along four spokes. */
export function paintWedgeRulers(
  pen: Pen,
  numbers: PictureNumbers,
  layout: WedgeLayout,
  scale: RadialScaleInput,
  deepestRedshift: number,
  radius: (mpc: number) => number,
  farMpc: number,
): void {
  const { titles, rulers } = scale;
  const age = {
    title: 'age, Gyr',
    ticks: ageTicks(numbers, layout, deepestRedshift, radius),
  };
  const rows = [
    { title: titles.lookback, ticks: rulers.lookback, share: 1, beside: 0 },
    { ...age, share: 1, beside: BESIDE },
    { title: titles.redshift, ticks: rulers.redshift, share: 0, beside: 0 },
    { title: titles.comoving, ticks: rulers.comoving, share: 0, beside: BESIDE },
  ];
  const [low, high] = layout.range;
  for (const [i, { title, ticks, share, beside }] of rows.entries()) {
    const angle = layout.full ? low + 90 * i : share === 1 ? high : low;
    const awayFrom = layout.at(layout.full ? angle - 20 : (low + high) / 2, 0.6);
    const [tip, end] = [layout.at(angle, 0), layout.at(angle, 1)];
    const normal = normalFrom(tip, end, awayFrom);
    const shift = layout.full ? 0 : beside;
    const at = (mpc: number): Point => {
      const [x, y] = layout.at(angle, radius(mpc));
      return [x + normal[0] * shift, y + normal[1] * shift];
    };
    drawRuler(pen, { title: '', ticks, at, fromMpc: 0, toMpc: farMpc, awayFrom });
    paintEndTitle(pen, title, at(0), at(farMpc));
  }
  const tip = layout.at(low, 0);
  pen.disc(tip, 4.7, pen.theme.background);
  pen.ring(tip, 4, pen.theme.ink, 1.4);
  pen.disc(tip, 1.4, pen.theme.ink);
}

function normalFrom(tip: Point, end: Point, awayFrom: Point): Point {
  const length = Math.hypot(end[0] - tip[0], end[1] - tip[1]);
  const normal: Point = [-(end[1] - tip[1]) / length, (end[0] - tip[0]) / length];
  const side = (awayFrom[0] - tip[0]) * normal[0] + (awayFrom[1] - tip[1]) * normal[1];
  return side > 0 ? [-normal[0], -normal[1]] : normal;
}

function ageTicks(
  { cosmology }: PictureNumbers,
  layout: WedgeLayout,
  deepestRedshift: number,
  radius: (mpc: number) => number,
): Tick[] {
  const now = cosmology.ageGyr(0);
  if (!Number.isFinite(now)) return [];
  const table = cosmology.table();
  const mpcAt = (age: number): number =>
    now - age <= 0 ? 0 : table.comovingMpc(table.redshiftAtLookbackGyr(now - age));
  const place = (age: number): number => layout.radiusUnits * radius(mpcAt(age));
  const low = now - table.lookbackGyr(deepestRedshift);
  return roundValues(low, now, place, () => AGE_GAP).map((age) => ({
    comovingMpc: mpcAt(age),
    text: String(age),
    level: 0,
  }));
}

/** Marks and numbers of the angle at the outer arc. */
export function paintAngles(pen: Pen, layout: WedgeLayout, slab: WedgeSlab): void {
  const [low, high] = layout.range;
  const perDegree = (layout.radiusUnits * layout.factor * Math.PI) / 180;
  const step = angleStep(ANGLE_GAP / perDegree);
  const rim: Point[] = [];
  for (let i = 0; i <= 720; i++) rim.push(layout.at(low + ((high - low) * i) / 720, 1));
  pen.line(rim, pen.theme.line, 1);
  const first = low + slab.origin;
  const last = high + slab.origin - (layout.full ? 1e-6 : 0);
  for (const value of multiplesBetween(first, last, step)) {
    const angle = value - slab.origin;
    pen.line([layout.at(angle, 1), outward(layout, angle, 6)], pen.theme.inkMuted, 1);
    const [x, y] = outward(layout, angle, 24);
    pen.text(slab.angleText(angle), x, y, pen.theme.inkMuted);
  }
}

/** A point so many units beyond the outer arc. */
function outward(layout: WedgeLayout, angle: number, units: number): Point {
  return layout.at(angle, 1 + units / layout.radiusUnits);
}

/** Steps of angle that divide the circle. */
const ANGLE_STEPS = [1, 2, 5, 10, 15, 30, 45, 90];
const angleStep = (least: number): number =>
  least <= 0.5 ? roundStepAbove(least) : (ANGLE_STEPS.find((step) => step >= least) ?? 90);

const multiplesBetween = (low: number, high: number, step: number): number[] =>
  low >= 0 ? multiples(low, high, step) : multiples(low + 720, high + 720, step).map((v) => v - 720);
