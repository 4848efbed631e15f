import fc from 'fast-check';
import { describe, expect, it } from 'vitest';
import type { Cut, SetAsideRow } from '../../../shared-core/catalogue/catalogue.ts';
import { select, take } from '../../../shared-core/catalogue/select.ts';
import { load, refusalOf } from './support.ts';

const cell = fc.oneof(
  fc.integer({ min: -2, max: 12 }).map(String),
  fc.constantFrom('', 'x', '0.5', '1e400', '-0', 'NA'),
);
const bound = fc.option(fc.integer({ min: -1, max: 11 }), { nil: null });
const cut = fc
  .tuple(fc.constantFrom('ra', 'z', 'm', 'k'), bound, bound)
  .map(
    ([column, a, b]): Cut =>
      a !== null && b !== null
        ? { column, min: Math.min(a, b), max: Math.max(a, b) }
        : { column, min: a, max: b },
  );

describe('select', () => {
  it('gives the rows, the account and the list that loading with region and cuts gives', async () => {
    const rows = fc.array(fc.array(cell, { minLength: 4, maxLength: 5 }), { maxLength: 60 });
    await fc.assert(
      fc.asyncProperty(
        rows,
        fc.array(cut, { maxLength: 3 }),
        fc.option(fc.nat(12), { nil: null }),
        async (cells, cuts, edge) => {
          const text = `ra,dec,z,m,k\n${cells.map((row) => row.join(',')).join('\n')}\n`;
          const contains = edge === null ? null : (raDeg: number, decDeg: number) => raDeg + decDeg < edge;
          const extras = ['m', 'k', 'ra', 'z'];
          const directly = await load(text, { extras, contains, cuts });
          const everything = await load(text, { extras });
          const further: SetAsideRow[] = [];
          const selection = select(everything.catalogue, contains, cuts, (row) => further.push(row));
          expect(selection.account).toEqual(directly.catalogue.account);
          expect(take(everything.catalogue, selection)).toEqual(directly.catalogue);
          const all = [...everything.setAside, ...further].sort((a, b) => a.line - b.line);
          expect(all).toEqual(directly.setAside);
        },
      ),
      { numRuns: 400 },
    );
  });

  it('keeps shared columns shared', async () => {
    const { catalogue } = await load('ra,dec,z,mag\n1,2,0.5,17\n', { extras: ['mag'] });
    const taken = take(catalogue, select(catalogue, null, []));
    expect(taken.extras.get('mag')).toBe(taken.magnitude);
  });

  it('refuses a cut on a column that was not loaded', async () => {
    const { catalogue } = await load('ra,dec,z,mag,k\n1,2,0.5,17,1\n', { extras: ['mag'] });
    const cuts = [{ column: 'k', min: 0, max: 1 }];
    expect((await refusalOf(() => select(catalogue, null, cuts))).message).toMatch(
      /^The cut on "k" needs that column, but loaded for cuts are mag: load the file again/,
    );
    const bare = (await load('ra,dec,z\n1,2,0.5\n')).catalogue;
    expect((await refusalOf(() => select(bare, null, cuts))).message).toMatch(
      /but no column was loaded for cuts/,
    );
  });
});
