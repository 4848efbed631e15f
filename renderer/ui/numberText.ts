import { roundTo } from '../../shared-core/base/roundTo.ts';
import { parseNumber } from '../../shared-core/catalogue/numbers.ts';

/** What a person typed, as a number; or the sentence that says why it is none. */
export type ReadNumber = { readonly value: number } | { readonly sentence: string };

/** Reads a typed number: plain decimal notation with a point, as in a catalogue. */
export function readNumber(text: string, name: string): ReadNumber {
  const value = parseNumber(text);
  if (!Number.isNaN(value)) return { value };
  const came = text.trim() === '' ? 'is empty' : `is "${text.trim()}"`;
  return { sentence: `${name} ${came}: give a number such as 0.5 or 1e4.` };
}

/** A number in a field: at most ten digits, so that 0.1 + 0.2 reads 0.3. Empty for none. */
export function fieldText(value: number | null): string {
  return value === null ? '' : String(roundTo(value, 10));
}

/** A count for reading: digits in threes, parted by narrow spaces. */
export function countText(count: number): string {
  return String(count).replace(/\B(?=(\d{3})+$)/g, '\u202f');
}

/** A file's size for reading, in powers of 1000. */
export function sizeText(bytes: number): string {
  if (bytes < 1000) return `${bytes} bytes`;
  const units = ['kB', 'MB', 'GB', 'TB'];
  const power = Math.min(units.length, Math.floor(Math.log10(bytes) / 3));
  return `${(bytes / 1000 ** power).toPrecision(3)} ${units[power - 1]}`;
}
