import type { ColourBy, ColourChoice } from '../../shared-core/study/schema.ts';

const COLOUR_WORDS: Readonly<Record<ColourChoice, string>> = {
  redshift: 'redshift',
  lookback: 'lookback time',
  shell: 'shell',
  magnitude: 'magnitude',
  density: 'local density',
};

/** What galaxies are coloured by, in a sentence and in a list. */
export const colourWords = (by: ColourBy): string =>
  typeof by === 'object' ? `column ${by.column}` : COLOUR_WORDS[by];
