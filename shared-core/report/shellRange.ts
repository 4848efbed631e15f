import type { ShellStatistics } from '../shells/shell.ts';

/** The redshift of an edge as it is said in words. */
export const edgeText = (z: number): string => String(Number(z.toFixed(4)));

/** Each shell's redshifts in words, with the signs by which galaxies are counted: the last shell has its upper edge too. */
export function shellRanges(shells: readonly Pick<ShellStatistics, 'zMin' | 'zMax'>[]): string[] {
  return shells.map(
    ({ zMin, zMax }, i) => `${edgeText(zMin)} ≤ z ${i === shells.length - 1 ? '≤' : '<'} ${edgeText(zMax)}`,
  );
}
