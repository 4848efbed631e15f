/// <reference path="./papaparse.d.ts" />
import Papa from 'papaparse/papaparse.js';
import type { LineBreak } from './records.ts';

/** What may stand between columns. */
export const DELIMITERS = [',', '\t', ';', '|'] as const;
export type Delimiter = (typeof DELIMITERS)[number];

const ROWS_LOOKED_AT = 50;

const NAMES: Readonly<Record<Delimiter, string>> = {
  ',': 'comma',
  '\t': 'tab',
  ';': 'semicolon',
  '|': 'bar',
};

/** The delimiter's name in a sentence. */
export function delimiterName(delimiter: Delimiter): string {
  return NAMES[delimiter];
}

/**
 * The delimiter under which the head of a table (its header first) is most of a table: many columns in the header,
 * and rows that agree with it. A comma where none cuts the header in two.
 */
export function detectDelimiter(head: string, newline: LineBreak, isWhole: boolean): Delimiter {
  let best: Delimiter = ',';
  let bestScore = 0;
  for (const delimiter of DELIMITERS) {
    const score = tableScore(head, delimiter, newline, isWhole);
    if (score > bestScore) {
      best = delimiter;
      bestScore = score;
    }
  }
  return best;
}

/** Columns of the header times the share of rows with as many. */
function tableScore(head: string, delimiter: Delimiter, newline: LineBreak, isWhole: boolean): number {
  const rows = new Papa.Parser({ delimiter, newline })
    .parse(head, 0, !isWhole)
    .data.filter((row) => row.length > 1 || row[0]!.trim() !== '')
    .slice(0, ROWS_LOOKED_AT + 1);
  const header = rows[0];
  if (header === undefined || header.length < 2) return 0;
  const agreeing = rows.filter((row) => row.length === header.length).length;
  return (header.length * agreeing) / rows.length;
}
