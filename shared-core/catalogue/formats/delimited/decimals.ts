import { isMissing, markOf } from '../../numbers.ts';
import type { Delimiter } from './delimiter.ts';
import { RecordCutter } from './records.ts';
import type { LineBreak } from './wholeLines.ts';

/** What parts the whole from the fraction in the numbers of a file. */
export type DecimalMark = '.' | ',';

/** How the numbers of a file are read, decided once for the whole file. */
export interface Decimals {
  readonly mark: DecimalMark;
  /** Why commas were not taken for decimal ones although there are some, with the line; null where nothing is in doubt. */
  readonly doubt: string | null;
}

export const DECIMAL_POINTS: Decimals = { mark: '.', doubt: null };

/** A number that may have a decimal comma, or marks of thousands: 6,300 but not 0,021. */
const MAYBE_THOUSANDS = /^[+-]?[1-9]\d{0,2},\d{3}$/;

/** What the cells of one column look like. */
interface ColumnLook {
  filled: number;
  numbers: number;
  point: Sight | null;
  comma: Sight | null;
  /** Is any comma one that parts decimals and nothing else? */
  isPlain: boolean;
}

interface Sight {
  readonly text: string;
  readonly line: number;
}

/**
 * Looks for decimal commas in the head of a table (whole lines, the header first). They are taken for such where
 * commas do not part columns, no number of the head has a point, and one at least cannot be a mark of thousands. Only
 * columns count in which most cells are numbers, so that a column of remarks decides nothing.
 */
export function detectDecimals(
  head: string,
  delimiter: Delimiter,
  lineBreak: LineBreak,
  line: number,
): Decimals {
  if (delimiter === ',' || !head.includes(',')) return DECIMAL_POINTS;
  const looks: ColumnLook[] = [];
  for (const { rows, lines } of new RecordCutter(delimiter, lineBreak, line).push(head))
    rows.forEach((row, i) => {
      row.forEach((cell, k) => {
        looks[k] ??= {
          filled: 0,
          numbers: 0,
          point: null,
          comma: null,
          isPlain: false,
        };
        see(looks[k], cell.trim(), lines[i]!, lines[i] === line);
      });
    });
  const numeric = looks.filter(({ filled, numbers }) => 2 * numbers > filled);
  const comma = numeric.find((look) => look.comma !== null)?.comma;
  if (comma == null) return DECIMAL_POINTS;
  const point = numeric.find((look) => look.point !== null)?.point;
  if (point != null)
    return {
      mark: '.',
      doubt: `${sightText(comma)} stands beside ${sightText(point)}`,
    };
  if (numeric.some(({ isPlain }) => isPlain)) return { mark: ',', doubt: null };
  const [decimal, whole] = [comma.text.replace(',', '.'), comma.text.replace(',', '')];
  return {
    mark: '.',
    doubt: `${sightText(comma)} may be ${decimal} or ${whole}`,
  };
}

function see(look: ColumnLook, cell: string, line: number, isFirst: boolean): void {
  if (isMissing(cell)) return;
  const mark = markOf(cell);
  // A name above the column says nothing of its cells.
  if (mark === null && isFirst) return;
  look.filled++;
  if (mark === null) return;
  look.numbers++;
  if (mark === '.') look.point ??= { text: cell, line };
  if (mark === ',') look.comma ??= { text: cell, line };
  if (mark === ',' && !MAYBE_THOUSANDS.test(cell)) look.isPlain = true;
}

const sightText = ({ text, line }: Sight): string => `${text} on line ${line}`;
