import { textDecoder } from '../../../base/textCoding.ts';
import type { Decimals } from './decimals.ts';
import type { Delimiter } from './delimiter.ts';
import { LineScanner, type RowSink } from './lineScanner.ts';
import type { RecordCutter, Records } from './records.ts';
import type { LineBreak } from './wholeLines.ts';

/** True of a row that is an empty line (or one of white space) and so no row at all. */
export function isBlank(row: readonly string[]): boolean {
  return row.length === 1 && row[0]!.trim() === '';
}

/** Where the rows of an open table come from. */
export interface TableSource {
  readonly cutter: RecordCutter;
  /** Whole lines of UTF-8, from below the header on. */
  readonly blocks: AsyncGenerator<Uint8Array>;
  readonly lineBreak: LineBreak;
  readonly close: () => Promise<void>;
}

/** A delimited file opened: its header is read, its rows come as they are asked for, once and by one of two ways. */
export class DelimitedTable {
  readonly header: readonly string[];
  readonly delimiter: Delimiter;
  readonly decimals: Decimals;
  readonly #source: TableSource;
  readonly #utf8 = textDecoder('utf-8');

  constructor(
    { header, delimiter, decimals }: Pick<DelimitedTable, 'header' | 'delimiter' | 'decimals'>,
    source: TableSource,
  ) {
    this.header = header;
    this.delimiter = delimiter;
    this.decimals = decimals;
    this.#source = source;
  }

  /** Rows as text by PapaParse, in file order; blank lines are still among them (see isBlank). */
  async *rows(): AsyncGenerator<Records> {
    const { cutter, blocks } = this.#source;
    for await (const block of blocks) yield* cutter.push(this.#utf8.decode(block));
    yield* cutter.finish();
  }

  /**
   * The same rows with the wanted cells as numbers wherever a row is regular, which is several times as fast; where
   * quotes are not simple, PapaParse takes over until they are. `wanted` are places in the header, none twice; the
   * first `required` of them may not be empty.
   */
  async numbers(wanted: readonly number[], required: number, sink: RowSink): Promise<void> {
    const { cutter, blocks, lineBreak } = this.#source;
    const { header, delimiter, decimals } = this;
    const plan = {
      width: header.length,
      wanted,
      required,
      delimiter,
      lineBreak,
      decimalMark: decimals.mark,
    };
    const scanner = new LineScanner(plan, (line) => cutter.rowOf(line));
    for await (const block of blocks) {
      let at = 0;
      if (cutter.isBetweenRows) {
        at = scanner.scan(block, cutter.nextLine, sink);
        cutter.passLines(scanner.linesRead);
      }
      if (at < block.length) giveText(cutter.push(this.#utf8.decode(block.subarray(at))), sink);
    }
    giveText(cutter.finish(), sink);
  }

  /** Lets go of the file. To be called whatever happened. */
  close(): Promise<void> {
    return this.#source.close();
  }
}

function giveText(parts: readonly Records[], sink: RowSink): void {
  for (const { rows, lines } of parts) {
    for (let i = 0; i < rows.length; i++) sink.text(lines[i]!, rows[i]!);
  }
}
