import type { Cosmology } from '../../shared-core/cosmology/cosmology.ts';
import { edgesOf } from '../../shared-core/shells/edges.ts';
import type { SortedSample } from '../../shared-core/shells/sample.ts';
import type { ShellScheme } from '../../shared-core/shells/shell.ts';
import type { Edit } from '../../shared-core/study/edits.ts';
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
