import type { Cut } from '../catalogue/catalogue.ts';

/** A cut as it is applied, both bounds included: '18 <= mag <= 22.5'. */
export function cutWords({ column, min, max }: Cut, atMost: '<=' | '≤' = '<='): string {
  if (min === null && max === null) return `${column} without bounds`;
  return `${min === null ? '' : `${min} ${atMost} `}${column}${max === null ? '' : ` ${atMost} ${max}`}`;
}

/** One line on which cuts chose the rows, enough to apply them again. */
export function describeCuts(cuts: readonly Cut[]): string {
  if (cuts.length === 0) return 'Cuts: none.';
  const words = cuts.map((cut) => cutWords(cut)).join('; ');
  return `Cuts: ${words}. Bounds are included; a row without a number in the column fails a bound.`;
}
