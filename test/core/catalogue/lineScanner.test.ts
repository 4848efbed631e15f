import fc from 'fast-check';
import { describe, expect, it } from 'vitest';
import { readText } from '../../../shared-core/catalogue/cleaning.ts';
import { LineScanner, type RowSink } from '../../../shared-core/catalogue/formats/delimited/lineScanner.ts';
import { openTable } from '../../../shared-core/catalogue/formats/delimited/openTable.ts';
import { isBlank } from '../../../shared-core/catalogue/formats/delimited/table.ts';
import { LF } from '../../../shared-core/catalogue/formats/delimited/wholeLines.ts';
import { parseNumber } from '../../../shared-core/catalogue/numbers.ts';
import { bytesOf, utf8 } from './support.ts';

/** What the scanner makes of one cell: a number, or null where it hands the row over as text. */
function scanned(cell: string, required: number): number | null {
  const plan = {
    width: 3,
    wanted: [1],
    required,
    delimiter: ',',
    lineBreak: LF,
    decimalMark: '.',
  } as const;
  let result: number | null = null;
  const sink: RowSink = {
    numbers: (_line, values) => {
      result = values[0]!;
      return true;
    },
    text: () => {},
  };
  const scanner = new LineScanner(plan, (line) => line.split(','));
  scanner.scan(utf8(`a,${cell},b\n`), 1, sink);
  return result;
}

describe('LineScanner', () => {
  it('reads every finite double in its usual spellings as Number() does, to the bit', () => {
    fc.assert(
      fc.property(fc.double({ noNaN: true, noDefaultInfinity: true }), fc.nat(20), (value, digits) => {
        for (const text of [
          String(value),
          value.toExponential(digits),
          value.toPrecision(digits + 1),
          value.toFixed(digits),
        ]) {
          // Rounded up to so few digits, the largest doubles are beyond any double.
          const expected = Number.isFinite(Number(text)) ? Number(text) + 0 : null;
          for (const cell of [text, `"${text}"`, ` ${text} `]) expect(scanned(cell, 1)).toBe(expected);
        }
      }),
      { numRuns: 2000 },
    );
  });

  it('reads a number or nothing, as parseNumber would, whatever the cell', () => {
    const cells = fc.string({ unit: fc.constantFrom(...'0123456789+-.eE xüna'), maxLength: 24 });
    fc.assert(
      fc.property(cells, (cell) => {
        const value = scanned(cell, 1);
        if (value !== null) expect(value).toBe(parseNumber(cell));
        // What it does not read although it could is no error, but must be rare: only with odd white space.
        else expect(parseNumber(cell)).toBeNaN();
      }),
      { numRuns: 5000 },
    );
  });

  it('takes an empty cell for NaN only where it may be empty', () => {
    expect(scanned('', 1)).toBeNull();
    expect(scanned('', 0)).toBeNaN();
    expect(scanned('  ', 0)).toBeNaN();
    expect(scanned('""', 0)).toBeNaN();
    expect(scanned('+', 0)).toBeNull();
  });

  it('stops before a line whose quotes are not simple, and says how far it came', () => {
    const plan = {
      width: 2,
      wanted: [0],
      required: 1,
      delimiter: ';',
      lineBreak: LF,
      decimalMark: '.',
    } as const;
    for (const odd of ['1;"two\nlines"\n', '1;"a""b"\n', '1;"a" \n', '"1"x;2\n', '"1\n;2\n']) {
      const lines: number[] = [];
      const sink: RowSink = {
        numbers: (line) => {
          lines.push(line);
          return true;
        },
        text: () => expect.unreachable(),
      };
      const scanner = new LineScanner(plan, (line) => line.split(';'));
      expect(scanner.scan(utf8(`1;2\n"3";"a;b"\r\n${odd}5;6\n`), 10, sink)).toBe(15);
      expect(scanner.linesRead).toBe(2);
      expect(lines).toEqual([10, 11]);
    }
  });

  it('gives the same rows as PapaParse alone, whatever the file', async () => {
    const cell = fc.oneof(
      { weight: 3, arbitrary: fc.double({ noNaN: true }).map(String) },
      fc.constantFrom(
        '',
        ' ',
        'NA',
        '1e400',
        '"1"',
        '"1,5"',
        '"two\nlines"',
        '"a""b"',
        '"open',
        'a"b',
        '"x"y',
        'é',
        '-0',
        '\t7',
      ),
      fc.string({ unit: fc.constantFrom('1', '.', '-', 'e', ' ', ',', '"', '\n', '\r'), maxLength: 5 }),
    );
    const file = fc.array(fc.array(cell, { minLength: 1, maxLength: 4 }), { maxLength: 30 });
    const wanted = [2, 0];
    await fc.assert(
      fc.asyncProperty(file, fc.constantFrom('\n', '\r\n'), async (cells, lineEnd) => {
        const text = `a,b,c\n${cells.map((row) => row.join(',')).join(lineEnd)}`;
        const told = (row: string[], line: number) => {
          const values = new Float64Array(2);
          const fault = readText(row, 3, wanted, 1, values, '.');
          return [line, fault, ...(fault === null ? values : [])];
        };
        const slow: unknown[] = [];
        const fast: unknown[] = [];
        const failures: unknown[] = [];
        try {
          for await (const { rows, lines } of (await openTable(bytesOf(text))).rows()) {
            rows.forEach((row, i) => {
              if (!isBlank(row)) slow.push(told(row, lines[i]!));
            });
          }
        } catch (fault) {
          failures.push(String(fault));
        }
        const sink: RowSink = {
          numbers: (line, values) => {
            fast.push([line, null, ...values]);
            return true;
          },
          text: (line, row) => {
            if (!isBlank(row)) fast.push(told(row, line));
          },
        };
        try {
          await (await openTable(bytesOf(text))).numbers(wanted, 1, sink);
        } catch (fault) {
          failures.push(String(fault));
        }
        expect(failures[0]).toBe(failures[1]);
        if (failures.length === 0) expect(fast).toEqual(slow);
      }),
      { numRuns: 1500 },
    );
  });
});
