import { textDecoder } from '../../../base/textCoding.ts';
import type { ReadWatch } from './byteStream.ts';
import { detectDecimals } from './decimals.ts';
import { type Delimiter, detectDelimiter } from './delimiter.ts';
import { asUtf8 } from './encoding.ts';
import { type Head, nothingThere, readHead } from './head.ts';
import { readHeader } from './header.ts';
import { RecordCutter } from './records.ts';
import { DelimitedTable } from './table.ts';
import { resumed, unpacked } from './unpack.ts';
import { detectLineBreak, joined, LF, type LineBreak, wholeLines } from './wholeLines.ts';

/**
 * Opens CSV, TSV or text with semicolons or bars, also gzip of it: finds encoding, line breaks, delimiter and decimal
 * mark, passes comment lines (#) and blank lines before the header, and reads the header. Memory is bounded by the longest row.
 *
 * Throws Refusal for an empty file, one with comments only, binary data, and a first line that is no header. Reading
 * on may throw Refusal as well (damaged gzip, a quote left open, a line without end).
 */
export async function openTable(
  bytes: AsyncIterable<Uint8Array>,
  options: { readonly delimiter?: Delimiter | undefined } & ReadWatch = {},
): Promise<DelimitedTable> {
  const utf8 = asUtf8(unpacked(bytes, options));
  const close = async () => {
    await utf8.return(undefined);
  };
  try {
    const first = await utf8.next();
    if (first.done) throw nothingThere(true);
    const lineBreak = detectLineBreak(first.value);
    const place = { line: 1 };
    let nextLine = () => place.line;
    const blocks = wholeLines(resumed(first.value, utf8), lineBreak, () => nextLine());
    const head = await readHead(blocks, lineBreak, place);
    const headText = textDecoder('utf-8').decode(head.bytes);
    const delimiter = options.delimiter ?? detectDelimiter(headText, lineBreak);
    const decimals = detectDecimals(headText, delimiter, lineBreak, head.line);
    const probe = new RecordCutter(delimiter, lineBreak, head.line);
    nextLine = () => probe.nextLine;
    const { row, lines, rest } = await firstRow(blocks, head, probe, lineBreak);
    const header = readHeader(row, head.comment, delimiter, decimals.mark);
    const cutter = new RecordCutter(delimiter, lineBreak, head.line + (header.isFirstRow ? lines : 0));
    nextLine = () => cutter.nextLine;
    const body = resumed(header.isFirstRow ? rest : head.bytes, blocks);
    return new DelimitedTable(
      { header: header.names, delimiter, decimals },
      { cutter, blocks: body, lineBreak, close },
    );
  } catch (fault) {
    await close();
    throw fault;
  }
}

/** The first row, how many lines it takes, and what follows it in the head. */
async function firstRow(
  blocks: AsyncGenerator<Uint8Array>,
  head: Head,
  cutter: RecordCutter,
  lineBreak: LineBreak,
): Promise<{ row: string[]; lines: number; rest: Uint8Array }> {
  const decoder = textDecoder('utf-8');
  let bytes = head.bytes;
  let records = cutter.push(decoder.decode(bytes));
  // Only where the header's own quotes go beyond the head.
  while (records.length === 0) {
    const next = await blocks.next();
    // Here a quote is open, which finish() refuses, so the loop ends with a row or with a Refusal.
    records = next.done ? cutter.finish() : cutter.push(decoder.decode(next.value));
    if (!next.done) bytes = joined(bytes, next.value);
  }
  const row = records[0]!.rows[0]!;
  const mark = lineBreak === LF ? '\n' : '\r';
  const lines = row.reduce((sum, cell) => sum + cell.split(mark).length - 1, 1);
  let at = 0;
  for (let line = 0; line < lines; line++) at = bytes.indexOf(lineBreak, at) + 1;
  return { row, lines, rest: bytes.subarray(at) };
}
