import type { Quantity } from '../../../shared-core/report/quantity.ts';
import type { ShellStatistics } from '../../../shared-core/shells/shell.ts';

/** By which quantity the ledger is ordered; null keeps the order of the shells. */
export interface LedgerOrder {
  readonly key: string;
  readonly direction: 'ascending' | 'descending';
}

/**
 * The indices of the shells in the order asked for. Equal ones keep the order of redshift; shells without the number
 * come last either way.
 */
export function sortShells(
  shells: readonly ShellStatistics[],
  order: LedgerOrder | null,
  quantities: readonly Quantity<ShellStatistics>[],
): number[] {
  const indices = shells.map((_, i) => i);
  const quantity = quantities.find((q) => q.key === order?.key);
  if (order === null || quantity === undefined) return indices;
  const sign = order.direction === 'ascending' ? 1 : -1;
  const values = shells.map((shell) => quantity.value(shell));
  return indices.sort((a, b) => {
    const [x, y] = [values[a]!, values[b]!];
    if (x === null || y === null) return x === y ? a - b : x === null ? 1 : -1;
    return sign * (x - y) || a - b;
  });
}

/** A column pressed: ascending first, then descending, then back to the order of the shells. */
export function nextOrder(order: LedgerOrder | null, key: string): LedgerOrder | null {
  if (order?.key !== key) return { key, direction: 'ascending' };
  return order.direction === 'ascending' ? { key, direction: 'descending' } : null;
}
