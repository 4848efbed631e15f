import { SPEED_OF_LIGHT_KM_S } from '../base/light.ts';
import type { RadialKind, SetAsideReason } from './catalogue.ts';
import { isMissing, parseNumber } from './numbers.ts';

/** Largest redshift taken: tables of distance end here, at about the time the universe became transparent. */
export const LARGEST_REDSHIFT = 1100;

/** Where the parts of a row stand among its cells. */
export interface RowLayout {
  readonly cells: number;
  readonly ra: number;
  readonly dec: number;
  readonly radial: number;
  readonly radialKind: RadialKind;
  /** -1: no weight column, every galaxy weighs 1. */
  readonly weight: number;
}

/**
 * Judges rows of text one after the other, in the order of SET_ASIDE_REASONS up to weightNegative; region and cuts
 * come after it (selection.ts). Units: degrees as read; redshift from z, or cz/c for a velocity in km/s.
 *
 * One object for all rows: after `judge` its fields are those of the last row, so that no row costs an allocation.
 */
export class RowCleaner {
  raDeg = Number.NaN;
  decDeg = Number.NaN;
  redshift = Number.NaN;
  weight = 1;
  /** The cell to blame for the reason given last, or -1. */
  blamedCell = -1;
  readonly #layout: RowLayout;
  readonly #required: readonly number[];

  constructor(layout: RowLayout) {
    this.#layout = layout;
    const { ra, dec, radial, weight } = layout;
    this.#required = weight === -1 ? [ra, dec, radial] : [ra, dec, radial, weight];
  }

  /** Why the row cannot be used, or null for a usable one. */
  judge(row: readonly string[]): SetAsideReason | null {
    const layout = this.#layout;
    this.blamedCell = -1;
    if (row.length !== layout.cells) return 'wrongFieldCount';
    const ra = parseNumber(row[layout.ra]!);
    const dec = parseNumber(row[layout.dec]!);
    const radial = parseNumber(row[layout.radial]!);
    const weight = layout.weight === -1 ? 1 : parseNumber(row[layout.weight]!);
    // The sum of finite numbers is never NaN, so one test tells that all four are there.
    if (Number.isNaN(ra + dec + radial + weight)) return this.#unreadable(row);
    const redshift = layout.radialKind === 'czKmS' ? radial / SPEED_OF_LIGHT_KM_S : radial;
    if (!(ra >= 0 && ra <= 360)) return this.#blame(layout.ra, 'raOutOfRange');
    if (!(dec >= -90 && dec <= 90)) return this.#blame(layout.dec, 'decOutOfRange');
    if (!(redshift > 0)) return this.#blame(layout.radial, 'redshiftNotAboveZero');
    if (redshift > LARGEST_REDSHIFT) return this.#blame(layout.radial, 'redshiftTooLarge');
    if (weight < 0) return this.#blame(layout.weight, 'weightNegative');
    this.raDeg = ra;
    this.decDeg = dec;
    this.redshift = redshift;
    this.weight = weight;
    return null;
  }

  #unreadable(row: readonly string[]): SetAsideReason {
    const missing = this.#required.find((cell) => isMissing(row[cell]!));
    if (missing !== undefined) return this.#blame(missing, 'missingValue');
    const unread = this.#required.find((cell) => Number.isNaN(parseNumber(row[cell]!)));
    return this.#blame(unread ?? -1, 'notANumber');
  }

  #blame(cell: number, reason: SetAsideReason): SetAsideReason {
    this.blamedCell = cell;
    return reason;
  }
}
