import Papa from 'papaparse';
import { describe, expect, it } from 'vitest';
import { SET_ASIDE_REASONS, type SetAsideRow } from '../../../shared-core/catalogue/catalogue.ts';
import { loadCatalogue } from '../../../shared-core/catalogue/loadCatalogue.ts';
import { reasonSentence, reasonText } from '../../../shared-core/catalogue/reasons.ts';
import { setAsideCsv } from '../../../shared-core/catalogue/setAsideCsv.ts';
import { bytesOf } from './support.ts';

describe('setAsideCsv', () => {
  it('writes a header and a row for each, harmless in a spreadsheet', () => {
    const list = setAsideCsv();
    expect(list.parts()).toEqual(['line,reason,column,text,name,explanation\r\n']);
    list.add({ line: 7, reason: 'notANumber', column: 'RA', text: '=HYPERLINK("x")' });
    list.add({ line: 9, reason: 'raOutOfRange', column: 'RA', text: '-5', name: 'NGC 1, "b"' });
    list.add({ line: 10, reason: 'outsideRegion', column: null, text: null });
    list.add({ line: 12, reason: 'wrongFieldCount', column: null, text: '1,"two\nlines"' });
    expect(Papa.parse(list.parts().join('').trimEnd()).data).toEqual([
      ['line', 'reason', 'column', 'text', 'name', 'explanation'],
      [
        '7',
        'notANumber',
        'RA',
        '\'=HYPERLINK("x")',
        '',
        'The row is set aside as one with a value that is not a number: RA is =HYPERLINK("x").',
      ],
      [
        '9',
        'raOutOfRange',
        'RA',
        '-5',
        'NGC 1, "b"',
        'The row is set aside as one with right ascension outside 0 to 360 degrees: RA is -5.',
      ],
      ['10', 'outsideRegion', '', '', '', 'The row is set aside as one outside the region.'],
      [
        '12',
        'wrongFieldCount',
        '',
        '1,"two\nlines"',
        '',
        'The row is set aside as one with more or fewer fields than the header.',
      ],
    ]);
  });

  it('hands out a long list in parts that are the whole when put together', () => {
    const list = setAsideCsv();
    for (let line = 1; line <= 20_000; line++)
      list.add({ line, reason: 'outsideRegion', column: null, text: null });
    expect(list.parts().length).toBeGreaterThan(3);
    const lines = list.parts().join('').split('\r\n');
    expect(lines).toHaveLength(20_002);
    expect(lines[20_000]).toBe('20000,outsideRegion,,,,The row is set aside as one outside the region.');
  });
});

describe('a row set aside', () => {
  it('carries its name, whatever the reason, where the mapping has a column of names', async () => {
    const csv =
      'id,ra,dec,z,mag\na,1,1,0.5,20\nb,1,1,x,20\nc,400,1,0.5,20\nd,1,80,0.5,20\n e ,1,1,0.5,25\nf,1,1\n';
    const rows: SetAsideRow[] = [];
    const { catalogue } = await loadCatalogue(bytesOf(csv), {
      mapping: { id: 'id' },
      contains: (_, dec) => dec < 10,
      cuts: [{ column: 'mag', min: null, max: 22 }],
      onSetAside: (row) => rows.push(row),
    });
    expect(catalogue.account).toMatchObject({ rowsRead: 6, kept: 1, setAside: 5 });
    expect(rows.map(({ reason, name }) => [reason, name])).toEqual([
      ['notANumber', 'b'],
      ['raOutOfRange', 'c'],
      ['outsideRegion', 'd'],
      ['outsideCuts', 'e'],
      ['wrongFieldCount', undefined],
    ]);
    expect(reasonSentence(rows[3]!)).toBe('The row is set aside as one outside the cuts: mag is 25.');
  });
});

describe('reasonText', () => {
  it('has words of its own for every reason', () => {
    const texts = SET_ASIDE_REASONS.map(reasonText);
    expect(new Set(texts).size).toBe(SET_ASIDE_REASONS.length);
    for (const text of texts) expect(text).toMatch(/^(with|outside) \S/);
  });
});
