import type { RowAccount, SetAsideReason, SetAsideRow } from './catalogue.ts';
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

/** Why one row was set aside, as a sentence with the column and the value at fault. */
export function reasonSentence({ reason, column, text }: SetAsideRow): string {
  const value = text === null || text.trim() === '' ? 'holds no number' : `is ${text}`;
  return `The row is set aside as one ${reasonText(reason)}${column === null ? '' : `: ${column} ${value}`}.`;
}

/** How numbers are read where that is not plain: that commas part the decimals, or why they do not and what to do. Else null. */
export function decimalsSentence({ rowsRead, decimals, decimalCommas = 0 }: RowAccount): string | null {
  if (decimals.mark === ',') return 'The file has decimal commas: 10,5 is read as 10.5.';
  if (decimalCommas * 2 <= rowsRead) return null;
  const why = decimals.doubt ?? 'in a file parted by commas only a decimal point is read';
  return (
    `${decimalCommas} of ${rowsRead} rows have numbers with a comma inside, such as 10,5, and ${why}: ` +
    'write the table again with decimal points, or with decimal commas alone and semicolons between the columns, and open that.'
  );
}
