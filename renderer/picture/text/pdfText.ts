/** A run of text in one of the two encodings that PDF's own fonts have. */
export interface PdfRun {
  readonly font: 'latin' | 'symbol';
  readonly bytes: readonly number[];
}

// What WinAnsiEncoding has between 0x80 and 0x9f (ISO 32000-1, annex D.2).
const WIN_ANSI = '€\0‚ƒ„…†‡ˆ‰Š‹Œ\0Ž\0\0‘’“”•–—˜™š›œ\0žŸ';
// Codes 0x41.. and 0x61.. of the font Symbol (ISO 32000-1, annex D.5), and a few signs.
const GREEK = 'ΑΒΧΔΕΦΓΗΙ\0ΚΛΜΝΟΠΘΡΣΤΥ\0ΩΞΨΖ';
const SMALL_GREEK = 'αβχδεφγηι\0κλμνοπθρστυ\0ωξψζ';
const SIGNS: Readonly<Record<string, number>> = { '−': 0x2d, '≤': 0xa3, '∞': 0xa5, '≥': 0xb3, '≈': 0xbb };

/** Narrow and unbroken spaces are spaces in these fonts. */
const SPACES = /[\u00a0\u2002-\u200a\u202f]/;

/** The text as runs of the fonts, or null where they do not have all of its letters. */
export function pdfRuns(text: string): PdfRun[] | null {
  const runs: { font: PdfRun['font']; bytes: number[] }[] = [];
  for (const character of text) {
    const [font, byte] = codeOf(character) ?? [];
    if (font === undefined || byte === undefined) return null;
    const last = runs.at(-1);
    if (last?.font === font) last.bytes.push(byte);
    else runs.push({ font, bytes: [byte] });
  }
  return runs;
}

function codeOf(character: string): [PdfRun['font'], number] | null {
  if (SPACES.test(character)) return ['latin', 0x20];
  const code = character.codePointAt(0)!;
  if ((code >= 0x20 && code <= 0x7e) || (code >= 0xa1 && code <= 0xff)) return ['latin', code];
  const ansi = WIN_ANSI.indexOf(character);
  if (ansi >= 0) return ['latin', 0x80 + ansi];
  for (const [letters, first] of [
    [GREEK, 0x41],
    [SMALL_GREEK, 0x61],
  ] as const) {
    const at = letters.indexOf(character);
    if (at >= 0) return ['symbol', first + at];
  }
  const sign = SIGNS[character];
  return sign === undefined ? null : ['symbol', sign];
}
