import {
  KM_PER_MPC,
  SECONDS_PER_GYR,
  SPEED_OF_LIGHT_KM_S,
} from '../../../shared-core/cosmology/constants.ts';
import type { Pen, Point } from '../../cone/overlay/pen.ts';
import { drawRuler } from '../../cone/overlay/ruler.ts';
import type { Tick } from '../../cone/types.ts';
import { markText } from '../../strip/axisMarks.ts';
import { roundValues } from '../../strip/roundValues.ts';
import type { PictureNumbers } from '../numbers.ts';
import { paintEndTitle } from './endTitle.ts';
import type { ConeOfLight } from './lightConeLayout.ts';

/** Gyr that light takes for a comoving Mpc today. */
const GYR_PER_MPC = KM_PER_MPC / SPEED_OF_LIGHT_KM_S / SECONDS_PER_GYR;
const REDSHIFTS: readonly (readonly [z: number, level: number])[] = [
  [0.2, 1],
  [0.5, 0],
  [1, 0],
  [2, 0],
  [3, 1],
  [5, 0],
  [10, 0],
  [30, 1],
  [100, 1],
  [1100, 0],
];
const AGES: readonly (readonly [gyr: number, level: number])[] = [
  [0, 0],
  [0.5, 1],
  [1, 0],
  [2, 0],
  [4, 0],
  [7, 0],
  [10, 0],
  [13, 1],
];
const BESIDE = 44;
const GAP = 46;
const SMALL_GAP = 22;

/** Redshift and lookback time along the cone, conformal time and age beside it, distance below. */
export function paintLightConeRulers(pen: Pen, numbers: PictureNumbers, layout: ConeOfLight): void {
  const { cosmology, readings } = numbers;
  const { depthMpc, unitsPerMpc, flat, edge } = layout;
  const table = cosmology.table();
  const now = cosmology.ageGyr(0);
  const middle = flat(0, depthMpc / 2);
  const along = (title: string, ticks: readonly Tick[], at: (mpc: number) => Point): void =>
    drawRuler(pen, { title, ticks, at, fromMpc: 0, toMpc: depthMpc, awayFrom: middle });

  const redshifts = REDSHIFTS.map(([z, level]) => ({
    comovingMpc: table.comovingMpc(z),
    text: String(z),
    level,
  })).filter((tick) => tick.comovingMpc < depthMpc);
  along('redshift', redshifts, (mpc) => edge(1, mpc));

  const distanceAt = (gyr: number): number => table.comovingMpc(table.redshiftAtLookbackGyr(gyr));
  const deepest = table.lookbackGyr(Math.min(1100, cosmology.redshiftAtComovingMpc(depthMpc * 0.95)));
  const ticksOf = (high: number, place: (value: number) => number, gap = GAP): number[] =>
    roundValues(
      0,
      high,
      (value) => place(value) * unitsPerMpc,
      () => gap,
    );
  const lookback = ticksOf(deepest, (gyr) => (gyr <= 0 ? 0 : distanceAt(gyr)), SMALL_GAP);
  along(
    'lookback time, Gyr',
    lookback.map((gyr) => ({ comovingMpc: gyr <= 0 ? 0 : distanceAt(gyr), text: String(gyr), level: 0 })),
    (mpc) => edge(-1, mpc),
  );

  const left = -depthMpc;
  const beside = BESIDE / unitsPerMpc;
  if (layout.horizon) {
    // Heights: conformal time since the beginning, and the age of the universe that belongs to it.
    const conformalNow = depthMpc * GYR_PER_MPC;
    const conformal = ticksOf(conformalNow, (gyr) => gyr / GYR_PER_MPC);
    const conformalAt = (mpc: number): Point => flat(left - beside, mpc);
    paintEndTitle(pen, 'conformal time, Gyr', conformalAt(depthMpc), conformalAt(0));
    along(
      '',
      conformal.map((gyr) => ({ comovingMpc: depthMpc - gyr / GYR_PER_MPC, text: String(gyr), level: 0 })),
      conformalAt,
    );
    const heightOfAge = (gyr: number): number =>
      gyr >= now ? 0 : gyr <= 0 ? depthMpc : cosmology.comovingMpc(cosmology.redshiftAtAgeGyr(gyr));
    const ages = AGES.filter(([gyr]) => gyr < now);
    const ageAt = (mpc: number): Point => flat(-left + beside, mpc);
    paintEndTitle(pen, 'age of the universe, Gyr', ageAt(depthMpc), ageAt(0));
    along(
      '',
      ages.map(([gyr, level]) => ({ comovingMpc: heightOfAge(gyr), text: String(gyr), level })),
      ageAt,
    );
  }
  const { factor, unit, words } = readings.comoving;
  const distances = ticksOf(depthMpc * factor, (shown) => shown / factor);
  const ticks = distances.map((shown) => ({ comovingMpc: shown / factor, text: markText(shown), level: 0 }));
  const below = layout.arc(depthMpc, 'front')[90]![1] + 14;
  for (const side of [1, -1])
    along('', side > 0 ? ticks : ticks.filter((tick) => tick.comovingMpc > 0), (mpc) => [
      flat(side * mpc, 0)[0],
      below,
    ]);
  pen.text(`${words}, ${unit}`, middle[0], below + 36, pen.theme.inkMuted);
}
