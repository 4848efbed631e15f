import type { Decimals } from './formats/delimited/decimals.ts';

/** Where the radial information comes from: a redshift, or a velocity cz in km/s (z = v/c, the optical convention). */
export type RadialKind = 'redshift' | 'czKmS';

/** Which column plays which part. Names as in the file's header. */
export interface ColumnMapping {
  readonly ra: string;
  readonly dec: string;
  readonly radial: { readonly column: string; readonly kind: RadialKind };
  readonly weight: string | null;
  readonly magnitude: string | null;
  readonly id: string | null;
}

/** Keep rows whose number in `column` lies in [min, max]; null leaves that end open. */
export interface Cut {
  readonly column: string;
  readonly min: number | null;
  readonly max: number | null;
}

/** Why a row is set aside. The order is the order of the tests: a row has the first reason that fits. */
export const SET_ASIDE_REASONS = [
  'wrongFieldCount',
  'missingValue',
  'notANumber',
  'raOutOfRange',
  'decOutOfRange',
  'redshiftNotAboveZero',
  'redshiftTooLarge',
  'weightNegative',
  'outsideRegion',
  'outsideCuts',
] as const;
export type SetAsideReason = (typeof SET_ASIDE_REASONS)[number];

/** Counts of what happened to the rows; rowsRead = kept + setAside always. */
export interface RowAccount {
  readonly rowsRead: number;
  readonly kept: number;
  readonly setAside: number;
  /** Only reasons that occurred. */
  readonly reasons: Readonly<Partial<Record<SetAsideReason, number>>>;
  /** Rows that repeat the RA and Dec of an earlier kept row: reported, not dropped. */
  readonly repeatedPositions: number;
  /** How the file's numbers are written. */
  readonly decimals: Decimals;
  /** Of a file read with decimal points, rows that are no numbers where one has a comma (10,5); left out for none. */
  readonly decimalCommas?: number;
}

/** The kept rows, in file order; arrays of one length. */
export interface Catalogue {
  readonly account: RowAccount;
  readonly raDeg: Float64Array;
  readonly decDeg: Float64Array;
  readonly redshift: Float64Array;
  /** Null: every galaxy weighs 1. */
  readonly weight: Float64Array | null;
  readonly magnitude: Float64Array | null;
  /**
   * Further numeric columns that were asked for, by name. NaN where a cell was empty or no number. A column that also
   * plays another part (a magnitude that is cut) is the same array, not a copy.
   */
  readonly extras: ReadonlyMap<string, Float64Array>;
  /** Line of each row in its file, the first line being 1. */
  readonly line: Float64Array;
}

/** One row that was not used. */
export interface SetAsideRow {
  readonly line: number;
  readonly reason: SetAsideReason;
  /** The column at fault, when one cell is to blame. */
  readonly column: string | null;
  /** What stood there (its first 200 characters); of a row with the wrong number of fields, what the row says. */
  readonly text: string | null;
  /** The row's name, as far as the mapping has a column of names and the row is read as text. */
  readonly name?: string;
}
