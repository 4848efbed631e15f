import type { ShellStatistics } from '../shells/shell.ts';
import type { Quantity } from './quantity.ts';
import { SHELL_QUANTITIES } from './shellQuantities.ts';

/** The numbers that a reader of shells asks for first, in the groups that are read together. */
export const LEDGER_GROUPS = [
  ['zMin', 'zMax'],
  ['count', 'zEffective'],
  ['densityPerMpc3', 'densityErrorPerMpc3'],
  ['volumeMpc3', 'effectiveVolumeMpc3'],
  ['lookbackMinGyr', 'lookbackMaxGyr'],
] as const;

const byKey = new Map(SHELL_QUANTITIES.map((q) => [q.key, q]));

/** The ledger beside the cone and the LaTeX tabular: what fits a page. Other forms have every quantity. */
export const LEDGER_QUANTITIES: readonly Quantity<ShellStatistics>[] = LEDGER_GROUPS.flatMap((keys) =>
  keys.map((key) => byKey.get(key)!),
);
