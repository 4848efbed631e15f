import type { GalaxyColumns } from './galaxyColumns.ts';
import { DEMO_COLUMNS } from './scenario.ts';

const COMMA = 44;
const NEWLINE = 10;
const MINUS = 45;
const POINT = 46;
const ZERO = 48;
const ID_DIGITS = 8;
/** More than the longest row needs. */
const ROW_BYTES = 128;

/** Decimals of the numeric columns. */
const POSITION_DECIMALS = 6;
const REDSHIFT_DECIMALS = 5;
const OTHER_DECIMALS = 3;

/** The cells of a row after its id, as text: ra, dec, z, mag, colour, weight, field. */
export function cellsOf(columns: GalaxyColumns, row: number, field: string): string[] {
  return [
    columns.raDeg[row]!.toFixed(POSITION_DECIMALS),
    columns.decDeg[row]!.toFixed(POSITION_DECIMALS),
    columns.redshift[row]!.toFixed(REDSHIFT_DECIMALS),
    columns.magnitude[row]!.toFixed(OTHER_DECIMALS),
    columns.colour[row]!.toFixed(OTHER_DECIMALS),
    columns.weight[row]!.toFixed(OTHER_DECIMALS),
    field,
  ];
}

/** Bytes of ASCII as a string. */
export function asciiText(bytes: Uint8Array): string {
  const pieces: string[] = [];
  // Piecewise, because arguments of a call are limited in number.
  for (let at = 0; at < bytes.length; at += 8192) {
    pieces.push(String.fromCharCode.apply(null, bytes.subarray(at, at + 8192) as unknown as number[]));
  }
  return pieces.join('');
}

/** Writes the survey's CSV as bytes (ASCII), without a string for each number. */
export class RowWriter {
  #bytes: Uint8Array<ArrayBuffer>;
  #length = 0;
  #id = 0;

  constructor(rows: number) {
    this.#bytes = new Uint8Array((rows + 1) * ROW_BYTES);
  }

  header(): void {
    this.#text(DEMO_COLUMNS.join(','));
    this.#bytes[this.#length++] = NEWLINE;
  }

  /** One galaxy, with the next id. */
  galaxy(columns: GalaxyColumns, row: number, field: string): void {
    this.#ensure(ROW_BYTES);
    this.#nextId();
    this.#number(columns.raDeg[row]!, POSITION_DECIMALS);
    this.#number(columns.decDeg[row]!, POSITION_DECIMALS);
    this.#number(columns.redshift[row]!, REDSHIFT_DECIMALS);
    this.#number(columns.magnitude[row]!, OTHER_DECIMALS);
    this.#number(columns.colour[row]!, OTHER_DECIMALS);
    this.#number(columns.weight[row]!, OTHER_DECIMALS);
    this.#bytes[this.#length++] = COMMA;
    this.#text(field);
    this.#bytes[this.#length++] = NEWLINE;
  }

  /** A row whose cells after the id are given as they stand (ASCII). */
  cells(cells: readonly string[]): void {
    const text = `,${cells.join(',')}\n`;
    this.#ensure(ROW_BYTES + text.length);
    this.#nextId();
    this.#text(text);
  }

  /** What has been written since the last time, in a copy of its own. */
  take(): Uint8Array<ArrayBuffer> {
    const taken = this.#bytes.slice(0, this.#length);
    this.#length = 0;
    return taken;
  }

  #ensure(room: number): void {
    if (this.#length + room <= this.#bytes.length) return;
    const larger = new Uint8Array(2 * this.#bytes.length + room);
    larger.set(this.#bytes);
    this.#bytes = larger;
  }

  #text(text: string): void {
    for (let i = 0; i < text.length; i++) this.#bytes[this.#length++] = text.charCodeAt(i);
  }

  #nextId(): void {
    this.#id++;
    this.#bytes[this.#length++] = 79; // O
    this.#bytes[this.#length++] = 68; // D
    this.#digits(this.#id, ID_DIGITS);
  }

  /** A comma and a number of fixed decimals; the number times 10^decimals stays below 2^31. */
  #number(value: number, decimals: number): void {
    const bytes = this.#bytes;
    bytes[this.#length++] = COMMA;
    const power = POWERS[decimals]!;
    let scaled = Math.round(value * power);
    if (scaled < 0) {
      bytes[this.#length++] = MINUS;
      scaled = -scaled;
    }
    const whole = (scaled / power) | 0;
    this.#digits(whole, whole < 10 ? 1 : whole < 100 ? 2 : 3);
    bytes[this.#length++] = POINT;
    this.#digits(scaled - whole * power, decimals);
  }

  #digits(value: number, count: number): void {
    let rest = value | 0;
    for (let at = this.#length + count - 1; at >= this.#length; at--) {
      const tenth = (rest / 10) | 0;
      this.#bytes[at] = ZERO + rest - 10 * tenth;
      rest = tenth;
    }
    this.#length += count;
  }
}

const POWERS = [1, 10, 100, 1e3, 1e4, 1e5, 1e6];
