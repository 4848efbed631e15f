import { createReadStream, readFileSync } from 'node:fs';
import { describe, expect, it } from 'vitest';
import type { SetAsideRow } from '../../shared-core/catalogue/catalogue.ts';
import { parseColumnMap } from '../../shared-core/catalogue/columnMap.ts';
import { loadCatalogue } from '../../shared-core/catalogue/loadCatalogue.ts';

const file = new URL('../data/shapley.csv', import.meta.url);

// Counts of the data set `shapley` of the Debian package r-cran-spatstat.data, computed in R from the data set itself
// (its source and licence stand in test/data/README.md).
describe('the Shapley supercluster compilation', () => {
  const read = async () => {
    const setAside: SetAsideRow[] = [];
    const loaded = await loadCatalogue(createReadStream(file), {
      mapping: parseColumnMap('cz=V'),
      extras: ['V'],
      onSetAside: (row) => setAside.push(row),
    });
    return { ...loaded, setAside, velocity: loaded.catalogue.extras.get('V')! };
  };

  it('has all 4215 rows accounted for, 3 of them without a velocity above 0', async () => {
    const { catalogue, setAside, mapping } = await read();
    expect(catalogue.account).toMatchObject({
      rowsRead: 4215,
      kept: 4212,
      setAside: 3,
      reasons: { redshiftNotAboveZero: 3 },
    });
    expect(Math.min(...setAside.map((row) => Number(row.text)))).toBe(-75);
    expect(mapping).toMatchObject({ ra: 'RA', dec: 'Dec', magnitude: 'Mag', radial: { kind: 'czKmS' } });
  });

  it('has 4189 distinct positions and 357 unknown magnitudes, with the rows set aside found by their lines', async () => {
    const { catalogue, setAside } = await read();
    const lines = readFileSync(file, 'utf8').split('\n');
    const left = setAside.map((row) => lines[row.line - 1]!.split(',').map(Number));
    expect(left.map((row) => row[3])).toEqual(setAside.map((row) => Number(row.text)));
    const unknown = [...catalogue.magnitude!, ...left.map((row) => row[2])].filter(
      (magnitude) => magnitude === 0,
    );
    expect(unknown).toHaveLength(357);
    const isNew = (row: number[]) =>
      catalogue.raDeg.every((ra, i) => ra !== row[0] || catalogue.decDeg[i] !== row[1]);
    const { kept, repeatedPositions } = catalogue.account;
    expect(kept - repeatedPositions + left.filter(isNew).length).toBe(4189);
  });

  it('has its main plane at about 14 500 km/s (Drinkwater et al. 2004, astro-ph/0402362, abstract)', async () => {
    const { velocity } = await read();
    expect(Math.max(...velocity)).toBe(76_746);
    const main = velocity.filter((v) => v > 8000 && v < 18_000).sort();
    expect(main).toHaveLength(2642);
    expect((main[1320]! + main[1321]!) / 2).toBe(14_467);
    const bins = new Map<number, number>();
    for (const v of velocity)
      bins.set(500 * Math.floor(v / 500), (bins.get(500 * Math.floor(v / 500)) ?? 0) + 1);
    const fullest = [...bins].reduce((a, b) => (b[1] > a[1] ? b : a));
    expect(fullest).toEqual([14_500, 322]);
  });

  it('reads cz as z = V/c with c = 299 792.458 km/s', async () => {
    const { catalogue, velocity } = await read();
    for (let i = 0; i < 100; i++) expect(catalogue.redshift[i]! * 299_792.458).toBeCloseTo(velocity[i]!, 9);
  });
});
