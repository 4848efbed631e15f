import { LEDGER_GROUPS } from '../../../shared-core/report/ledgerQuantities.ts';
import type { Quantity } from '../../../shared-core/report/quantity.ts';
import { SHELL_QUANTITIES } from '../../../shared-core/report/shellQuantities.ts';
import type { ShellStatistics } from '../../../shared-core/shells/shell.ts';

/** A column of the ledger: one number a row, or two or three that are read together, one above the other. */
export interface LedgerColumn {
  readonly quantities: readonly Quantity<ShellStatistics>[];
  /** Shorter headings than the quantities' own titles, where room is short. */
  readonly headings?: readonly string[];
  /** Room in characters, for the widest number that is usual: columns keep their width while numbers change. */
  readonly characters: number;
}

const byKey = new Map(SHELL_QUANTITIES.map((q) => [q.key, q]));

const NARROW_CHARACTERS = [7, 8, 9, 9.5, 7];

/** The columns beside the cone. */
export const NARROW_LEDGER: readonly LedgerColumn[] = LEDGER_GROUPS.map((keys, i) => ({
  ...column(NARROW_CHARACTERS[i]!, ...keys),
  ...(keys[0] === 'lookbackMinGyr' ? { headings: ['t_L min', 't_L max'] } : {}),
}));

/** Every number of the core, in the room over the cone of the smallest window. */
export const WHOLE_LEDGER: readonly LedgerColumn[] = [
  column(7.5, 'zMin', 'zMax'),
  column(9, 'count', 'weightedCount'),
  column(8.5, 'zMean', 'zMedian', 'zEffective'),
  column(8, 'comovingMinMpc', 'comovingMaxMpc'),
  { ...column(8, 'lookbackMinGyr', 'lookbackMaxGyr'), headings: ['t_L min', 't_L max'] },
  { ...column(8, 'ageMinGyr', 'ageMaxGyr'), headings: ['age min', 'age max'] },
  column(9.5, 'densityPerMpc3', 'densityErrorPerMpc3'),
  column(11, 'volumeMpc3', 'effectiveVolumeMpc3', 'effectiveVolumeUniformMpc3'),
  { ...column(9, 'fundamentalWavenumberPerMpc'), headings: ['k fund'] },
];

function column(characters: number, ...keys: readonly string[]): LedgerColumn {
  return { quantities: keys.map((key) => byKey.get(key)!), characters };
}
