/// <reference path="./papaparse.d.ts" />
import Papa from 'papaparse/papaparse.js';
import { Refusal } from '../../../base/refusal.ts';
import type { Delimiter } from './delimiter.ts';

/** Longest row in characters. A table with more in one row is no catalogue, and memory must stay bounded. */
export const LONGEST_RECORD = 1_048_576;
/** So many rows with text after a closing quote are read literally; a file with more is quoted some other way. */
const MOST_LITERAL_ROWS = 1000;

/** Rows as text, with the line (the first of the file being 1) on which each begins. */
export interface Records {
  readonly rows: string[][];
  readonly lines: Float64Array;
}

export type LineBreak = '\n' | '\r';

/**
 * Cuts text that comes in pieces into rows of cells, by PapaParse. Quoted cells may hold delimiters, quotes (doubled)
 * and line breaks (RFC 4180, section 2). CRLF needs nothing special: the CR stays as white space in the last cell.
 *
 * A cell that starts with a quote but goes on after its closing quote ("M 31" group) breaks that rule. Its line is
 * then read literally, quotes as plain characters, so that it cannot swallow the rows below it.
 */
export class RecordCutter {
  readonly #parser: InstanceType<typeof Papa.Parser>;
  readonly #delimiter: Delimiter;
  readonly #newline: LineBreak;
  #pending = '';
  #line: number;
  #literalRows = 0;

  constructor(delimiter: Delimiter, newline: LineBreak, firstLine: number) {
    this.#parser = new Papa.Parser({ delimiter, newline });
    this.#delimiter = delimiter;
    this.#newline = newline;
    this.#line = firstLine;
  }

  /** The rows that this piece completes. Throws Refusal for a row that never ends. */
  push(text: string): Records[] {
    return this.#cut(text, false);
  }

  /** The rest. Throws Refusal for a quote that is still open. */
  finish(): Records[] {
    return this.#cut('', true);
  }

  #cut(text: string, last: boolean): Records[] {
    let rest = this.#pending + text;
    const out: Records[] = [];
    while (rest !== '') {
      const outcome = this.#parser.parse(rest, 0, !last);
      const complete = outcome.data.length;
      const tooLong = !last && rest.length - outcome.meta.cursor > LONGEST_RECORD;
      // A fault in a row that is not complete may be no more than the place where the piece ends.
      const limit = last || tooLong ? complete : complete - 1;
      const broken = outcome.errors.find((fault) => fault.code === 'InvalidQuotes' && fault.row <= limit);
      if (broken) {
        rest = this.#takeLiterally(rest, broken.index, out);
        continue;
      }
      if (last && outcome.errors.some((fault) => fault.code === 'MissingQuotes')) {
        throw this.#openQuote(outcome.data.slice(0, -1), 'is still open at the end of the file');
      }
      if (tooLong) throw this.#tooLong(outcome.data, rest.slice(outcome.meta.cursor));
      this.#number(outcome.data, rest.slice(0, last ? rest.length : outcome.meta.cursor), last, out);
      rest = last ? '' : rest.slice(outcome.meta.cursor);
      break;
    }
    this.#pending = rest;
    return out;
  }

  /** Gives out the rows before the broken one and the broken one's line as it stands; answers what follows. */
  #takeLiterally(text: string, cellStart: number, out: Records[]): string {
    this.#literalRows++;
    const before = this.#parser.parse(text.slice(0, cellStart - 1), 0, true);
    const start = before.meta.cursor;
    this.#number(before.data, text.slice(0, start), false, out);
    if (this.#literalRows > MOST_LITERAL_ROWS) {
      throw new Refusal(
        `The row on line ${this.#line} is one of more than ${MOST_LITERAL_ROWS} with text after a closing quote, so the file is not quoted as CSV is: double the quotes inside quoted cells, or leave quotes out.`,
      );
    }
    const lineEnd = text.indexOf(this.#newline, cellStart);
    const end = lineEnd === -1 ? text.length : lineEnd;
    const literal = text.slice(start, end);
    out.push({ rows: [literal.split(this.#delimiter)], lines: Float64Array.of(this.#line) });
    this.#line += 1 + count(literal, this.#newline);
    return text.slice(end + 1);
  }

  /** Gives each row the line on which it begins. */
  #number(rows: string[][], consumed: string, last: boolean, out: Records[]): void {
    if (rows.length === 0) return;
    const lines = new Float64Array(rows.length);
    const breaksBetween = last ? rows.length - 1 : rows.length;
    const breaks = consumed.includes('"') ? count(consumed, this.#newline) : breaksBetween;
    const isLineEach = breaks === breaksBetween;
    let line = this.#line;
    for (let i = 0; i < rows.length; i++) {
      lines[i] = line;
      line += isLineEach ? 1 : 1 + breaksInside(rows[i]!, this.#newline);
    }
    this.#line += breaks;
    out.push({ rows, lines });
  }

  #tooLong(before: string[][], row: string): Refusal {
    if (count(row, this.#newline) > 0) {
      return this.#openQuote(before, `is still open ${LONGEST_RECORD} characters later`);
    }
    const line = this.#line + linesOf(before, this.#newline);
    return new Refusal(
      `Line ${line} is longer than ${LONGEST_RECORD} characters, which no row of a catalogue is: give a table with one galaxy a line, separated by commas, tabs, semicolons or bars.`,
    );
  }

  #openQuote(before: string[][], end: string): Refusal {
    const line = this.#line + linesOf(before, this.#newline);
    return new Refusal(
      `A quote opened in the row that starts on line ${line} ${end}: close it, or double it if it belongs to the text.`,
    );
  }
}

function count(text: string, mark: string): number {
  let found = 0;
  for (let at = text.indexOf(mark); at !== -1; at = text.indexOf(mark, at + 1)) found++;
  return found;
}

function breaksInside(row: readonly string[], newline: LineBreak): number {
  let breaks = 0;
  for (const cell of row) breaks += count(cell, newline);
  return breaks;
}

function linesOf(rows: readonly string[][], newline: LineBreak): number {
  let lines = rows.length;
  for (const row of rows) lines += breaksInside(row, newline);
  return lines;
}
