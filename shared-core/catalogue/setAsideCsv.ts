import { csvCell } from '../base/cell.ts';
import type { SetAsideRow } from './catalogue.ts';

const PART_CHARACTERS = 65_536;

/** First line of a set-aside file, with its line end. */
export const SET_ASIDE_HEADER = 'line,reason,column,text\n';

/** One row of a set-aside file, with its line end; its text is harmless in a spreadsheet. */
export function setAsideLine(row: SetAsideRow): string {
  return `${row.line},${row.reason},${csvCell(row.column ?? '')},${csvCell(row.text ?? '')}\n`;
}

/** A set-aside file in the making. */
export interface SetAsideCsv {
  add(row: SetAsideRow): void;
  /** The file so far, header first, in parts to be written one after the other. */
  parts(): string[];
}

/** Starts a set-aside file: CSV with the columns line, reason, column and text, and a row for each row added. */
export function setAsideCsv(): SetAsideCsv {
  const full: string[] = [];
  let open = SET_ASIDE_HEADER;
  return {
    add(row) {
      open += setAsideLine(row);
      if (open.length >= PART_CHARACTERS) {
        full.push(open);
        open = '';
      }
    },
    parts: () => (open === '' ? [...full] : [...full, open]),
  };
}
