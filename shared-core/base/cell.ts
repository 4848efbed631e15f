/** Starts a formula in common spreadsheets, or is trimmed by them and so uncovers one. */
const FORMULA_START = /^[=+\-@\t\r\n\uff1d\uff0b\uff0d\uff20]/;
const PLAIN_NUMBER = /^[+-]?(\d+\.?\d*|\.\d+)([eE][+-]?\d+)?$/;
const NEEDS_QUOTES = /[",;|\t\r\n]|^\s|\s$/;

/**
 * Text that a spreadsheet shows and does not run: a leading = + - @, tab or line break is preceded by an
 * apostrophe. A plain number (-91.5, +3e4) is left alone, since it is no formula.
 *
 * Source: OWASP, "CSV Injection" (owasp.org/www-community/attacks/CSV_Injection), the list of leading characters.
 */
export function harmlessText(text: string): string {
  return FORMULA_START.test(text) && !PLAIN_NUMBER.test(text) ? `'${text}` : text;
}

/**
 * One cell of a CSV file, harmless in a spreadsheet and quoted where needed (RFC 4180, section 2, rules 5 to 7).
 * Cells with a tab, semicolon or bar are quoted as well, for programs that split there.
 */
export function csvCell(text: string): string {
  const harmless = harmlessText(text);
  return NEEDS_QUOTES.test(harmless) ? `"${harmless.replaceAll('"', '""')}"` : harmless;
}
