import fc from 'fast-check';
import { describe, expect, it } from 'vitest';
import { columnsAtLines } from '../../../shared-core/catalogue/columnsAtLines.ts';
import { loadCatalogue } from '../../../shared-core/catalogue/loadCatalogue.ts';

async function* pieces(text: string, size: number): AsyncIterable<Uint8Array> {
  const bytes = new TextEncoder().encode(text);
  for (let at = 0; at < bytes.length; at += size) yield bytes.subarray(at, at + size);
}

describe('columns at lines', () => {
  it('are what loading the catalogue with them gives, rows of every kind among them', async () => {
    const cell = fc.constantFrom('1.5', '-2e3', '', 'n/a', 'text', '"7"', '"a, b"', ' 4 ');
    const row = fc.tuple(cell, cell, fc.constantFrom('0.5', 'bad', '-1'), fc.boolean());
    await fc.assert(
      fc.asyncProperty(
        fc.array(row, { maxLength: 40 }),
        fc.integer({ min: 1, max: 200 }),
        async (rows, size) => {
          const body = rows
            .map(([a, b, z, short]) => (short ? `10,1,${z}` : `10,1,${z},${a},${b}`))
            .join('\n');
          const file = `ra,dec,z,one,two\n${body}\n`;
          const { catalogue } = await loadCatalogue(pieces(file, size), { extras: ['two', 'one'] });
          const found = await columnsAtLines(pieces(file, size), ['two', 'one'], catalogue.line);
          expect(found).toEqual(catalogue.extras);
        },
      ),
      { numRuns: 60 },
    );
  });

  it('can be the same column twice, and one of the mapping', async () => {
    const file = 'ra,dec,z\n10,1,0.5\n11,2,0.6\n';
    const found = await columnsAtLines(pieces(file, 9), ['z', 'ra', 'z'], [2, 3]);
    expect([...found]).toEqual([
      ['z', Float64Array.of(0.5, 0.6)],
      ['ra', Float64Array.of(10, 11)],
    ]);
  });

  it('refuses a column that is not there', async () => {
    await expect(columnsAtLines(pieces('ra,dec,z\n1,2,0.3\n', 9), ['mag'], [2])).rejects.toThrow(/mag/);
  });
});
