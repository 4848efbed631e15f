import { Refusal } from '../../../base/refusal.ts';

/** What other files begin with, and what to do about each. Offsets are 0. */
const OTHER_KINDS: readonly {
  readonly start: readonly number[];
  readonly what: string;
  readonly cure: string;
}[] = [
  { start: codes('SIMPLE  ='), what: 'a FITS file', cure: 'write its table as CSV first' },
  { start: codes('PAR1'), what: 'a Parquet file', cure: 'write it as CSV first' },
  { start: [0x89, ...codes('HDF')], what: 'an HDF5 file', cure: 'write its table as CSV first' },
  {
    start: [...codes('PK'), 3, 4],
    what: 'a zip archive (spreadsheet files are zip archives too)',
    cure: 'unpack it, or save the sheet as CSV',
  },
  { start: codes('BZh'), what: 'a bzip2 file', cure: 'unpack it, or pack it with gzip' },
  { start: [0xfd, ...codes('7zXZ')], what: 'an xz file', cure: 'unpack it, or pack it with gzip' },
  { start: [0x28, 0xb5, 0x2f, 0xfd], what: 'a Zstandard file', cure: 'unpack it, or pack it with gzip' },
  { start: [0x1f, 0x8b], what: 'a gzip file inside a gzip file', cure: 'unpack it once' },
  { start: [0x1f, 0x9d], what: 'a Unix compress file', cure: 'unpack it, or pack it with gzip' },
  { start: codes('%PDF'), what: 'a PDF document', cure: 'open the table that it was made from' },
  { start: [0x89, ...codes('PNG')], what: 'a PNG picture', cure: 'open the table that it was made from' },
  { start: codes('<?xml'), what: 'an XML document', cure: 'write its table as CSV first' },
  { start: codes('<VOTABLE'), what: 'a VOTable', cure: 'write it as CSV first' },
  { start: codes('<!DOCTYPE'), what: 'a web page', cure: 'download the table itself' },
  { start: codes('<!doctype'), what: 'a web page', cure: 'download the table itself' },
  { start: codes('<html'), what: 'a web page', cure: 'download the table itself' },
];

function codes(text: string): number[] {
  return Array.from(text, (character) => character.charCodeAt(0));
}

function startsWith(head: Uint8Array, start: readonly number[]): boolean {
  return start.every((byte, i) => head[i] === byte);
}

/** Throws Refusal where the first bytes are those of a file that is no delimited text. */
export function refuseOtherKinds(head: Uint8Array): void {
  const kind = OTHER_KINDS.find((candidate) => startsWith(head, candidate.start));
  if (kind) {
    throw new Refusal(
      `This is ${kind.what}, where text with columns (CSV or TSV) was expected: ${kind.cure}.`,
    );
  }
}
