import { describe, expect, it } from 'vitest';
import { DECIMAL_POINTS } from '../../../shared-core/catalogue/formats/delimited/decimals.ts';
import { createCosmology } from '../../../shared-core/cosmology/cosmology.ts';
import { findPublishedSet } from '../../../shared-core/cosmology/publishedSets.ts';
import { cutWords, describeCuts } from '../../../shared-core/report/cuts.ts';
import { LEDGER_QUANTITIES } from '../../../shared-core/report/ledgerQuantities.ts';
import { shownColumn, shownValue } from '../../../shared-core/report/quantity.ts';
import { SHELL_QUANTITIES } from '../../../shared-core/report/shellQuantities.ts';
import { shellRanges } from '../../../shared-core/report/shellRange.ts';
import { shellsJson } from '../../../shared-core/report/shellsJson.ts';
import { shellsTable } from '../../../shared-core/report/shellsTable.ts';
import { asCsv, asEcsv, asLatex, asText } from '../../../shared-core/report/table.ts';
import { yamlValue } from '../../../shared-core/report/yaml.ts';
import { sortSample } from '../../../shared-core/shells/sample.ts';
import { allAsOne, shellStatistics } from '../../../shared-core/shells/statistics.ts';
import { compileRegion } from '../../../shared-core/sky/compileRegion.ts';
import { parseRegionShape } from '../../../shared-core/sky/regionText.ts';

const set = findPublishedSet('flat70');
const cosmology = createCosmology(set.parameters);
const region = {
  parts: [parseRegionShape('box:10,20,-5,5')],
  holes: [parseRegionShape('cap:15,0,1')],
};
const footprint = compileRegion(region);
const conditions = { cosmology, areaDeg2: footprint.areaDeg2, p0Mpc3PerH3: 10_000 };
const edges = [0.05, 0.1, 0.3, 0.7];
const sample = sortSample(
  Float64Array.from({ length: 4000 }, (_, i) => 0.05 + (0.65 * (i + 0.5)) / 4000),
  null,
);
const cuts = [
  { column: 'mag', min: 18, max: 22.5 },
  { column: 'weight', min: 1e-7, max: null },
];
const account = {
  rowsRead: 4834,
  kept: 4000,
  setAside: 834,
  reasons: { outsideCuts: 834 },
  repeatedPositions: 0,
  decimals: DECIMAL_POINTS,
};
const mapping = {
  ra: 'ra',
  dec: 'dec',
  radial: { column: 'z', kind: 'redshift' },
  weight: null,
  magnitude: 'mag',
  id: null,
} as const;
const table = shellsTable({
  shells: shellStatistics(sample, edges, conditions),
  all: allAsOne(sample, edges, conditions),
  units: { perH: false, h: cosmology.h },
  account,
  mapping,
  cuts,
  region,
  footprint,
  cosmology,
  set,
  p0Mpc3PerH3: 10_000,
});
const CUTS_LINE =
  'Cuts: 18 <= mag <= 22.5; 1e-7 <= weight. Bounds are included; a row without a number in the column fails a bound.';

