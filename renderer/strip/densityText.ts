import { roundTo } from '../../shared-core/base/roundTo.ts';
import { markText } from './axisMarks.ts';
import type { Upward } from './densityScale.ts';
import { powerOfTen } from './words.ts';

/** Characters that the room beside the plot holds. */
const MOST_CHARACTERS = 6;

/**
 * A number of the upward scales, short enough for the room beside the plot.
 * @param power of ten that the legend says, taken out of the number
 */
export function densityText(value: number, upward: Upward, power: number): string {
  if (upward === 'linear') {
    const plain = markText(roundTo(value / 10 ** power, 8));
    return plain.length <= MOST_CHARACTERS && !plain.includes('e') ? plain : powersShown(value / 10 ** power);
  }
  const exponent = Math.round(Math.log10(value));
  return exponent >= -2 && exponent <= 3 ? markText(value) : powerOfTen(exponent);
}

// 2.5×10⁶: the digits of a round number only.
function powersShown(value: number): string {
  const [mantissa, power] = value.toExponential().split('e');
  return `${roundTo(Number(mantissa), 3)}×${powerOfTen(Number(power))}`;
}
