import { BOLD_WIDTHS, REGULAR_WIDTHS } from './helveticaWidths.ts';

/** The program's own typeface for pictures (faces.ts loads it). */
export const FACE_NAME = 'Arimo';

/** The fonts of a picture: one design under the names that it has on the common systems, all of one width. */
export const FONT_FAMILY = `${FACE_NAME}, Helvetica, Arial, 'Liberation Sans', 'Nimbus Sans', sans-serif`;

/** From this weight on the bold font is used: pictures know two weights. */
export const BOLD_FROM = 600;

/** Advance of one character in thousandths of the type size. */
function advance(code: number, widths: readonly number[]): number {
  if (code >= 0x20 && code <= 0x7e) return widths[code - 0x20]!;
  if (code >= 0xa0 && code <= 0xff) return widths[code - 0xa0 + 95]!;
  if (isUnseen(code)) return 0;
  if (code === 0x2009 || code === 0x202f) return 200;
  if (code === 0x2014 || code === 0x2026) return 1000;
  if (code === 0x2013) return 556;
  if (code === 0x2018 || code === 0x2019) return widths === BOLD_WIDTHS ? 278 : 222;
  // Writing systems whose letters fill a square.
  if ((code >= 0x1100 && code <= 0x11ff) || (code >= 0x2e80 && code <= 0xd7ff) || code >= 0xf900) return 1000;
  return 620;
}

/** Marks that combine with the letter before, and marks that turn the writing direction. */
const isUnseen = (code: number): boolean =>
  code < 0x20 ||
  (code >= 0x300 && code <= 0x36f) ||
  (code >= 0x591 && code <= 0x5bd) ||
  (code >= 0x64b && code <= 0x65f) ||
  (code >= 0x200b && code <= 0x200f) ||
  (code >= 0x202a && code <= 0x202e) ||
  (code >= 0x2060 && code <= 0x2069);

/**
 * Width of a text in the units of its size: exact for Latin letters, a fair estimate for other writing systems.
 * A table, so that a picture's layout is the same on every machine and needs no browser.
 */
export function textWidth(text: string, size: number, weight = 400): number {
  const widths = weight >= BOLD_FROM ? BOLD_WIDTHS : REGULAR_WIDTHS;
  let sum = 0;
  for (const character of text) sum += advance(character.codePointAt(0)!, widths);
  return (sum * size) / 1000;
}

/** Lines of at most `width`, broken at spaces; a word longer than a line is broken where it must be. */
export function wrapText(text: string, width: number, size: number, weight = 400): string[] {
  const lines: string[] = [];
  for (const paragraph of text.split(/\r\n?|\n/)) {
    let line = '';
    for (const word of paragraph.split(/[ \t]+/).filter((w) => w !== '')) {
      const longer = line === '' ? word : `${line} ${word}`;
      if (textWidth(longer, size, weight) <= width) {
        line = longer;
        continue;
      }
      if (line !== '') lines.push(line);
      line = word;
      while (textWidth(line, size, weight) > width) {
        const head = shorten(line, width, size, weight);
        lines.push(head);
        line = line.slice(head.length);
      }
    }
    if (line !== '') lines.push(line);
  }
  return lines;
}

/** As much of a text's beginning as fits, at least one character. */
function shorten(text: string, width: number, size: number, weight: number): string {
  let head = '';
  for (const character of text) {
    if (head !== '' && textWidth(head + character, size, weight) > width) break;
    head += character;
  }
  return head;
}

/** The text, or its beginning with an ellipsis where it is wider than `width`. */
export function fitText(text: string, width: number, size: number, weight = 400): string {
  if (textWidth(text, size, weight) <= width) return text;
  return `${shorten(text, width - textWidth('…', size, weight), size, weight).trimEnd()}…`;
}
