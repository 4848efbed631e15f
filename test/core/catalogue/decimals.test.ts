import fc from 'fast-check';
import { gzipSync } from 'fflate';
import { describe, expect, it } from 'vitest';
import { columnsAtLines } from '../../../shared-core/catalogue/columnsAtLines.ts';
import { previewCatalogue } from '../../../shared-core/catalogue/preview.ts';
import { decimalsSentence } from '../../../shared-core/catalogue/reasons.ts';
import { rowName } from '../../../shared-core/catalogue/rowName.ts';
import { describeAccount } from '../../../shared-core/report/notes.ts';
import { bytesOf, load, utf8, utf16 } from './support.ts';

const POINTS = [
  '# made by hand',
  'name,ra,dec,z,mag,remark',
  'g1,185.234,-1.5,0.021,17.25,a',
  'g2,0.5,+2,1.1e-1,,b',
  // Beyond what one multiplication gives exactly: both go by way of Number().
  'g3,185.23456789012345678,.25,0.3,18.,c',
  'g4,"12.125",0.75,0.4,nan,d',
  'g5,12h,0.75,0.4,19.5,e',
  'g6,400.5,0.75,0.4,19.5,f',
  'g7,1.5,0.75,0.4',
  '',
].join('\n');
/** The same as a spreadsheet of another country writes it. */
const withCommas = (text: string, delimiter = ';') =>
  text.replaceAll(',', delimiter).replaceAll('.', ',').replaceAll('\n', '\r\n');
const extras = ['mag'];

describe('a file with decimal commas', () => {
  it.each([';', '\t', '|'])('parted by %j holds the very numbers of that with points', async (delimiter) => {
    const text = withCommas(POINTS, delimiter);
    const expected = await load(POINTS, { extras });
    expect(expected.catalogue.account).toMatchObject({
      rowsRead: 7,
      kept: 4,
      setAside: 3,
    });
    for (const bytes of [utf8(text), gzipSync(utf8(text)), utf16(text, 'le')]) {
      const found = await load(bytes, { extras }, [7, 1000]);
      for (const column of ['raDeg', 'decDeg', 'redshift', 'magnitude', 'line'] as const)
        expect(found.catalogue[column], column).toEqual(expected.catalogue[column]);
      expect(found.catalogue.extras).toEqual(expected.catalogue.extras);
      expect(found.catalogue.account).toEqual({
        ...expected.catalogue.account,
        decimals: { mark: ',', doubt: null },
      });
      // What stood there is told as it stood there.
      const rows = expected.setAside.map((row) => ({
        ...row,
        text: withCommas(row.text!, delimiter),
      }));
      expect(found.setAside).toEqual(rows);
      expect(describeAccount(found.catalogue.account)).toMatch(/decimal commas: 10,5 is read as 10\.5\.$/);
    }
  });

  it('holds the same for single columns, names and the preview', async () => {
    const text = withCommas(POINTS);
    const found = await columnsAtLines(bytesOf(text), ['mag', 'ra'], [3, 4, 6]);
    expect(found).toEqual(await columnsAtLines(bytesOf(POINTS), ['mag', 'ra'], [3, 4, 6]));
    expect([...found.get('ra')!]).toEqual([185.234, 0.5, 12.125]);
    expect(await rowName(bytesOf(text), {}, 5)).toBe('g3');
    const preview = await previewCatalogue(bytesOf(text));
    expect(preview.decimals.mark).toBe(',');
    expect(preview.rows[0]).toEqual(['g1', '185,234', '-1,5', '0,021', '17,25', 'a']);
  });

  it('whose names stand in a comment has them also when its first row is numbers', async () => {
    const { header, catalogue } = await load('# ra;dec;z\n185;-1;0,02\n');
    expect(header).toEqual(['ra', 'dec', 'z']);
    expect([...catalogue.raDeg]).toEqual([185]);
  });

  it('gives back whatever numbers were written into it, to the bit', async () => {
    const row = fc.tuple(
      fc.double({ min: 0, max: 360, noNaN: true }),
      fc.double({ min: -90, max: 90, noNaN: true }),
      fc.double({ min: 1e-6, max: 1000, noNaN: true }),
    );
    const spelling = fc.constantFrom<(value: number) => string>(
      String,
      (value) => value.toExponential(),
      (value) => ` ${value.toPrecision(17)} `,
      (value) => `"${value}"`,
    );
    await fc.assert(
      fc.asyncProperty(
        fc.array(row, { maxLength: 40 }),
        spelling,
        fc.constantFrom(';', '\t', '|'),
        async (rows, spell, delimiter) => {
          // The first row makes it a file with decimal commas, whatever follows.
          const all = [[0.5, 0.5, 0.5], ...rows];
          const lines = all.map((cells) => cells.map((c) => spell(c).replace('.', ',')).join(delimiter));
          const { catalogue } = await load([`ra${delimiter}dec${delimiter}z`, ...lines].join('\n'));
          expect(catalogue.account.kept).toBe(all.length);
          // No -0 among the values read.
          expect([...catalogue.raDeg]).toEqual(all.map(([ra]) => ra! + 0));
          expect([...catalogue.decDeg]).toEqual(all.map(([, dec]) => dec! + 0));
          expect([...catalogue.redshift]).toEqual(all.map(([, , z]) => z!));
        },
      ),
      { numRuns: 300 },
    );
  });

  it('keeps to commas: a number with a point further down is set aside with its line', async () => {
    // More than the head of a file: 64 kB and a little.
    const rows = Array.from({ length: 8000 }, () => '10,5;2;0,5');
    const { catalogue, setAside } = await load(`ra;dec;z\n${rows.join('\n')}\n10.5;2;0,5\n1,2,3;2;0,5\n`);
    expect(catalogue.account).toMatchObject({
      rowsRead: 8002,
      kept: 8000,
      setAside: 2,
    });
    expect(setAside.map(({ line, text }) => [line, text])).toEqual([
      [8002, '10.5'],
      [8003, '1,2,3'],
    ]);
  });
});

