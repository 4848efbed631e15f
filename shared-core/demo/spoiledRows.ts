import type { SetAsideReason } from '../catalogue/catalogue.ts';
import type { Random } from '../numerics/random.ts';
import { BRIGHT_STAR } from './scenario.ts';

/** Cells of a good row after its id: ra, dec, z, mag, colour, weight, field. */
type Cells = readonly string[];

/** A fault as real files have it: how often, why the row must be set aside, and how a good row is spoiled. */
export interface Fault {
  readonly reason: SetAsideReason;
  readonly rows: number;
  spoil(cells: Cells, random: Random): Cells;
}

const RA = 0;
const DEC = 1;
const Z = 2;
const WEIGHT = 5;

export const FAULTS: readonly Fault[] = [
  // A line torn off in the middle, and one with a comment at its end.
  { reason: 'wrongFieldCount', rows: 5, spoil: (cells) => cells.slice(0, 3) },
  { reason: 'wrongFieldCount', rows: 4, spoil: (cells) => [...cells, 'seen twice'] },
  { reason: 'missingValue', rows: 44, spoil: (cells) => put(cells, Z, '') },
  { reason: 'missingValue', rows: 5, spoil: (cells) => put(cells, RA, '') },
  { reason: 'missingValue', rows: 3, spoil: (cells) => put(cells, DEC, '') },
  { reason: 'notANumber', rows: 19, spoil: (cells) => put(cells, Z, `${cells[Z]}?`) },
  { reason: 'notANumber', rows: 8, spoil: (cells) => put(cells, Z, 'no lines') },
  { reason: 'notANumber', rows: 4, spoil: (cells) => put(cells, RA, '13h52m') },
  { reason: 'raOutOfRange', rows: 14, spoil: (cells) => put(cells, RA, `361.${fraction(cells[RA]!)}`) },
  { reason: 'decOutOfRange', rows: 7, spoil: (cells) => put(cells, DEC, `-91.${fraction(cells[DEC]!)}`) },
  // Stars of our own Galaxy, some of them coming nearer, and the mark of a failed fit.
  { reason: 'redshiftNotAboveZero', rows: 34, spoil: (cells, random) => put(cells, Z, starRedshift(random)) },
  { reason: 'redshiftNotAboveZero', rows: 27, spoil: (cells) => put(cells, Z, '-9.99000') },
  { reason: 'redshiftNotAboveZero', rows: 2, spoil: (cells) => put(cells, Z, '0.00000') },
  { reason: 'redshiftTooLarge', rows: 3, spoil: (cells) => put(cells, Z, '9999.00000') },
  { reason: 'weightNegative', rows: 5, spoil: (cells) => put(cells, WEIGHT, '-1.000') },
  // Ghosts of the bright star, which the region leaves out.
  { reason: 'outsideRegion', rows: 24, spoil: nearStar },
];

function put(cells: Cells, at: number, text: string): Cells {
  return cells.map((cell, i) => (i === at ? text : cell));
}

function fraction(number: string): string {
  return number.slice(number.indexOf('.') + 1);
}

function starRedshift(random: Random): string {
  return (-0.0004 * random.uniform() - 0.00001).toFixed(5);
}

function nearStar(cells: Cells, random: Random): Cells {
  const reach = 0.6 * BRIGHT_STAR.radiusDeg;
  const ra = (BRIGHT_STAR.raDeg + reach * (2 * random.uniform() - 1)).toFixed(6);
  return put(put(cells, RA, ra), DEC, (BRIGHT_STAR.decDeg + reach * (2 * random.uniform() - 1)).toFixed(6));
}