describe('what repeats a ledger', () => {
  it('is in the notes of text, LaTeX and ECSV: the cuts as they are applied', () => {
    for (const text of [asText(table), asLatex(table), asEcsv(table)]) expect(text).toContain(CUTS_LINE);
    expect(describeCuts([])).toBe('Cuts: none.');
    expect(cutWords({ column: 'a', min: null, max: 2 }, '≤')).toBe('a ≤ 2');
  });

  it('is in JSON and in the metadata of ECSV: cuts, region with its holes, columns', () => {
    expect(shellsJson(table)).toMatchObject({
      cuts,
      region: { parts: region.parts, holes: region.holes, areaDeg2: footprint.areaDeg2 },
      catalogue: { columns: mapping, reasons: { outsideCuts: 834 } },
    });
    const ecsv = asEcsv(table);
    expect(ecsv).toContain(
      '#   cuts: [{column: "mag", min: 18, max: 22.5}, {column: "weight", min: 1.0e-7, max: null}]\n',
    );
    expect(ecsv).toMatch(/^# {3}region: \{.*parts: \[\{kind: "box".*holes: \[\{kind: "cap"/m);
  });

  it('has numbers that YAML reads as numbers', () => {
    // yaml.org/type/float.html and int.html, decimal forms.
    const number = /^([-+]?([0-9]+)?\.[0-9]*([eE][-+][0-9]+)?|[-+]?(0|[1-9][0-9]*)|[-+]?\.(inf)|\.nan)$/;
    for (const value of [0, -3, 22.5, 1e-7, 1.5e-9, 1e21, -2e300, Number.NaN, Number.POSITIVE_INFINITY]) {
      expect(yamlValue(value)).toMatch(number);
      expect(Number(yamlValue(value).replace('.inf', 'Infinity').replace('.nan', 'NaN'))).toBe(value);
    }
  });
});

describe('all shells as one', () => {
  it('stands last where people read, and apart from the rows where machines read', () => {
    const text = asText(table)
      .split('\n\n')
      .slice(0, 3)
      .map((block) => block.split('\n'));
    for (const block of text) expect(block.at(-1)).toMatch(/^all /);
    expect(asLatex(table)).toMatch(/\\hline\nall & .* \\\\\n\\hline\n\\end\{tabular\}/);
    const json = shellsJson(table) as { shells: { shell: number; count: number }[]; all: { count: number } };
    expect(json.shells.map(({ shell }) => shell)).toEqual([1, 2, 3]);
    expect(json.all.count).toBe(4000);
    expect(json.shells.reduce((sum, { count }) => sum + count, 0)).toBe(4000);
    const lines = asCsv(table).trimEnd().split('\r\n');
    expect(lines.map((line) => line.split(',')[0])).toEqual(['shell', '1', '2', '3']);
    expect(asEcsv(table)).toMatch(/^# {3}all: \{zMin: 0\.05, zMax: 0\.7, count: 4000/m);
  });
});

describe('a column', () => {
  it('is written one way in text and LaTeX, with the row of all: by powers of ten where one number needs it', () => {
    const quantity = SHELL_QUANTITIES.find((q) => q.key === 'effectiveVolumeMpc3')!;
    const rows = [...table.rows, table.all!];
    const values = rows.map((row) => shownValue(quantity, row, table.units)!);
    // The case is one: some above a million, some below.
    expect([Math.min(...values) < 1e6, Math.max(...values) >= 1e6]).toEqual([true, true]);
    const shown = rows.map(shownColumn(quantity, rows, table.units));
    for (const [i, text] of shown.entries()) {
      expect(text).toMatch(/^\d\.\d{3}e\d$/);
      expect(asText(table)).toContain(text);
      expect(asLatex(table)).toContain(`$${text.replace('e', '\\times10^{')}}$`);
      // Half of the fourth digit.
      expect(Math.abs(Number(text) / values[i]! - 1)).toBeLessThan(5.1e-4);
    }
  });

  it('of the LaTeX tabular is one of the ledger, after the number of the shell', () => {
    const latex = asLatex({ ...table, quantities: LEDGER_QUANTITIES });
    expect(latex).toContain(`\\begin{tabular}{${'r'.repeat(LEDGER_QUANTITIES.length + 1)}}`);
    expect(latex).toMatch(/\nshell & \$z_\{\\min\}\$/);
    for (const line of latex.split('\n').filter((one) => one.endsWith('\\\\')))
      expect(line.split(' & ')).toHaveLength(LEDGER_QUANTITIES.length + 1);
  });
});

it("a shell's range has the signs by which galaxies are counted", () => {
  const ranges = shellRanges(table.rows);
  expect(ranges).toEqual(['0.05 ≤ z < 0.1', '0.1 ≤ z < 0.3', '0.3 ≤ z ≤ 0.7']);
  // A galaxy on each edge: each is in the shell whose range says so.
  const onEdges = shellStatistics(sortSample(Float64Array.from(edges), null), edges, conditions);
  expect(onEdges.map(({ count }) => count)).toEqual([1, 1, 2]);
});
