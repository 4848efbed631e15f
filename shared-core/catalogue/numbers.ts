const DECIMAL = /^[+-]?(\d+\.?\d*|\.\d+)([eE][+-]?\d+)?$/;
const DECIMAL_COMMA = /^[+-]?(\d+,\d*|,\d+)([eE][+-]?\d+)?$/;
/** How tables spell "no value". NaN is not among them: it says that a computation failed. */
const MISSING = new Set(['', 'na', 'n/a', 'null', 'none', '-', '--', '\\n']);

const SPACE = 32;
const DEL = 127;
const ZERO = 48;
const NINE = 57;

/**
 * The number that a cell of text holds, white space around it allowed; NaN where it holds none. Strict: plain decimal
 * notation with a point, with or without an exponent. Not numbers: nan, inf, 1e400 (beyond a double), 0x10, 12h30m,
 * 1,5 and the empty cell.
 */
export function parseNumber(text: string): number {
  const value = +text;
  // Most cells need no more: not zero (an empty cell converts to it), finite, no white space, no 0x or 0b prefix.
  if (value !== 0 && value - value === 0) {
    const first = text.charCodeAt(0);
    if (first > SPACE && first < DEL && (first !== ZERO || !(text.charCodeAt(1) > NINE))) return value;
  }
  return parseCarefully(text);
}

function parseCarefully(text: string): number {
  const trimmed = text.trim();
  if (!DECIMAL.test(trimmed)) return Number.NaN;
  const value = +trimmed;
  // Adding 0 turns -0 into 0, so that equal positions are equal to the bit.
  return Number.isFinite(value) ? value + 0 : Number.NaN;
}

/** As parseNumber, of a file with decimal commas: 1,5 is one and a half, and 1.5 is no number. */
export function parseCommaNumber(text: string): number {
  return text.includes('.') ? Number.NaN : parseNumber(text.replace(',', '.'));
}

/** What parts the decimals of a number, white space around it allowed: '' for a whole one, null for no number. */
export function markOf(text: string): '.' | ',' | '' | null {
  if (!Number.isNaN(parseNumber(text))) return text.includes('.') ? '.' : '';
  return DECIMAL_COMMA.test(text.trim()) ? ',' : null;
}

/** True of a cell that says there is no value: empty, NA, null, none, a dash (case-insensitive). */
export function isMissing(text: string): boolean {
  return MISSING.has(text.trim().toLowerCase());
}
