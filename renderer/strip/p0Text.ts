import { roundTo } from '../../shared-core/base/roundTo.ts';
import { type ShownUnits, UNITS } from '../../shared-core/report/quantity.ts';
import { countText } from '../ui/numberText.ts';
import { unitText } from '../ui/unitText.ts';

/** P0 as it is set, and without h: the same power in both units, such as 10 000 (Mpc/h)\u00b3 and 32 285 Mpc\u00b3. */
export function p0Texts(
  p0Mpc3PerH3: number,
  { h }: Pick<ShownUnits, 'h'>,
): readonly [perH: string, plain: string] {
  const [plainUnit, perHUnit] = UNITS.Mpc3.plain;
  return [
    `${powerText(p0Mpc3PerH3)} ${unitText(perHUnit)}`,
    `${powerText(p0Mpc3PerH3 / h ** UNITS.Mpc3.lengthPower)} ${unitText(plainUnit)}`,
  ];
}

// A power below a hundred would lose its digits as a whole number.
function powerText(power: number): string {
  return power >= 100 ? countText(Math.round(power)) : String(roundTo(power, 3));
}
