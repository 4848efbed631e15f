import fc from 'fast-check';
import Papa from 'papaparse';
import { describe, expect, it } from 'vitest';
import { RecordCutter, type Records } from '../../../shared-core/catalogue/formats/delimited/records.ts';
import { CR, LF, LONGEST_ROW } from '../../../shared-core/catalogue/formats/delimited/wholeLines.ts';
import { refusalOf } from './support.ts';

/** Cuts text given in pieces of so many lines; a last line break is added where there is none. */
function cut(text: string, linesAtOnce = 1000) {
  const cutter = new RecordCutter(',', LF, 1);
  const all: Records[] = [];
  const lines = text.replace(/\n$/, '').split('\n');
  for (let at = 0; at < lines.length; at += linesAtOnce) {
    all.push(...cutter.push(`${lines.slice(at, at + linesAtOnce).join('\n')}\n`));
  }
  all.push(...cutter.finish());
  return { rows: all.flatMap((part) => part.rows), lines: all.flatMap((part) => [...part.lines]) };
}

describe('RecordCutter', () => {
  it('cuts rows and tells their lines, also after line breaks inside quotes', () => {
    const { rows, lines } = cut('a,b\n"two\nlines",2\n3,"x ""y"" z"\n\n"q,r",5');
    expect(rows).toEqual([['a', 'b'], ['two\nlines', '2'], ['3', 'x "y" z'], [''], ['q,r', '5']]);
    expect(lines).toEqual([1, 2, 4, 5, 6]);
  });

  it('leaves the CR of CRLF as white space, also after a quoted cell', () => {
    const { rows, lines } = cut('a,b\r\n1,"2"\r\n"3\r\n4",5\r\n');
    expect(rows.map((row) => row.map((cell) => cell.trim()))).toEqual([
      ['a', 'b'],
      ['1', '2'],
      ['3\r\n4', '5'],
    ]);
    expect(lines).toEqual([1, 2, 3]);
  });

  it('reads files whose lines end in CR alone', () => {
    const cutter = new RecordCutter(';', CR, 1);
    const parts = [...cutter.push('a;b\r1;"2\r'), ...cutter.push('3"\r4;5\r'), ...cutter.finish()];
    expect(parts.flatMap((part) => part.rows)).toEqual([
      ['a', 'b'],
      ['1', '2\r3'],
      ['4', '5'],
    ]);
    expect(parts.flatMap((part) => [...part.lines])).toEqual([1, 2, 4]);
  });

  it('gives what PapaParse gives for the whole text, wherever it is cut', () => {
    const cell = fc.oneof(
      fc.string({ unit: fc.constantFrom('a', '1', '.', ' ', '-'), maxLength: 6 }),
      fc
        .string({ unit: fc.constantFrom('a', '"', ',', '\n', ' '), maxLength: 6 })
        .map((s) => `"${s.replaceAll('"', '""')}"`),
    );
    const table = fc.array(fc.array(cell, { minLength: 1, maxLength: 4 }), { maxLength: 12 });
    fc.assert(
      fc.property(table, fc.integer({ min: 1, max: 5 }), fc.boolean(), (cells, pieceLength, endsInBreak) => {
        const text = cells.map((row) => row.join(',')).join('\n') + (endsInBreak ? '\n' : '');
        const { rows, lines } = cut(text, pieceLength);
        // Without a last line break PapaParse and the cutter agree on everything; with one, the empty row after it
        // is there in one and not in the other, and it is no row for anybody.
        const expected = Papa.parse<string[]>(text, { delimiter: ',', newline: '\n' }).data;
        const filled = (all: string[][]) => all.filter((row) => row.length > 1 || row[0] !== '');
        expect(filled(rows)).toEqual(filled(expected));
        const first = (row: number) => expected.slice(0, row).flat().join('').split('\n').length + row;
        expect(lines).toEqual(lines.map((_, i) => first(i)));
      }),
      { numRuns: 500 },
    );
  });

  it('reads a line literally whose quoted cell goes on after the quote, so that it swallows no row', () => {
    const text = 'name,z\n"M 31" group,0.1\nplain,0.2\n"Sombrero",0.3\nlast,0.4\n';
    for (const pieceLength of [1, 2, 3, 200]) {
      const { rows, lines } = cut(text, pieceLength);
      expect(rows.slice(0, 5)).toEqual([
        ['name', 'z'],
        ['"M 31" group', '0.1'],
        ['plain', '0.2'],
        ['Sombrero', '0.3'],
        ['last', '0.4'],
      ]);
      expect(lines.slice(0, 5)).toEqual([1, 2, 3, 4, 5]);
    }
  });

  it('keeps the lines right after a literal line inside a row of several lines', () => {
    const { rows, lines } = cut('a,b\n"one\ntwo","x"y\n5,6\n');
    expect(rows.slice(0, 3)).toEqual([
      ['a', 'b'],
      ['"one\ntwo"', '"x"y'],
      ['5', '6'],
    ]);
    expect(lines.slice(0, 3)).toEqual([1, 2, 4]);
  });

  it('refuses a file in which such lines are the rule', async () => {
    const text = `a,b\n${'"x"y,1\n'.repeat(1500)}`;
    const refusal = await refusalOf(() => cut(text, 300));
    expect(refusal.message).toMatch(
      /^The row on line 1002 is one of more than 1000 with text after a closing quote.*double the quotes/,
    );
  });

  it('refuses a quote left open, by the line of its row, at the end of the file', async () => {
    const refusal = await refusalOf(() => cut('a,b\n1,2\n3,"4\n5,6\n7,8\n'));
    expect(refusal.message).toMatch(
      /^A quote opened in the row that starts on line 3 is still open at the end of the file: close it/,
    );
  });

  it('refuses a quote left open in a long file before memory grows', async () => {
    const cutter = new RecordCutter(',', LF, 1);
    let fed = 0;
    const refusal = await refusalOf(() => {
      cutter.push('a,b\n1,2\n3,"4\n');
      for (;;) {
        cutter.push('5,6\n'.repeat(10_000));
        fed += 40_000;
      }
    });
    expect(refusal.message).toMatch(/row that starts on line 3 is still open 1048576 characters later/);
    expect(fed).toBeLessThan(LONGEST_ROW + 100_000);
  });

  it('tells the line that comes next, and whether a quoted cell is open', () => {
    const cutter = new RecordCutter(',', LF, 7);
    cutter.push('a,b\n');
    expect([cutter.nextLine, cutter.isBetweenRows]).toEqual([8, true]);
    cutter.push('1,"two\nlines\n');
    expect([cutter.nextLine, cutter.isBetweenRows]).toEqual([10, false]);
    expect(cutter.push('end"\n')[0]!.rows).toEqual([['1', 'two\nlines\nend']]);
    cutter.passLines(5);
    expect([cutter.nextLine, cutter.isBetweenRows]).toEqual([16, true]);
  });
});
