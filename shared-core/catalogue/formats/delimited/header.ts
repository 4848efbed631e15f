import { Refusal } from '../../../base/refusal.ts';
import { isMissing, parseCommaNumber, parseNumber } from '../../numbers.ts';
import type { DecimalMark } from './decimals.ts';
import type { Delimiter } from './delimiter.ts';

/** More columns than any catalogue has: beyond it the first line is no header. */
const MOST_COLUMNS = 10_000;

export interface Header {
  /** One name a column, none empty, none twice. */
  readonly names: string[];
  /** False where the names came from a comment line and the first row is already data. */
  readonly isFirstRow: boolean;
}

/**
 * The columns' names: those of the first row or, when it holds nothing but numbers and the comment line before it has
 * as many words, those of that comment (`# ra,dec,z`). A column without a name is called by its place ("column 4"),
 * a repeated name gets its number ("z (2)").
 *
 * Throws Refusal when there are no names and when there are far too many.
 */
export function readHeader(
  firstRow: readonly string[],
  comment: string | null,
  delimiter: Delimiter,
  mark: DecimalMark,
): Header {
  if (firstRow.length > MOST_COLUMNS) {
    throw new Refusal(
      `The header has ${firstRow.length} columns, where at most ${MOST_COLUMNS} were expected: give a table with a few columns and one galaxy a line.`,
    );
  }
  if (!isAllNumbers(firstRow, mark)) return { names: distinct(firstRow), isFirstRow: true };
  const commented = comment?.replace(/^[\s#]*/, '').split(delimiter) ?? [];
  if (commented.length === firstRow.length && !isAllNumbers(commented, mark)) {
    return { names: distinct(commented), isFirstRow: false };
  }
  throw new Refusal(
    `The first line holds only numbers (${firstRow
      .slice(0, 4)
      .map((cell) => cell.trim().slice(0, 20))
      .join(
        ', ',
      )}), where the names of the columns were expected: put a line such as ra${delimiter}dec${delimiter}z above it.`,
  );
}

function isAllNumbers(row: readonly string[], mark: DecimalMark): boolean {
  const parse = mark === ',' ? parseCommaNumber : parseNumber;
  const filled = row.filter((cell) => !isMissing(cell));
  return filled.length > 0 && filled.every((cell) => !Number.isNaN(parse(cell)));
}

function distinct(row: readonly string[]): string[] {
  const copies = new Map<string, number>();
  return row.map((cell, i) => {
    const name = cell.trim() || `column ${i + 1}`;
    let copy = copies.get(name) ?? 0;
    let unique = name;
    do {
      copy++;
      unique = copy === 1 ? name : `${name} (${copy})`;
    } while (copy > 1 && copies.has(unique));
    copies.set(name, copy);
    if (copy > 1) copies.set(unique, 1);
    return unique;
  });
}
