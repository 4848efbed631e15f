import { SPEED_OF_LIGHT_KM_S } from '../base/light.ts';
import type { RadialKind, SetAsideReason } from './catalogue.ts';
import type { DecimalMark } from './formats/delimited/decimals.ts';
import { isMissing, parseCommaNumber, parseNumber } from './numbers.ts';

/** Largest redshift taken: tables of distance end here, at about the time the universe became transparent. */
export const LARGEST_REDSHIFT = 1100;

/** Places of a row's values: the required ones first, in this order; the weight only where there is one. */
export const RA = 0;
export const DEC = 1;
export const RADIAL = 2;
export const WEIGHT = 3;

/** The redshift that a radial value stands for: itself, or cz/c for a velocity in km/s (the optical convention). */
export function redshiftOf(radial: number, kind: RadialKind): number {
  return kind === 'czKmS' ? radial / SPEED_OF_LIGHT_KM_S : radial;
}

/** Why a row is not usable, and the place of the value to blame for it (-1: none in particular). */
export interface Fault {
  readonly reason: SetAsideReason;
  readonly place: number;
}

const WRONG_FIELD_COUNT: Fault = { reason: 'wrongFieldCount', place: -1 };
const RA_OUT_OF_RANGE: Fault = { reason: 'raOutOfRange', place: RA };
const DEC_OUT_OF_RANGE: Fault = { reason: 'decOutOfRange', place: DEC };
const REDSHIFT_NOT_ABOVE_ZERO: Fault = { reason: 'redshiftNotAboveZero', place: RADIAL };
const REDSHIFT_TOO_LARGE: Fault = { reason: 'redshiftTooLarge', place: RADIAL };
const WEIGHT_NEGATIVE: Fault = { reason: 'weightNegative', place: WEIGHT };

/**
 * Judges the numbers of a row by the ranges: RA in [0, 360] and Dec in [-90, 90] degrees, redshift in (0, 1100],
 * weight not below 0. The first `required` values are numbers. Null: nothing is wrong. Region and cuts come after
 * this (selection.ts).
 */
export function judgeNumbers(values: ArrayLike<number>, required: number, kind: RadialKind): Fault | null {
  const ra = values[RA]!;
  const dec = values[DEC]!;
  if (!(ra >= 0 && ra <= 360)) return RA_OUT_OF_RANGE;
  if (!(dec >= -90 && dec <= 90)) return DEC_OUT_OF_RANGE;
  const redshift = redshiftOf(values[RADIAL]!, kind);
  if (!(redshift > 0)) return REDSHIFT_NOT_ABOVE_ZERO;
  if (redshift > LARGEST_REDSHIFT) return REDSHIFT_TOO_LARGE;
  if (required > WEIGHT && values[WEIGHT]! < 0) return WEIGHT_NEGATIVE;
  return null;
}

/**
 * Reads the wanted cells of a row of text into `values` (NaN where a cell holds no number) and judges what text can
 * be at fault for: the number of fields, and required values that are missing (looked for first, in all of them) or
 * no numbers. Null: the required values are numbers.
 */
export function readText(
  row: readonly string[],
  width: number,
  wanted: readonly number[],
  required: number,
  values: Float64Array,
  mark: DecimalMark,
): Fault | null {
  if (row.length !== width) return WRONG_FIELD_COUNT;
  const parse = mark === ',' ? parseCommaNumber : parseNumber;
  let unread = -1;
  for (let place = wanted.length - 1; place >= 0; place--) {
    values[place] = parse(row[wanted[place]!]!);
    if (place < required && Number.isNaN(values[place])) unread = place;
  }
  if (unread === -1) return null;
  for (let place = unread; place < required; place++) {
    if (isMissing(row[wanted[place]!]!)) return { reason: 'missingValue', place };
  }
  return { reason: 'notANumber', place: unread };
}

/** Where the parts of a row stand among its cells. */
export interface RowLayout {
  /** Columns of the header. */
  readonly cells: number;
  readonly ra: number;
  readonly dec: number;
  readonly radial: number;
  readonly radialKind: RadialKind;
  /** -1: no weight column, every galaxy weighs 1. */
  readonly weight: number;
  readonly decimalMark: DecimalMark;
}

/** Judges single rows of text, for showing: all that loading does but region and cuts. */
export class RowCleaner {
  /** The cell to blame for the last reason, or -1. */
  blamedCell = -1;
  readonly #layout: RowLayout;
  readonly #wanted: readonly number[];
  readonly #values: Float64Array;

  constructor(layout: RowLayout) {
    const { ra, dec, radial, weight } = layout;
    this.#layout = layout;
    this.#wanted = weight === -1 ? [ra, dec, radial] : [ra, dec, radial, weight];
    this.#values = new Float64Array(this.#wanted.length);
  }

  /** Why the row cannot be used, or null for a usable one. */
  judge(row: readonly string[]): SetAsideReason | null {
    const required = this.#wanted.length;
    const { cells, radialKind, decimalMark } = this.#layout;
    const fault =
      readText(row, cells, this.#wanted, required, this.#values, decimalMark) ??
      judgeNumbers(this.#values, required, radialKind);
    this.blamedCell = fault === null ? -1 : (this.#wanted[fault.place] ?? -1);
    return fault === null ? null : fault.reason;
  }
}
