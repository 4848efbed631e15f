import { expect, it } from 'vitest';
import { colourKey, colourOfKey, columnsOf } from '../../../shared-core/study/colourBy.ts';
import { COLOUR_CHOICES } from '../../../shared-core/study/schema.ts';

it('writes every choice as a word and reads it back', () => {
  for (const by of [...COLOUR_CHOICES, { column: 'Mag' }, { column: 'column:odd name' }])
    expect(colourOfKey(colourKey(by))).toEqual(by);
});

it('refuses other words, and a column without a name', () => {
  expect(() => colourOfKey('brightness')).toThrow(/"brightness", expected redshift, .*column:NAME/);
  expect(() => colourOfKey('column:')).toThrow(/expected redshift/);
});

it('names the columns once, in order', () => {
  expect(columnsOf([{ column: 'b' }, 'redshift', null, { column: 'a' }, { column: 'b' }])).toEqual([
    'a',
    'b',
  ]);
});
