import { Refusal } from '../base/refusal.ts';
import { COLOUR_CHOICES, type ColourBy } from './schema.ts';

/** The columns among some choices of colour, each once, in order of name. */
export function columnsOf(choices: readonly (ColourBy | null)[]): string[] {
  const columns = choices.flatMap((by) => (by !== null && typeof by === 'object' ? [by.column] : []));
  return [...new Set(columns)].sort();
}

const COLUMN = 'column:';

/** The choice as one word, for lists and the command line: `column:NAME` for a column. */
export const colourKey = (by: ColourBy): string => (typeof by === 'object' ? COLUMN + by.column : by);

/**
 * The choice behind a word that colourKey makes.
 * @throws Refusal ('use') for any other word
 */
export function colourOfKey(key: string): ColourBy {
  if (key.startsWith(COLUMN) && key.length > COLUMN.length) return { column: key.slice(COLUMN.length) };
  const choice = COLOUR_CHOICES.find((known) => known === key);
  if (choice === undefined)
    throw new Refusal(
      `The colour was to be by "${key}", expected ${COLOUR_CHOICES.join(', ')}, or ${COLUMN}NAME for a column of the catalogue.`,
      'use',
    );
  return choice;
}
