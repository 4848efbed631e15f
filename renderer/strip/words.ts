import { formatNumber } from '../../shared-core/report/quantity.ts';
import { countText } from '../ui/numberText.ts';
import { unitText } from '../ui/unitText.ts';
import { markText } from './axisMarks.ts';
import type { Readings } from './readings.ts';

const DECIMALS = { redshift: 4, lookback: 3, comoving: 1 } as const;

/** One redshift in all three readings: z 0.6130, 5.934 Gyr, 2310.4 Mpc. */
export function depthTexts(z: number, readings: Readings): readonly [z: string, gyr: string, mpc: string] {
  const { redshift, lookback, comoving } = readings;
  // Close to the observer four decimals are too few to tell one redshift from the next.
  const decimals = z > 0 && z < 0.01 ? 6 : DECIMALS.redshift;
  return [
    `${redshift.unit} ${z.toFixed(decimals)}`,
    `${lookback.shownAt(z).toFixed(DECIMALS.lookback)} ${lookback.unit}`,
    `${comoving.shownAt(z).toFixed(DECIMALS.comoving)} ${comoving.unit}`,
  ];
}

/** A number with three digits, powers of ten written out: 3.10×10⁻⁴. */
export function shortNumber(value: number): string {
  const [mantissa, power] = formatNumber(value, { significant: 3 }).split('e');
  return power === undefined ? mantissa! : `${mantissa}×${powerOfTen(Number(power))}`;
}

export function powerOfTen(power: number): string {
  return unitText(`10^${power}`);
}

export interface BinWords {
  readonly count: number;
  readonly density: number | null;
  readonly power: number | null;
}

/** What a bin of the histogram says when it is pointed at, line by line. */
export function binTexts(
  from: number,
  to: number,
  unit: string,
  { count, density, power }: BinWords,
  densityUnit: string,
): string[] {
  const range = `${markText(from)} – ${markText(to)}`;
  return [
    unit === 'z' ? `z ${range}` : `${range} ${unit}`,
    `${countText(count)} ${count === 1 ? 'galaxy' : 'galaxies'}`,
    ...(density === null ? [] : [`n = ${shortNumber(density)} ${densityUnit}`]),
    ...(power === null ? [] : [`nP₀ = ${shortNumber(power)}, smoothed`]),
  ];
}

export interface ProfileWords {
  readonly galaxies: number;
  /** Middle of the bin where the smooth curve is highest, in the shown reading, and its density. */
  readonly peak: { readonly at: number; readonly density: number } | null;
  /** First and last place, in the shown reading, where n P0 of the smooth curve is above 1; null where there is none. */
  readonly above: readonly [number, number] | null | 'unknown';
}

/** The histogram in a sentence, for those who do not see it. */
export function profileSentence(
  words: ProfileWords,
  reading: { readonly words: string; readonly unit: string },
  densityUnit: string,
): string {
  if (words.galaxies === 0) return 'No galaxy is in view.';
  const galaxies = `${countText(words.galaxies)} ${words.galaxies === 1 ? 'galaxy is' : 'galaxies are'} in view.`;
  if (words.peak === null) return galaxies;
  const at = (value: number) => `${markText(value)}${reading.unit === 'z' ? '' : ` ${reading.unit}`}`;
  const peak = `The smoothed density is highest near ${reading.words} ${at(words.peak.at)}, ${shortNumber(words.peak.density)} ${densityUnit}.`;
  if (words.above === 'unknown') return `${galaxies} ${peak}`;
  const above =
    words.above === null
      ? 'nP₀ is nowhere above 1.'
      : `nP₀ is above 1 between ${at(words.above[0])} and ${at(words.above[1])}.`;
  return `${galaxies} ${peak} ${above}`;
}
