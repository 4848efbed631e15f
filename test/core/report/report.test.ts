import { describe, expect, it } from 'vitest';
import { createCosmology } from '../../../shared-core/cosmology/cosmology.ts';
import { findPublishedSet } from '../../../shared-core/cosmology/publishedSets.ts';
import { DISTANCE_QUANTITIES, distanceRows } from '../../../shared-core/report/distanceQuantities.ts';
import { formatNumber, shownColumn, shownText, shownValue } from '../../../shared-core/report/quantity.ts';
import { SHELL_QUANTITIES } from '../../../shared-core/report/shellQuantities.ts';
import { asCsv, asEcsv, asLatex, asObjects, asText } from '../../../shared-core/report/table.ts';
import { sortSample } from '../../../shared-core/shells/sample.ts';
import { shellStatistics } from '../../../shared-core/shells/statistics.ts';

const cosmology = createCosmology(findPublishedSet('flat70').parameters);
const sample = sortSample(
  Float64Array.from({ length: 400 }, (_, i) => 0.2 + i / 1000),
  null,
);
const rows = shellStatistics(sample, [0.2, 0.4, 0.6], { cosmology, areaDeg2: 50, p0Mpc3PerH3: 10_000 });
const table = (perH: boolean) => ({
  rows,
  quantities: SHELL_QUANTITIES,
  units: { perH, h: cosmology.h },
  notes: ['Cosmology: "flat", 70'],
});

describe('one number in every format', () => {
  for (const perH of [false, true])
    it(`is the same in JSON, CSV and ECSV, and rounded from it in text and LaTeX (${perH ? 'Mpc/h' : 'Mpc'})`, () => {
      const t = table(perH);
      const objects = asObjects(t);
      const [head, ...body] = asCsv(t).trimEnd().split('\r\n');
      const fromCsv = body.map((line) =>
        Object.fromEntries(line.split(',').map((cell, i) => [head!.split(',')[i], Number(cell)])),
      );
      expect(fromCsv).toEqual(objects);
      const ecsvBody = asEcsv(t)
        .trimEnd()
        .split('\n')
        .filter((l) => !l.startsWith('#'));
      expect(ecsvBody.join('\r\n')).toBe(asCsv(t).trimEnd());
      const text = asText(t);
      const latex = asLatex(t);
      for (const [i, row] of rows.entries())
        for (const q of SHELL_QUANTITIES) {
          const shown = shownColumn(q, rows, t.units)(row);
          const power = rows.some((one) => shownText(q, one, t.units).includes('e'));
          const value = Object.values(objects[i]!)[SHELL_QUANTITIES.indexOf(q)]!;
          expect(shown).toBe(formatNumber(value, q.show, power));
          expect(text).toContain(shown);
          expect(latex).toContain(`$${shown.split('e')[0]}`);
        }
    });

  it('changes names and values together with the unit: a value in Mpc/h is never called Mpc', () => {
    const [mpc, perH] = [asObjects(table(false))[0]!, asObjects(table(true))[0]!];
    const h = 0.7;
    // h^n by repeated multiplication differs from ** in the last bit.
    expect(perH.volumeMpc3PerH3).toBeCloseTo(mpc.volumeMpc3! * h ** 3, 3);
    expect(perH.comovingMaxMpcPerH).toBeCloseTo(mpc.comovingMaxMpc! * h, 9);
    expect(perH.densityH3PerMpc3! / (mpc.densityPerMpc3! / h ** 3)).toBeCloseTo(1, 14);
    expect(perH.fundamentalWavenumberHPerMpc! / (mpc.fundamentalWavenumberPerMpc! / h)).toBeCloseTo(1, 14);
    expect(Object.keys(perH).filter((k) => /Mpc\d?$/.test(k) && !/H\d?PerMpc/.test(k))).toEqual([]);
    expect(perH.zMin).toBe(mpc.zMin);
  });

  it('names what scripts rely on', () => {
    expect(Object.keys(asObjects(table(false))[0]!)).toEqual(
      expect.arrayContaining(
        'zMin zMax count weightedCount zMean zMedian zEffective comovingMinMpc comovingMaxMpc lookbackMinGyr lookbackMaxGyr volumeMpc3 densityPerMpc3 densityErrorPerMpc3 effectiveVolumeMpc3 effectiveVolumeUniformMpc3'.split(
          ' ',
        ),
      ),
    );
    const distances = {
      rows: distanceRows(cosmology, [1]),
      quantities: DISTANCE_QUANTITIES,
      units: { perH: false, h: 0.7 },
      notes: [],
    };
    expect(Object.keys(asObjects(distances)[0]!)).toEqual(
      expect.arrayContaining(
        'z comovingMpc transverseComovingMpc angularDiameterMpc luminosityMpc distanceModulus lookbackGyr ageGyr hubbleKmSMpc comovingVolumeMpc3'.split(
          ' ',
        ),
      ),
    );
  });

  it('leaves a gap where there is no number', () => {
    const empty = {
      ...table(false),
      rows: shellStatistics(sample, [1, 2], { cosmology, areaDeg2: 50, p0Mpc3PerH3: 1 }),
    };
    expect(asObjects(empty)[0]!.zMean).toBeNull();
    expect(asCsv(empty).split('\r\n')[1]!.split(',')[4]).toBe('');
    expect(shownText(SHELL_QUANTITIES[4]!, empty.rows[0]!, empty.units)).toBe('-');
  });

  it('explains every number: meaning, formula and source', () => {
    for (const q of SHELL_QUANTITIES)
      for (const text of [q.meaning, q.formula, q.source, q.title, q.latexTitle])
        expect(text.length).toBeGreaterThan(0);
    expect(new Set(SHELL_QUANTITIES.map((q) => q.key)).size).toBe(SHELL_QUANTITIES.length);
  });
});

describe('numbers for reading', () => {
  it.each([
    [1234.5678, { decimals: 2 }, '1234.57'],
    [0.000123456, { significant: 3 }, '1.23e-4'],
    [1.5e9, { significant: 3 }, '1.50e9'],
    [-42.1234, { significant: 4 }, '-42.12'],
    [123456, { significant: 3 }, '123456'],
    [0, { significant: 3 }, '0'],
    [Number.NaN, { decimals: 1 }, 'NaN'],
  ] as const)('%d as %j is %s', (value, show, text) => {
    expect(formatNumber(value, show)).toBe(text);
  });

  it('h-units multiply by h to the power of the length', () => {
    const v = SHELL_QUANTITIES.find((q) => q.key === 'volumeMpc3')!;
    expect(shownValue(v, rows[0]!, { perH: true, h: 0.5 })).toBe(rows[0]!.volumeMpc3 / 8);
  });
});
