import fc from 'fast-check';
import Papa from 'papaparse';
import { describe, expect, it } from 'vitest';
import { csvCell, harmlessText } from '../../../shared-core/base/cell.ts';

describe('harmlessText', () => {
  // Leading characters as listed by OWASP, "CSV Injection" (owasp.org/www-community/attacks/CSV_Injection).
  it.each([
    '=1+1',
    '+1+1',
    '-1+1',
    '@SUM(A1)',
    '\t=1',
    '\r=1',
    '\n=1',
    '＝1+1',
    '-',
    '+',
    '=',
    '-inf',
    '-1e',
  ])('puts an apostrophe before %j', (text) => {
    expect(harmlessText(text)).toBe(`'${text}`);
  });

  it.each(['', 'NGC 5139', '12h30m', '-91', '+3.5e-4', '-.5', 'a=b', "'=1"])('leaves %j as it is', (text) => {
    expect(harmlessText(text)).toBe(text);
  });
});

describe('csvCell', () => {
  it('gives a cell that a reader of CSV takes back as the harmless text', () => {
    fc.assert(
      fc.property(
        fc.array(fc.string({ unit: fc.constantFrom('a', '"', ',', ';', '\n', '\r', '\t', '=', ' ', '1') }), {
          minLength: 2,
        }),
        (texts) => {
          const line = texts.map(csvCell).join(',');
          expect(Papa.parse(line, { delimiter: ',', newline: '\n' }).data).toEqual([texts.map(harmlessText)]);
        },
      ),
      { numRuns: 500 },
    );
  });
});
