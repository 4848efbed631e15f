import type { SetAsideReason } from './catalogue.ts';
import { LARGEST_REDSHIFT } from './cleaning.ts';

const TEXTS: Readonly<Record<SetAsideReason, string>> = {
  wrongFieldCount: 'with more or fewer fields than the header',
  missingValue: 'with a missing value',
  notANumber: 'with a value that is not a number',
  raOutOfRange: 'with right ascension outside 0 to 360 degrees',
  decOutOfRange: 'with declination outside -90 to 90 degrees',
  redshiftNotAboveZero: 'with redshift not above 0',
  redshiftTooLarge: `with redshift above ${LARGEST_REDSHIFT}`,
  weightNegative: 'with a weight below 0',
  outsideRegion: 'outside the region',
  outsideCuts: 'outside the cuts',
};

/** Why rows were set aside, in words that follow a count: "3 with a missing value". */
export function reasonText(reason: SetAsideReason): string {
  return TEXTS[reason];
}
