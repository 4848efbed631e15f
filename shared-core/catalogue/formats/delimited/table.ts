import { Refusal } from '../../../base/refusal.ts';
import type { ReadWatch } from './byteStream.ts';
import { type Delimiter, detectDelimiter } from './delimiter.ts';
import { readHeader } from './header.ts';
import { type LineBreak, LONGEST_RECORD, RecordCutter, type Records } from './records.ts';
import { decodeText } from './text.ts';
import { unpacked } from './unpack.ts';

/** Enough text to judge delimiter and line breaks by. */
const HEAD_CHARACTERS = 16_384;

/** A delimited file opened: its header is read, its rows come as they are asked for. */
export interface DelimitedTable {
  readonly header: readonly string[];
  readonly delimiter: Delimiter;
  /** Rows in file order; blank lines are still among them (see isBlank). To be gone through once. */
  readonly records: AsyncGenerator<Records>;
  /** Lets go of the source, for when the rows are not gone through to their end. */
  close(): Promise<void>;
}

/** What stands before the first row. */
interface Head {
  readonly text: string;
  /** The line on which `text` begins. */
  readonly line: number;
  /** The last comment line before it. */
  readonly comment: string | null;
  readonly newline: LineBreak;
  readonly isWhole: boolean;
}

/**
 * Opens CSV, TSV or text with semicolons or bars, also gzip of it: finds encoding, line breaks and delimiter, passes
 * comment lines (#) and blank lines before the header, and reads the header. Memory is bounded by the longest row.
 *
 * Throws Refusal for an empty file, one with comments only, binary data, and a first line that is no header. Reading
 * on may throw Refusal as well (damaged gzip, a quote left open, a line without end).
 */
export async function openTable(
  bytes: AsyncIterable<Uint8Array>,
  options: { readonly delimiter?: Delimiter | undefined } & ReadWatch = {},
): Promise<DelimitedTable> {
  const texts = decodeText(unpacked(bytes, options));
  const close = async () => {
    await texts.return(undefined);
  };
  try {
    const head = await readHead(texts);
    const delimiter = options.delimiter ?? detectDelimiter(head.text, head.newline, head.isWhole);
    const batches = cutRecords(texts, head, delimiter);
    const first = await batches.next();
    if (first.done) throw nothingThere(false);
    const header = readHeader(first.value.rows[0]!, head.comment, delimiter);
    const opening = header.isFirstRow ? withoutFirst(first.value) : first.value;
    return { header: header.names, delimiter, records: resumed(opening, batches), close };
  } catch (fault) {
    await close();
    throw fault;
  }
}

/** True of a row that is an empty line (or one of white space) and so no row at all. */
export function isBlank(row: readonly string[]): boolean {
  return row.length === 1 && row[0]!.trim() === '';
}

async function readHead(texts: AsyncGenerator<string>): Promise<Head> {
  let text = '';
  let line = 1;
  let comment: string | null = null;
  let newline: LineBreak | null = null;
  for (;;) {
    const next = await texts.next();
    if (!next.done) text += next.value;
    newline ??= text.includes('\n') || !text.includes('\r') ? '\n' : '\r';
    for (let end = skippedLineEnd(text, newline); end !== null; end = skippedLineEnd(text, newline)) {
      if (isComment(text)) comment = text.slice(0, end);
      text = text.slice(end + 1);
      line++;
    }
    const isBare = isComment(text) || text.trim() === '';
    if (next.done && isBare) throw nothingThere(line === 1 && text === '');
    if (isBare && text.length > LONGEST_RECORD) {
      throw new Refusal(
        `Line ${line} is longer than ${LONGEST_RECORD} characters, where a header and a line for each galaxy were expected: shorten it.`,
      );
    }
    if (next.done || (!isBare && text.length >= HEAD_CHARACTERS)) {
      return { text, line, comment, newline, isWhole: next.done === true };
    }
  }
}

/** Where the first line ends, if that line is complete and is a comment or blank; else null. */
function skippedLineEnd(text: string, newline: LineBreak): number | null {
  const end = text.indexOf(newline);
  if (end === -1) return null;
  return isComment(text) || text.slice(0, end).trim() === '' ? end : null;
}

function isComment(line: string): boolean {
  return /^\s*#/.test(line.slice(0, 1000));
}

function nothingThere(isEmpty: boolean): Refusal {
  const what = isEmpty ? 'is empty' : 'holds nothing but blank lines and comments';
  return new Refusal(
    `This file ${what}, where a header and a line for each galaxy were expected: choose another file.`,
  );
}

async function* cutRecords(
  texts: AsyncGenerator<string>,
  head: Head,
  delimiter: Delimiter,
): AsyncGenerator<Records> {
  const cutter = new RecordCutter(delimiter, head.newline, head.line);
  yield* cutter.push(head.text);
  for await (const text of texts) yield* cutter.push(text);
  yield* cutter.finish();
}

async function* resumed(first: Records, rest: AsyncGenerator<Records>): AsyncGenerator<Records> {
  yield first;
  yield* rest;
}

function withoutFirst(records: Records): Records {
  return { rows: records.rows.slice(1), lines: records.lines.subarray(1) };
}
