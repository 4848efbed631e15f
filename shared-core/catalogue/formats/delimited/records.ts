/// <reference path="./papaparse.d.ts" />
import Papa from 'papaparse/papaparse.js';
import { Refusal } from '../../../base/refusal.ts';
import type { Delimiter } from './delimiter.ts';
import { LF, type LineBreak, LONGEST_ROW } from './wholeLines.ts';

/** So many rows with text after a closing quote are read literally; a file with more is quoted some other way. */
const MOST_LITERAL_ROWS = 1000;

/** Rows as text, with the line (the first of the file being 1) on which each begins. */
export interface Records {
  readonly rows: string[][];
  readonly lines: Float64Array;
}

/**
 * Cuts text that comes in whole lines into rows of cells, by PapaParse. Quoted cells may hold delimiters, quotes
 * (doubled) and line breaks (RFC 4180, section 2). The CR of CRLF stays as white space in the last cell.
 *
 * A cell that starts with a quote but goes on after its closing quote ("M 31" group) breaks that rule. Its line is
 * then read literally, quotes as plain characters, so that it cannot swallow the rows below it.
 */
export class RecordCutter {
  readonly #parser: InstanceType<typeof Papa.Parser>;
  readonly #delimiter: Delimiter;
  readonly #newline: '\n' | '\r';
  #pending = '';
  #line: number;
  #literalRows = 0;

  constructor(delimiter: Delimiter, lineBreak: LineBreak, firstLine: number) {
    this.#newline = lineBreak === LF ? '\n' : '\r';
    this.#parser = new Papa.Parser({ delimiter, newline: this.#newline });
    this.#delimiter = delimiter;
    this.#line = firstLine;
  }

  /** True between two rows; false while a quoted cell goes on into the next line. */
  get isBetweenRows(): boolean {
    return this.#pending === '';
  }

  /** The number of the line that comes next. */
  get nextLine(): number {
    return this.#line + count(this.#pending, this.#newline);
  }

  /** To be told of lines that were read by other means, between two rows. */
  passLines(lines: number): void {
    this.#line += lines;
  }

  /** The cells of one line, without its line break, that is known to be a row of its own. */
  rowOf(line: string): string[] {
    return line.includes('"')
      ? this.#parser.parse(`${line}${this.#newline}`, 0, true).data[0]!
      : line.split(this.#delimiter);
  }

  /** The rows that these lines complete. Throws Refusal for a row that never ends. */
  push(lines: string): Records[] {
    return this.#cut(lines, false);
  }

  /** The rest. Throws Refusal for a quote that is still open. */
  finish(): Records[] {
    return this.#cut('', true);
  }

  #cut(text: string, last: boolean): Records[] {
    let rest = this.#pending + text;
    const out: Records[] = [];
    while (rest !== '') {
      const outcome = this.#parser.parse(rest, 0, true);
      const { cursor } = outcome.meta;
      const broken = outcome.errors.find((fault) => fault.code === 'InvalidQuotes');
      if (broken) {
        rest = this.#takeLiterally(rest, broken.index, out);
        continue;
      }
      this.#number(outcome.data, rest.slice(0, cursor), out);
      rest = rest.slice(cursor);
      if (rest.length > LONGEST_ROW) throw this.#openQuote(`is still open ${LONGEST_ROW} characters later`);
      if (last && rest !== '') throw this.#openQuote('is still open at the end of the file');
      break;
    }
    this.#pending = rest;
    return out;
  }

  /** Gives out the rows before the broken one and the broken one's line as it stands; answers what follows. */
  #takeLiterally(text: string, cellStart: number, out: Records[]): string {
    const before = this.#parser.parse(text.slice(0, cellStart - 1), 0, true);
    const start = before.meta.cursor;
    this.#number(before.data, text.slice(0, start), out);
    if (++this.#literalRows > MOST_LITERAL_ROWS) {
      throw new Refusal(
        `The row on line ${this.#line} is one of more than ${MOST_LITERAL_ROWS} with text after a closing quote, so the file is not quoted as CSV is: double the quotes inside quoted cells, or leave quotes out.`,
      );
    }
    const end = text.indexOf(this.#newline, cellStart);
    const literal = text.slice(start, end);
    out.push({ rows: [literal.split(this.#delimiter)], lines: Float64Array.of(this.#line) });
    this.#line += 1 + count(literal, this.#newline);
    return text.slice(end + 1);
  }

  /** Gives each row the line on which it begins. */
  #number(rows: string[][], consumed: string, out: Records[]): void {
    if (rows.length === 0) return;
    const lines = new Float64Array(rows.length);
    const breaks = consumed.includes('"') ? count(consumed, this.#newline) : rows.length;
    const isLineEach = breaks === rows.length;
    let line = this.#line;
    for (let i = 0; i < rows.length; i++) {
      lines[i] = line;
      line += isLineEach ? 1 : 1 + breaksInside(rows[i]!, this.#newline);
    }
    this.#line += breaks;
    out.push({ rows, lines });
  }

  #openQuote(end: string): Refusal {
    return new Refusal(
      `A quote opened in the row that starts on line ${this.#line} ${end}: close it, or double it if it belongs to the text.`,
    );
  }
}

function count(text: string, mark: string): number {
  let found = 0;
  for (let at = text.indexOf(mark); at !== -1; at = text.indexOf(mark, at + 1)) found++;
  return found;
}

function breaksInside(row: readonly string[], newline: string): number {
  let breaks = 0;
  for (const cell of row) breaks += count(cell, newline);
  return breaks;
}
