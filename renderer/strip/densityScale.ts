import { roundTo } from '../../shared-core/base/roundTo.ts';
import { roundStepAbove } from './roundValues.ts';

/** How density is read upward: evenly, or by powers of ten. */
export type Upward = 'linear' | 'log';

/** The upward scale of the strip, in shown units of density. */
export interface DensityScale {
  readonly upward: Upward;
  readonly low: number;
  readonly high: number;
  /** Height over the floor of the plot as a share of the plot; above 1 where it does not fit, null for none. */
  share(density: number): number | null;
}

/** Most powers of ten that are shown: what lies deeper than this below the peak tells nothing. */
const MOST_DECADES = 4;
/** How far a scale of powers of ten goes for the line of n P0 = 1, above and below the peak. */
const DECADES_UP = 2;
const DECADES_DOWN = 6;
/** A bin speaks for the scale when it has this many galaxies; one galaxy in a sliver of volume must not set it. */
const FEWEST_GALAXIES = 3;
const SHARE_OF_FULLEST = 0.02;
/** Bins of few galaxies that reach no higher than this over the others are shown whole all the same. */
const WORTH_SHOWING = 1.6;

export interface BinsSeen {
  readonly count: ArrayLike<number>;
  readonly density: ArrayLike<number>;
  readonly first: number;
  readonly end: number;
}

/** The greatest density that the scale must hold; bins of a few galaxies in a tiny volume may stick out. */
export function greatestDensity({ count, density, first, end }: BinsSeen): number {
  let fullest = 0;
  for (let i = first; i < end; i++) fullest = Math.max(fullest, count[i]!);
  const enough = Math.min(fullest, Math.max(FEWEST_GALAXIES, SHARE_OF_FULLEST * fullest));
  let [greatest, all] = [0, 0];
  for (let i = first; i < end; i++) {
    if (!(count[i]! > 0)) continue;
    all = Math.max(all, density[i]!);
    if (count[i]! >= enough) greatest = Math.max(greatest, density[i]!);
  }
  return all <= WORTH_SHOWING * greatest ? all : greatest;
}

/** Whether the densities in view differ so much that an even scale would hide the thin end. */
export function proposedUpward(bins: BinsSeen): Upward {
  const filled: number[] = [];
  for (let i = bins.first; i < bins.end; i++) if (bins.count[i]! > 0) filled.push(bins.density[i]!);
  if (filled.length < 4) return 'linear';
  filled.sort((a, b) => a - b);
  const low = filled[Math.floor(0.2 * filled.length)]!;
  return greatestDensity(bins) / low > 60 ? 'log' : 'linear';
}

/**
 * @param noiseDensity density at which n P0 = 1, in the same units; the scale reaches to it where that costs little
 */
export function densityScale(bins: BinsSeen, upward: Upward, noiseDensity: number | null): DensityScale {
  const greatest = greatestDensity(bins);
  // An empty strip has no scale of its own; a decade below n P0 = 1 keeps that line in view.
  const peak = greatest > 0 ? greatest : (noiseDensity ?? 1) / 2;
  if (upward === 'linear') {
    const near = noiseDensity !== null && noiseDensity > peak && noiseDensity < 2.2 * peak;
    const high = (near ? noiseDensity : peak) * 1.06;
    return { upward, low: 0, high, share: (v) => (v >= 0 ? v / high : null) };
  }
  let least = peak;
  for (let i = bins.first; i < bins.end; i++)
    if (bins.count[i]! > 0) least = Math.min(least, bins.density[i]!);
  const isNear = noiseDensity !== null && noiseDensity < peak * 10 ** DECADES_UP;
  const high = Math.max(peak, isNear ? noiseDensity : 0) * 1.25;
  const data = Math.max(high / 10 ** MOST_DECADES, least / 2);
  const isInReach = isNear && noiseDensity > high / 10 ** DECADES_DOWN;
  const low = isInReach ? Math.min(data, noiseDensity / 2) : data;
  const decades = Math.log10(high / low);
  return { upward, low, high, share: (v) => (v > 0 ? Math.log10(v / low) / decades : null) };
}

/** Marks of the scale for values that are `times` the density (1 for n, P0 for n P0). */
export function densityMarks(scale: DensityScale, times: number, most: number): readonly number[] {
  const [low, high] = [scale.low * times, scale.high * times];
  if (scale.upward === 'linear') {
    const step = roundStepAbove(high / Math.max(1, most));
    const count = Math.floor(high / step + 1e-9);
    return Array.from({ length: count + 1 }, (_, i) => roundTo(i * step, 12));
  }
  const [from, to] = [Math.ceil(Math.log10(low) - 1e-9), Math.floor(Math.log10(high) + 1e-9)];
  const every = Math.max(1, Math.ceil((to - from + 1) / Math.max(1, most)));
  const marks: number[] = [];
  for (let p = from; p <= to; p++) if (p % every === 0) marks.push(p < 0 ? 1 / 10 ** -p : 10 ** p);
  return marks;
}

/** The power of ten that is taken out of the numbers of an even scale, so that they stay short. */
export function commonPower(high: number): number {
  const power = Math.floor(Math.log10(high) + 1e-9);
  return power >= -2 && power <= 3 ? 0 : power;
}
