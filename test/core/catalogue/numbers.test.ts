import fc from 'fast-check';
import { describe, expect, it } from 'vitest';
import { isMissing, parseNumber } from '../../../shared-core/catalogue/numbers.ts';

describe('parseNumber', () => {
  it('gives back every finite double from its usual spellings, to the bit', () => {
    fc.assert(
      fc.property(fc.double({ noNaN: true, noDefaultInfinity: true }), (value) => {
        const expected = value + 0;
        expect(parseNumber(String(value))).toBe(expected);
        expect(parseNumber(`  ${value.toExponential()}\r`)).toBe(expected);
        expect(parseNumber(value < 0 ? String(value) : `+${value}`)).toBe(expected);
      }),
    );
  });

  it.each([
    ['0', 0],
    ['-0', 0],
    ['0.0', 0],
    ['.5', 0.5],
    ['5.', 5],
    ['-.5e1', -5],
    ['007', 7],
    ['1E3', 1000],
    [' 12.5 ', 12.5],
    ['\u00a03', 3],
    ['0e5', 0],
    ['0.1e-2', 0.001],
  ])('reads %j as %d', (text, value) => {
    expect(parseNumber(text)).toBe(value);
  });

  it.each([
    '',
    ' ',
    'nan',
    'NaN',
    'inf',
    '-inf',
    'Infinity',
    '-Infinity',
    '1e400',
    '-1e400',
    '12h30m',
    '12:30:00',
    '0x10',
    ' 0x10',
    '0b1',
    '0o7',
    '1,5',
    '1_000',
    '1 000',
    '--1',
    '1e',
    'e5',
    '.',
    '+',
    '-',
    '1d3',
    '5"',
    '(3)',
    '3 km',
    '٣',
    '１',
  ])('reads no number from %j', (text) => {
    expect(parseNumber(text)).toBeNaN();
  });

  it('takes nothing that is not plain decimal notation, whatever the text', () => {
    const signs = fc.string({ unit: fc.constantFrom(...'0123456789+-.eExXbo_ \tnaif,'), maxLength: 8 });
    fc.assert(
      fc.property(signs, (text) => {
        const isDecimal = /^[+-]?([0-9]+([.][0-9]*)?|[.][0-9]+)([eE][+-]?[0-9]+)?$/.test(text.trim());
        const value = Number(text.trim());
        expect(parseNumber(text)).toBe(isDecimal && Number.isFinite(value) ? value + 0 : Number.NaN);
      }),
      { numRuns: 3000 },
    );
  });
});

describe('isMissing', () => {
  it('knows the usual spellings of no value, and that nan and text are not among them', () => {
    for (const text of ['', '  ', '\r', 'NA', 'n/a', 'null', 'NULL', 'None', '-', '--', '\\N']) {
      expect(isMissing(text), JSON.stringify(text)).toBe(true);
    }
    for (const text of ['nan', '0', 'unknown', '-9', '*']) expect(isMissing(text), text).toBe(false);
  });
});