describe('commas that cannot be told to part decimals', () => {
  const account = async (rows: readonly string[]) =>
    (await load(`ra;dec;z\n${rows.join('\n')}\n`)).catalogue.account;

  it('beside points are refused row by row, with both lines', async () => {
    const read = await account(['10,5;2,25;0,5', '11,5;2,5;0,25', '10.5;2.25;0.5']);
    expect(read).toMatchObject({
      rowsRead: 3,
      kept: 1,
      reasons: { notANumber: 2 },
      decimalCommas: 2,
    });
    expect(decimalsSentence(read)).toMatch(
      /^2 of 3 rows .*10,5 on line 2 stands beside 10\.5 on line 4: write/,
    );
    expect(describeAccount(read)).toContain(decimalsSentence(read)!);
    // Also where a column has the one and a column the other.
    expect(decimalsSentence(await account(['10,5;2;0.5']))).toMatch(
      /10,5 on line 2 stands beside 0\.5 on line 2/,
    );
  });

  it('and may be marks of thousands are refused, with both readings; one that may not be decides', async () => {
    const read = await account(['185;-1;6,300', '186;-1;6,450']);
    expect(read).toMatchObject({
      kept: 0,
      reasons: { notANumber: 2 },
      decimals: { mark: '.' },
    });
    expect(decimalsSentence(read)).toMatch(/6,300 on line 2 may be 6\.300 or 6300: write/);
    expect(await account(['185,000;-1,500;0,021'])).toMatchObject({
      kept: 1,
      decimals: { mark: ',' },
    });
  });

  it('in a few cells, in text, or in a file parted by commas change nothing', async () => {
    expect(decimalsSentence(await account(['12h;2;0.5', '1,2,3;1;1']))).toBeNull();
    expect(decimalsSentence(await account(['10,5;2;0.5', '10.5;2;0.5']))).toBeNull();
    const remarks = await load('ra;dec;z;remark\n1;2;0.5;1,5\n1.5;2;0.5;see 1,5\n2;2;0.5;b\n');
    expect(remarks.catalogue.account).toMatchObject({
      kept: 3,
      decimals: { mark: '.', doubt: null },
    });
    const { catalogue } = await load('ra,dec,z\n"10,5","2,25","0,5"\n');
    expect(decimalsSentence(catalogue.account)).toMatch(/parted by commas only a decimal point is read/);
  });
});
