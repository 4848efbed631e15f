import { DEEPEST_REDSHIFT } from '../../shared-core/shells/edges.ts';
import type { RadialReading } from '../../shared-core/study/schema.ts';
import { readNumber } from '../ui/numberText.ts';
import { markText } from './axisMarks.ts';
import type { Readings } from './readings.ts';

/** The redshift of what was typed in a reading, to the last digit; or why there is none. */
export function typedRedshift(
  text: string,
  kind: RadialReading,
  readings: Readings,
): { readonly z: number } | { readonly sentence: string } {
  const reading = readings[kind];
  const read = readNumber(text, kind === 'redshift' ? 'The redshift' : `The ${reading.words}`);
  if ('sentence' in read) return read;
  const deepest = reading.shownAt(DEEPEST_REDSHIFT);
  const unit = kind === 'redshift' ? '' : ` ${reading.unit}`;
  if (read.value < 0 || read.value > deepest)
    return {
      sentence: `The ${reading.words} is ${read.value}${unit}: give 0 to ${markText(Math.floor(deepest))}${unit}.`,
    };
  return { z: reading.exactRedshiftAt(read.value) };
}
