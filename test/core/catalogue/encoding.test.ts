import { describe, expect, it } from 'vitest';
import { asUtf8 } from '../../../shared-core/catalogue/formats/delimited/encoding.ts';
import { inPieces, refusalOf, utf8, utf16 } from './support.ts';

async function decode(bytes: Uint8Array, sizes?: readonly number[]): Promise<string> {
  const pieces: Uint8Array[] = [];
  for await (const piece of asUtf8(inPieces(bytes, sizes))) pieces.push(piece.slice());
  return Buffer.concat(pieces).toString('utf8');
}

const table = 'name,ra,dec,z\n"Fornax α, größte ★ 🌌",54.6,-35.5,0.0046\n';

describe('asUtf8', () => {
  it('reads UTF-8 with and without a byte-order mark, and UTF-16 by its mark', async () => {
    expect(await decode(utf8(table))).toBe(table);
    expect(await decode(utf8(`\ufeff${table}`))).toBe(table);
    expect(await decode(utf16(table, 'le'))).toBe(table);
    expect(await decode(utf16(table, 'be'))).toBe(table);
  });

  it('puts characters together that pieces cut apart', async () => {
    expect(await decode(utf8(table), [5, 1, 1, 2, 1])).toBe(table);
    expect(await decode(utf16(table, 'le'), [4, 1, 3])).toBe(table);
    expect(await decode(utf16(table, 'be'), [4, 1, 3])).toBe(table);
  });

  it('changes no number where a name is in Latin-1', async () => {
    const latin = new Uint8Array(Buffer.from('name,ra\ngrößte,12.5\n', 'latin1'));
    expect(await decode(latin)).toBe('name,ra\ngr\ufffd\ufffdte,12.5\n');
  });

  const faults: [name: string, bytes: Uint8Array, sentence: RegExp][] = [
    ['NUL bytes', utf8('ra,dec,z\n1,2,\0\0\0\n'), /binary data.*expected.*save the table as CSV/],
    ['a NUL far inside', utf8(`${'1,2,3\n'.repeat(40_000)}\0`), /binary data/],
    ['UTF-16 without a mark', utf16('ra,dec,z\n1,2,3\n', 'le', false), /UTF-16 with a byte-order mark/],
    ['UTF-32', new Uint8Array([0xff, 0xfe, 0, 0, 0x72, 0, 0, 0]), /UTF-32/],
    [
      'random bytes without NUL',
      Uint8Array.from({ length: 4000 }, (_, i) => 1 + ((i * i * 7919) % 255)),
      /binary data/,
    ],
    ['FITS', utf8(`SIMPLE  =                    T${' '.repeat(2850)}`), /a FITS file/],
    ['Parquet', utf8('PAR1\x15\x04'), /a Parquet file/],
    ['HDF5', new Uint8Array([0x89, 0x48, 0x44, 0x46, 13, 10, 26, 10]), /an HDF5 file/],
    ['a spreadsheet', new Uint8Array([0x50, 0x4b, 3, 4, 20, 0]), /zip archive.*save the sheet as CSV/],
    ['bzip2', utf8('BZh91AY&SY'), /bzip2.*gzip/],
    ['a web page', utf8('<!DOCTYPE html><html>'), /a web page.*download the table/],
    ['a VOTable', utf8('<?xml version="1.0"?><VOTABLE/>'), /XML/],
  ];
  it.each(faults)('refuses %s with a sentence', async (_name, bytes, sentence) => {
    expect((await refusalOf(() => decode(bytes))).message).toMatch(sentence);
  });
});
