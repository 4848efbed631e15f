import { csvCell } from '../base/cell.ts';
import type { SetAsideRow } from './catalogue.ts';
import { reasonSentence } from './reasons.ts';

const PART_CHARACTERS = 65_536;

/** First line of a set-aside file, with its line end (RFC 4180: CR LF). */
export const SET_ASIDE_HEADER = 'line,reason,column,text,name,explanation\r\n';

/** One row of a set-aside file, with its line end; its text is harmless in a spreadsheet. */
export function setAsideLine(row: SetAsideRow): string {
  const { line, reason, column, text, name } = row;
  const cells = [column ?? '', text ?? '', name ?? '', reasonSentence(row)].map(csvCell);
  return `${line},${reason},${cells.join(',')}\r\n`;
}

/** A set-aside file in the making. */
export interface SetAsideCsv {
  add(row: SetAsideRow): void;
  /** The file so far, header first, in parts to be written one after the other. */
  parts(): string[];
}

/** Starts a set-aside file: CSV with a header (line, code of the reason, column and text at fault, the row's name, the reason as a sentence) and a row for each row added. */
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
