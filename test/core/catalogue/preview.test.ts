import { describe, expect, it } from 'vitest';
import { previewCatalogue } from '../../../shared-core/catalogue/preview.ts';
import { bytesOf, utf8 } from './support.ts';

describe('previewCatalogue', () => {
  it('gives header, first rows as text, their lines and the suggested mapping', async () => {
    const rows = Array.from({ length: 50 }, (_, i) => `g${i},${i},2,0.${i}`);
    const found = await previewCatalogue(
      bytesOf(`# made up\nname;RA;DEC;cz\n\n${rows.join('\n').replaceAll(',', ';')}\n`),
    );
    expect(found.header).toEqual(['name', 'RA', 'DEC', 'cz']);
    expect(found.delimiter).toBe(';');
    expect(found.rows).toHaveLength(20);
    expect(found.rows[3]).toEqual(['g3', '3', '2', '0.3']);
    expect(found.lines[0]).toBe(4);
    expect(found.mapping).toEqual({
      ra: 'RA',
      dec: 'DEC',
      radial: { column: 'cz', kind: 'czKmS' },
      weight: null,
      magnitude: null,
      id: 'name',
    });
    expect(found.problem).toBeNull();
  });

  it('says why the mapping is incomplete, and suggests the rest', async () => {
    const found = await previewCatalogue(bytesOf('x,dec,y\n1,2,3\n'), 5);
    expect(found.mapping).toBeNull();
    expect(found.suggestion).toEqual({ dec: 'dec' });
    expect(found.problem).toMatch(/^No column was recognised as right ascension \(ra\) nor as redshift/);
    expect(found.rows).toEqual([['1', '2', '3']]);
  });

  it('gives no rows of a header alone, and none when none are wanted', async () => {
    expect((await previewCatalogue(bytesOf('ra,dec,z'))).rows).toEqual([]);
    expect((await previewCatalogue(bytesOf('ra,dec,z\n1,2,3\n'), 0)).rows).toEqual([]);
  });

  it('reads no more than it needs and lets go of the source', async () => {
    let given = 0;
    let isReleased = false;
    async function* endless() {
      try {
        yield utf8('ra,dec,z\n');
        for (;;) {
          given++;
          yield utf8('1,2,0.5\n'.repeat(1000));
        }
      } finally {
        isReleased = true;
      }
    }
    expect((await previewCatalogue(endless())).rows).toHaveLength(20);
    expect(isReleased).toBe(true);
    expect(given).toBeLessThan(100);
  });
});
