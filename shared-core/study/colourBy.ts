import type { ColourBy } from './schema.ts';

/** The columns among some choices of colour, each once, in order of name. */
export function columnsOf(choices: readonly (ColourBy | null)[]): string[] {
  const columns = choices.flatMap((by) => (by !== null && typeof by === 'object' ? [by.column] : []));
  return [...new Set(columns)].sort();
}

/** The choice as one word, for lists and the command line: `column:NAME` for a column. */
export const colourKey = (by: ColourBy): string => (typeof by === 'object' ? `column:${by.column}` : by);

/** The choice behind a word that colourKey made; other words are handed on as they are, for the schema to judge. */
export const colourOfKey = (key: string): ColourBy =>
  key.startsWith('column:') ? { column: key.slice('column:'.length) } : (key as ColourBy);
