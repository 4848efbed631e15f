import Papa from 'papaparse';
import { describe, expect, it } from 'vitest';
import { SET_ASIDE_REASONS } from '../../../shared-core/catalogue/catalogue.ts';
import { reasonText } from '../../../shared-core/catalogue/reasons.ts';
import { setAsideCsv } from '../../../shared-core/catalogue/setAsideCsv.ts';

describe('setAsideCsv', () => {
  it('writes a header and a row for each, harmless in a spreadsheet', () => {
    const list = setAsideCsv();
    expect(list.parts()).toEqual(['line,reason,column,text\n']);
    list.add({ line: 7, reason: 'notANumber', column: 'RA', text: '=HYPERLINK("x")' });
    list.add({ line: 9, reason: 'raOutOfRange', column: 'RA', text: '-5' });
    list.add({ line: 10, reason: 'outsideRegion', column: null, text: null });
    list.add({ line: 12, reason: 'wrongFieldCount', column: null, text: '1,"two\nlines"' });
    expect(Papa.parse(list.parts().join('').trimEnd()).data).toEqual([
      ['line', 'reason', 'column', 'text'],
      ['7', 'notANumber', 'RA', '\'=HYPERLINK("x")'],
      ['9', 'raOutOfRange', 'RA', '-5'],
      ['10', 'outsideRegion', '', ''],
      ['12', 'wrongFieldCount', '', '1,"two\nlines"'],
    ]);
  });

  it('hands out a long list in parts that are the whole when put together', () => {
    const list = setAsideCsv();
    for (let line = 1; line <= 20_000; line++)
      list.add({ line, reason: 'outsideRegion', column: null, text: null });
    expect(list.parts().length).toBeGreaterThan(3);
    const lines = list.parts().join('').split('\n');
    expect(lines).toHaveLength(20_002);
    expect(lines[20_000]).toBe('20000,outsideRegion,,');
  });
});

describe('reasonText', () => {
  it('has words of its own for every reason', () => {
    const texts = SET_ASIDE_REASONS.map(reasonText);
    expect(new Set(texts).size).toBe(SET_ASIDE_REASONS.length);
    for (const text of texts) expect(text).toMatch(/^(with|outside) \S/);
  });
});
