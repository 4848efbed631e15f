/// <reference path="./papaparse.d.ts" />
import Papa from 'papaparse/papaparse.js';
import { LF, type LineBreak } from './wholeLines.ts';

/** What may stand between columns. */
const DELIMITERS = [',', '\t', ';', '|'] as const;
export type Delimiter = (typeof DELIMITERS)[number];

const ROWS_LOOKED_AT = 50;

/**
 * The delimiter under which the head of a table (whole lines, the header first) is most of a table: many columns in
 * the header, and rows that agree with it. A comma where none cuts the header in two.
 */
export function detectDelimiter(head: string, lineBreak: LineBreak): Delimiter {
  let best: Delimiter = ',';
  let bestScore = 0;
  for (const delimiter of DELIMITERS) {
    const score = tableScore(head, delimiter, lineBreak);
    if (score > bestScore) {
      best = delimiter;
      bestScore = score;
    }
  }
  return best;
}

/** Columns of the header times the share of rows with as many. */
function tableScore(head: string, delimiter: Delimiter, lineBreak: LineBreak): number {
  const rows = new Papa.Parser({ delimiter, newline: lineBreak === LF ? '\n' : '\r' })
    .parse(head, 0, true)
    .data.filter((row) => row.length > 1 || row[0]!.trim() !== '')
    .slice(0, ROWS_LOOKED_AT + 1);
  const header = rows[0];
  if (header === undefined || header.length < 2) return 0;
  const agreeing = rows.filter((row) => row.length === header.length).length;
  return (header.length * agreeing) / rows.length;
}
