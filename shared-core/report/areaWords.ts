import { roundTo } from '../base/roundTo.ts';
import type { Footprint } from '../sky/region.ts';

type Area = Pick<Footprint, 'areaDeg2' | 'estimate'>;

/**
 * A value and its error as they are written together: the error with two digits (whole from 100 on), the value to the same decimals.
 * @param error above or equal to 0; a value without error has seven digits
 */
export function withError(value: number, error: number): { readonly value: string; readonly error: string } {
  if (!(error > 0 && Number.isFinite(error))) return { value: String(roundTo(value, 7)), error: '0' };
  const decimals = Math.max(0, 1 - Number(error.toExponential(1).split('e')[1]));
  return { value: value.toFixed(decimals), error: error.toFixed(decimals) };
}

/** The area in square degrees as it is shown, with its error where it is an estimate (null: exact). */
export function areaText({ areaDeg2, estimate }: Area): {
  readonly value: string;
  readonly error: string | null;
} {
  if (estimate === null) return { value: String(roundTo(areaDeg2, 7)), error: null };
  return withError(areaDeg2, estimate.areaErrorDeg2);
}

/** How an estimated area follows from its cells, with the numbers that add up to it. */
export function estimateWords(estimate: NonNullable<Footprint['estimate']>): string {
  const { cells, cellAreaDeg2, nside, borderCells, borderAsCells } = estimate;
  const from = `from ${cells} occupied equal-area ${cells === 1 ? 'cell' : 'cells'} of ${roundTo(cellAreaDeg2, 4)} deg^2 (HEALPix Nside ${nside})`;
  const inside = cells - borderCells;
  if (borderCells === 0) return `${from}, all counted whole`;
  const share = borderAsCells.toFixed(1);
  if (inside === 0 && cells === 1)
    return `${from}: it is on the border, covered in a part that nobody knows, and counts as half a cell`;
  if (inside === 0)
    return `${from}: all are on the border, each covered in a part that nobody knows, and count as half of them, ${share}`;
  return (
    `${from}: ${inside} inside the field count whole, and ${borderCells} on its border count as ${share}, as many as would ` +
    `hold their galaxies at the density just inside, which makes ${(inside + borderAsCells).toFixed(1)} cells`
  );
}
