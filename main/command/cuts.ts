import { Refusal } from '../../shared-core/base/refusal.ts';
import type { Cut } from '../../shared-core/catalogue/catalogue.ts';
import { oneNumber } from './numbers.ts';

/** Reads a cut such as "mag:..22.5", "mag:18..22.5" or "weight:0.1..". */
export function parseCut(text: string): Cut {
  const [, column, min, max] = /^(.+):(.*)\.\.(.*)$/.exec(text) ?? [];
  if (column === undefined || min === undefined || max === undefined || (min === '' && max === ''))
    throw new Refusal(
      `The cut is "${text}", expected COLUMN:MIN..MAX with one end or both, such as mag:..22.5.`,
      'use',
    );
  const read = oneNumber('--cut');
  return { column, min: min === '' ? null : read(min), max: max === '' ? null : read(max) };
}
