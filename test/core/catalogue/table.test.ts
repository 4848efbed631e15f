import { gzipSync } from 'node:zlib';
import { describe, expect, it } from 'vitest';
import type { Delimiter } from '../../../shared-core/catalogue/formats/delimited/delimiter.ts';
import { openTable } from '../../../shared-core/catalogue/formats/delimited/openTable.ts';
import { bytesOf, inPieces, refusalOf, utf8 } from './support.ts';

async function read(text: string, delimiter?: Delimiter) {
  const table = await openTable(bytesOf(text), { delimiter });
  const rows: string[][] = [];
  const lines: number[] = [];
  for await (const records of table.rows()) {
    rows.push(...records.rows.map((row) => row.map((cell) => cell.trim())));
    lines.push(...records.lines);
  }
  return { header: table.header, delimiter: table.delimiter, rows, lines };
}

describe('openTable', () => {
  it.each([',', '\t', ';', '|'] as const)('finds the delimiter %j', async (mark) => {
    const found = await read(['ra,dec,z', '1,2,3', '4,5,6'].join('\n').replaceAll(',', mark));
    expect(found.delimiter).toBe(mark);
    expect(found.header).toEqual(['ra', 'dec', 'z']);
    expect(found.rows).toEqual([
      ['1', '2', '3'],
      ['4', '5', '6'],
    ]);
  });

  it('is not misled by other delimiters inside cells', async () => {
    expect((await read('name;ra;dec;z\nA, B, C, D;1;2;3\nE|F, G;4;5;6\n')).delimiter).toBe(';');
    expect((await read('name,ra,dec,z\n"a;b;c;d;e;f",1,2,3\n"g;h",4,5,6\n')).delimiter).toBe(',');
    expect((await read('ra;dec;z\n1,5;2,5;3,5\n')).delimiter).toBe(';');
    expect((await read('# made by hand; with love, again\nra\tdec\tz\n1\t2\t3\n')).delimiter).toBe('\t');
  });

  it('takes a delimiter that is given', async () => {
    expect((await read('a,b;c,d\n1,2;3,4\n', ';')).header).toEqual(['a,b', 'c,d']);
  });

  it('passes comments and blank lines before the header, and counts their lines', async () => {
    const found = await read('# one\n\n  # an "open quote\n\t\nra,dec,z\n1,2,3\n');
    expect(found.header).toEqual(['ra', 'dec', 'z']);
    expect(found.lines[0]).toBe(6);
  });

  it('passes a head of comments longer than a block', async () => {
    const found = await read(
      `${'# a line of comment, with commas, and more\n'.repeat(10_000)}ra;dec;z\n1;2;3\n`,
    );
    expect(found.header).toEqual(['ra', 'dec', 'z']);
    expect(found.lines[0]).toBe(10_002);
  });

  it('takes the names from the comment line above when the first row is all numbers', async () => {
    const found = await read('# my catalogue\n# ra,dec,z\n10,20,0.5\n');
    expect(found.header).toEqual(['ra', 'dec', 'z']);
    expect(found.rows[0]).toEqual(['10', '20', '0.5']);
    expect(found.lines[0]).toBe(3);
  });

  it('keeps a line with # below the header as a row', async () => {
    expect((await read('id,ra\n#1,2\n')).rows).toEqual([['#1', '2']]);
  });

  it('names columns without a name and columns that repeat one', async () => {
    expect((await read(',z,z, z ,"z (2)",\n1,2,3,4,5,6\n')).header).toEqual([
      'column 1',
      'z',
      'z (2)',
      'z (3)',
      'z (2) (2)',
      'column 6',
    ]);
  });

  it('names ten thousand columns of one name without delay', async () => {
    const { header } = await read(`${Array(10_000).fill('z').join(',')}\n`);
    expect(new Set(header).size).toBe(10_000);
  });

  it('unpacks gzip, told by its first bytes and not by a name', async () => {
    const table = await openTable(inPieces(new Uint8Array(gzipSync('ra,dec,z\r\n1,2,3\r\n')), [1]));
    expect(table.header).toEqual(['ra', 'dec', 'z']);
    await table.close();
  });

  it('tells the watchers of every byte, and lets go of the source when closed', async () => {
    let isReleased = false;
    async function* source() {
      try {
        for (;;) yield utf8('ra,dec,z\n1,2,3\n');
      } finally {
        isReleased = true;
      }
    }
    const seen: number[] = [];
    const told: number[] = [];
    const table = await openTable(source(), {
      onBytes: (chunk) => seen.push(chunk.length),
      onProgress: (bytesRead) => told.push(bytesRead),
    });
    expect(seen.length).toBeGreaterThan(1000);
    expect(told.at(-1)).toBe(15 * told.length);
    expect(isReleased).toBe(false);
    await table.close();
    expect(isReleased).toBe(true);
  });

  const faults: [name: string, text: string, sentence: RegExp][] = [
    ['an empty file', '', /^This file is empty, where a header/],
    ['a byte-order mark alone', '\ufeff', /^This file is empty/],
    ['blank lines alone', '\n \n\r\n', /nothing but blank lines and comments/],
    ['comments alone', '# ra,dec,z', /nothing but blank lines and comments/],
    [
      'numbers without a header',
      '1.5,2.5,0.1\n2,3,0.2\n',
      /only numbers \(1.5, 2.5, 0.1\).*put a line such as ra,dec,z above/,
    ],
    ['a comment line without end', `# ${'x'.repeat(3_000_000)}`, /^Line 1 is longer than 1048576 bytes/],
    ['a million columns', `${'c,'.repeat(1_000_000)}c\n`, /^Line 1 is longer than 1048576 bytes/],
    [
      'a hundred thousand columns',
      `${'c,'.repeat(99_999)}c\n1,2\n`,
      /header has 100000 columns, where at most 10000/,
    ],
    [
      'a header whose quote is open',
      'ra,"dec,z\n1,2,3\n',
      /row that starts on line 1 is still open at the end/,
    ],
  ];
  it.each(faults)('refuses %s with a sentence', async (_name, text, sentence) => {
    expect((await refusalOf(() => read(text))).message).toMatch(sentence);
  });
});
