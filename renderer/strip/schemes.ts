import { roundTo } from '../../shared-core/base/roundTo.ts';
import type { Cosmology } from '../../shared-core/cosmology/cosmology.ts';
import { DEEPEST_REDSHIFT, edgesOf } from '../../shared-core/shells/edges.ts';
import type { SortedSample } from '../../shared-core/shells/sample.ts';
import type { ShellScheme } from '../../shared-core/shells/shell.ts';
import type { Edit } from '../../shared-core/study/edits.ts';
import type { TypedRange } from '../state/viewState.ts';
import { readNumber } from '../ui/numberText.ts';
import type { RedshiftWindow } from './layout.ts';

export type DividingScheme = Exclude<ShellScheme['kind'], 'edges'>;

/** The core's schemes in the order of the strip's buttons; `label` is short, `words` complete "shells of equal ...". */
export const DIVIDING_SCHEMES: readonly {
  readonly kind: DividingScheme;
  readonly label: string;
  readonly words: string;
}[] = [
  { kind: 'redshift', label: 'z', words: 'redshift' },
  { kind: 'comoving', label: 'Mpc', words: 'comoving thickness' },
  { kind: 'lookback', label: 'Gyr', words: 'lookback time' },
  { kind: 'volume', label: 'volume', words: 'volume' },
  { kind: 'count', label: 'count', words: 'number of galaxies' },
];

export interface DividedRange {
  readonly zMin: number | null;
  readonly zMax: number | null;
}

/**
 * What is divided: the present shells from first to last edge, or (`wholeSample`, or without shells) all galaxies;
 * with neither, what is in view.
 */
export function rangeToDivide(
  edges: readonly number[],
  galaxies: number,
  wholeSample: boolean,
  inView: RedshiftWindow,
): DividedRange {
  const [first, last] = [edges[0], edges.at(-1)];
  const hasShells = first !== undefined && last !== undefined && edges.length > 1;
  if (galaxies > 0 && (wholeSample || !hasShells)) return { zMin: null, zMax: null };
  return hasShells ? { zMin: first, zMax: last } : { zMin: inView[0], zMax: inView[1] };
}

/** The same in numbers: where the range begins and ends while nothing is typed; null before there is anything. */
export function rangeInNumbers({ zMin, zMax }: DividedRange, { redshift, count }: SortedSample) {
  const [least, greatest] = count === 0 ? [null, null] : [redshift[0]!, redshift[count - 1]!];
  return { from: zMin ?? least, to: zMax ?? greatest };
}

/** Why a range cannot be, and the ends that are to be mended. */
interface RangeTrouble {
  readonly sentence: string;
  readonly at: readonly ('from' | 'to')[];
}

/**
 * What was typed as the range of new shells, over the range that stands where a field is empty.
 * @returns the range, or the sentence that says why there is none and what to do
 */
export function typedRange(
  typed: TypedRange,
  untyped: DividedRange,
  sample: SortedSample,
): DividedRange | RangeTrouble {
  const ends = { from: untyped.zMin, to: untyped.zMax };
  for (const end of ['from', 'to'] as const) {
    if (typed[end].trim() === '') continue;
    const where = end === 'from' ? 'begins' : 'ends';
    const read = readNumber(
      typed[end],
      `The redshift where the shells are to ${end === 'from' ? 'begin' : 'end'}`,
    );
    if ('sentence' in read) return { ...read, at: [end] };
    if (!(read.value >= 0 && read.value <= DEEPEST_REDSHIFT))
      return {
        sentence: `The range ${where} at z ${read.value}: give a redshift from 0 to ${DEEPEST_REDSHIFT}.`,
        at: [end],
      };
    ends[end] = read.value;
  }
  const range = { zMin: ends.from, zMax: ends.to };
  const { from, to } = rangeInNumbers(range, sample);
  if (typed.from.trim() + typed.to.trim() !== '' && from !== null && to !== null && from >= to)
    return {
      sentence: `The range begins at z ${shortRedshift(from)} and ends at z ${shortRedshift(to)}: give an end behind the beginning.`,
      at: ['from', 'to'],
    };
  return range;
}

/** A redshift in a few digits, for a sentence. */
export function shortRedshift(z: number): string {
  return String(roundTo(z, 4));
}

/** A redshift in six characters, for a field that has little room. */
export function fieldRedshift(z: number): string {
  return z !== 0 && Math.abs(z) < 0.001 ? z.toExponential(1) : String(Number(z.toPrecision(3)));
}

/** Puts n shells of a scheme in place of the present ones. The edit throws a Refusal where the scheme cannot be. */
export function divideShells(
  kind: DividingScheme,
  shells: number,
  range: DividedRange,
  sample: SortedSample,
  cosmology: Cosmology,
): Edit {
  const words = DIVIDING_SCHEMES.find((scheme) => scheme.kind === kind)!.words;
  return {
    label: `Divide into ${shells} shell${shells === 1 ? '' : 's'} of equal ${words}`,
    apply: (study) => ({ ...study, edges: [...edgesOf({ kind, shells, ...range }, sample, cosmology)] }),
  };
}
