import type { ShellStatistics } from '../shells/shell.ts';

/** Each shell's redshifts in words, with the signs by which galaxies are counted: the last shell has its upper edge too. */
export function shellRanges(shells: readonly Pick<ShellStatistics, 'zMin' | 'zMax'>[]): string[] {
  const text = (z: number) => String(Number(z.toFixed(4)));
  return shells.map(
    ({ zMin, zMax }, i) => `${text(zMin)} ≤ z ${i === shells.length - 1 ? '≤' : '<'} ${text(zMax)}`,
  );
}
