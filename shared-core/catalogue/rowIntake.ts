import type { Catalogue, ColumnMapping, SetAsideRow } from './catalogue.ts';
import { DEC, type Fault, judgeNumbers, RA, RADIAL, readText, redshiftOf } from './cleaning.ts';
import type { Decimals } from './formats/delimited/decimals.ts';
import type { RowSink } from './formats/delimited/lineScanner.ts';
import type { DelimitedTable } from './formats/delimited/table.ts';
import { isBlank } from './formats/delimited/table.ts';
import { KeptRows } from './keptRows.ts';
import { keptText } from './keptText.ts';
import { columnNamed } from './mapping.ts';
import { markOf } from './numbers.ts';
import { type Choice, cutText, OUTSIDE_REGION, STAYS, whyLeftOut } from './selection.ts';
import { Tally } from './tally.ts';

/** A row that is kept, as it is told while the file is read. */
export interface KeptRow {
  readonly line: number;
  /** The name in the mapping's id column, white space at its ends taken off; null without such a column. */
  readonly id: string | null;
  readonly raDeg: number;
  readonly decDeg: number;
  readonly redshift: number;
}

/** What is wanted of the rows beyond the mapping. */
export interface IntakeWishes {
  readonly choice: Choice;
  readonly extras: readonly string[];
  readonly onSetAside: ((row: SetAsideRow) => void) | undefined;
  readonly onKept: ((row: KeptRow) => void) | undefined;
}

/**
 * Takes in the rows of a table one by one: each is kept, or set aside with its reason. Rows of numbers and rows of
 * text are judged by the same functions.
 */
export class RowIntake implements RowSink {
  /** Cells wanted as numbers, by place in the header: RA, Dec, radial, weight if there is one, then the others. */
  readonly wanted: readonly number[];
  /** So many of them, the first, must hold a number. */
  readonly required: number;
  readonly #header: readonly string[];
  readonly #delimiter: string;
  readonly #mapping: ColumnMapping;
  readonly #choice: Choice;
  readonly #onSetAside: ((row: SetAsideRow) => void) | undefined;
  readonly #onKept: ((row: KeptRow) => void) | undefined;
  /** -1: nobody asks for names. Who lists rows, kept or set aside, is told them. */
  readonly #idCell: number;
  readonly #values: Float64Array;
  readonly #cutPlaces: readonly number[];
  readonly #cutValues: Float64Array;
  readonly #decimals: Decimals;
  readonly #tally: Tally;
  readonly #kept: KeptRows;

  constructor(
    { header, delimiter, decimals }: Pick<DelimitedTable, 'header' | 'delimiter' | 'decimals'>,
    mapping: ColumnMapping,
    wishes: IntakeWishes,
  ) {
    const { choice, extras, onSetAside, onKept } = wishes;
    const { ra, dec, radial, weight, magnitude } = mapping;
    const places: string[] = [ra, dec, radial.column];
    if (weight !== null) places.push(weight);
    this.required = places.length;
    const placeOf = (name: string) => {
      const known = places.indexOf(name);
      return known === -1 ? places.push(name) - 1 : known;
    };
    const extraNames = extras.map((name) => columnNamed(header, name));
    if (magnitude !== null) placeOf(magnitude);
    extraNames.forEach(placeOf);
    this.#cutPlaces = choice.cuts.map((cut) => placeOf(columnNamed(header, cut.column)));
    this.#kept = new KeptRows(mapping, extraNames, placeOf);
    this.wanted = places.map((name) => header.indexOf(name));
    this.#header = header;
    this.#delimiter = delimiter;
    this.#decimals = decimals;
    this.#tally = new Tally({ setAside: 0, reasons: {}, decimals });
    this.#mapping = mapping;
    this.#choice = choice;
    this.#onSetAside = onSetAside;
    this.#onKept = onKept;
    const listed = onKept !== undefined || onSetAside !== undefined;
    this.#idCell = listed && mapping.id !== null ? header.indexOf(mapping.id) : -1;
    this.#values = new Float64Array(places.length);
    this.#cutValues = new Float64Array(choice.cuts.length);
  }

  /** False for a row that is wanted as text: to tell what stood in the cell at fault, or the row's name. */
  numbers(line: number, values: Float64Array): boolean {
    if (this.#idCell !== -1) return false;
    const fault = judgeNumbers(values, this.required, this.#mapping.radial.kind);
    if (fault === null) this.#choose(line, values, null);
    else if (this.#onSetAside !== undefined) return false;
    else this.#tally.setAside(fault.reason);
    return true;
  }

  text(line: number, row: string[]): void {
    const values = this.#values;
    const fault =
      readText(row, this.#header.length, this.wanted, this.required, values, this.#decimals.mark) ??
      judgeNumbers(values, this.required, this.#mapping.radial.kind);
    if (fault === null) this.#choose(line, values, row[this.#idCell]?.trim() ?? null);
    else if (!isBlank(row)) this.#blame(line, fault, row);
  }

  /** All rows kept, as a catalogue. Nothing may be taken in afterwards. */
  catalogue(): Catalogue {
    return this.#kept.catalogue(this.#tally);
  }

  /** A usable row: kept, unless the region or a cut leaves it out. */
  #choose(line: number, values: Float64Array, id: string | null): void {
    const cutValues = this.#cutValues;
    for (let k = 0; k < cutValues.length; k++) cutValues[k] = values[this.#cutPlaces[k]!]!;
    const { contains, cuts } = this.#choice;
    const left = whyLeftOut(values[RA]!, values[DEC]!, contains, cuts, cutValues);
    if (left === STAYS) {
      this.#tally.keep();
      const redshift = redshiftOf(values[RADIAL]!, this.#mapping.radial.kind);
      this.#kept.add(line, redshift, values);
      this.#onKept?.({ line, id, raDeg: values[RA]!, decDeg: values[DEC]!, redshift });
    } else if (left === OUTSIDE_REGION) {
      this.#setAside({ line, reason: 'outsideRegion', column: null, text: null }, id);
    } else {
      const text = cutText(cutValues[left]!);
      this.#setAside({ line, reason: 'outsideCuts', column: cuts[left]!.column, text }, id);
    }
  }

  #blame(line: number, { reason, place }: Fault, row: readonly string[]): void {
    if (reason === 'notANumber' && this.#hasDecimalComma(row)) this.#tally.decimalComma();
    // The text is prepared only for somebody who asked for it.
    if (this.#onSetAside === undefined) {
      this.#tally.setAside(reason);
    } else if (place === -1) {
      // Which field is the name cannot be told where fields are missing or too many.
      this.#setAside({ line, reason, column: null, text: keptText(row.join(this.#delimiter)) }, null);
    } else {
      const cell = this.wanted[place]!;
      const id = row[this.#idCell]?.trim() ?? null;
      this.#setAside({ line, reason, column: this.#header[cell]!, text: keptText(row[cell]!) }, id);
    }
  }

  /** Of a file whose commas are not taken for decimal ones. */
  #hasDecimalComma(row: readonly string[]): boolean {
    if (this.#decimals.mark === ',') return false;
    return this.wanted.slice(0, this.required).some((cell) => markOf(row[cell]!) === ',');
  }

  #setAside(row: SetAsideRow, id: string | null): void {
    this.#tally.setAside(row.reason);
    this.#onSetAside?.(id === null ? row : { ...row, name: keptText(id) });
  }
}
