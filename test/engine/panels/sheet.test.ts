import { describe, expect, it } from 'vitest';
import { fieldInView } from '../../../renderer/panels/fieldsInView.ts';
import { explain, shellQuantity } from '../../../renderer/panels/sheet/explain.ts';
import { edgeTold } from '../../../renderer/panels/sheet/sheetLayout.ts';
import { roundLength, shellOutline } from '../../../renderer/panels/sheet/shellOutline.ts';
import { shellWarnings } from '../../../renderer/panels/sheet/warnings.ts';
import { fieldIndex } from '../../../renderer/skymap/skyContent.ts';
import type { App } from '../../../renderer/state/app.ts';
import { shownText } from '../../../shared-core/report/quantity.ts';
import { SHELL_QUANTITIES } from '../../../shared-core/report/shellQuantities.ts';
import { sortSample } from '../../../shared-core/shells/sample.ts';
import { shellStatistics } from '../../../shared-core/shells/statistics.ts';
import { conditions, cosmology, evenly, shellsOf } from './shellFixture.ts';

const units = { perH: false, h: cosmology.h };
const estimate = {
  nside: 64,
  cellAreaDeg2: 0.84,
  cells: 119,
  borderCells: 0,
  borderAsCells: 0,
  areaErrorDeg2: 5,
};
const keysOf = (warnings: readonly { key: string }[]) => warnings.map((w) => w.key);

describe('what to beware of in a shell', () => {
  const dense = shellsOf(evenly(200_000, 0.5, 0.6), [0.5, 0.6])[0]!;

  it('is nothing for a dense and even one of exact area', () => {
    expect(shellWarnings(dense, conditions, null, false)).toEqual([]);
  });

  it('is the error of an estimated area, as a share of it', () => {
    const [warning, ...more] = shellWarnings(dense, conditions, estimate, false);
    expect(more).toEqual([]);
    // 5 of 100 square degrees.
    expect(warning).toMatchObject({ key: 'volumeMpc3', sentence: expect.stringContaining('5.0 %') });
  });

  it('is the want of galaxies, with the Poisson error 1/sqrt(N)', () => {
    const few = shellsOf(evenly(25, 0.5, 0.6), [0.5, 0.6])[0]!;
    const told = shellWarnings(few, conditions, null, false);
    expect(keysOf(told)).toEqual(['count', 'densityPerMpc3']);
    expect(told[0]!.sentence).toContain('20 %');
    const none = shellWarnings(shellsOf(new Float64Array(0), [0.5, 0.6])[0]!, conditions, null, false);
    expect(keysOf(none)).toEqual(['count']);
  });

  it('is shot noise exactly where n P0 falls below 1', () => {
    const p0Mpc3 = conditions.p0Mpc3PerH3 / cosmology.h ** 3;
    const volume = dense.volumeMpc3;
    for (const [power, told] of [
      [1.001, false],
      [0.999, true],
    ] as const) {
      const shell = { ...dense, densityPerMpc3: power / p0Mpc3, count: (power / p0Mpc3) * volume };
      expect(keysOf(shellWarnings(shell, conditions, null, false)).includes('densityPerMpc3')).toBe(told);
    }
  });

  it('is an uneven n(z): all galaxies in a tenth of the shell', () => {
    const uneven = shellsOf(evenly(50_000, 0.5, 0.51), [0.5, 0.6])[0]!;
    expect(keysOf(shellWarnings(uneven, conditions, null, false))).toContain('effectiveVolumeMpc3');
  });

  it('is weights that are all 0, without a share of nothing', () => {
    const redshift = evenly(25, 0.5, 0.6);
    const sample = sortSample(redshift, new Float64Array(25));
    const weightless = shellStatistics(sample, [0.5, 0.6], conditions)[0]!;
    const told = shellWarnings(weightless, conditions, null, false);
    expect(keysOf(told)).toEqual(['weightedCount']);
    expect(told[0]!.sentence).toMatch(/weights of the 25 galaxies add up to 0/);
    const of = {
      shell: weightless,
      column: [weightless],
      conditions,
      estimate: null,
      units,
      cosmologyName: 'Flat 70 / 0.3',
      planned: false,
    };
    for (const { key } of SHELL_QUANTITIES) expect(explain(key, of).uncertainty).not.toContain('NaN');
    expect(explain('densityPerMpc3', of).uncertainty).toMatch(/weights of the galaxies add up to 0/);
  });

  it('is nothing about galaxies for a plan, which has none', () => {
    const plan = shellsOf(new Float64Array(0), [0.5, 0.6])[0]!;
    expect(shellWarnings(plan, conditions, null, true)).toEqual([]);
  });
});

describe('the explanation of a number', () => {
  const shell = shellsOf(evenly(400, 0.5, 0.6), [0.5, 0.6])[0]!;
  const of = {
    shell,
    column: [shell],
    conditions,
    estimate: null,
    units,
    cosmologyName: 'Flat 70 / 0.3',
    planned: false,
  };

  it('gives no number of galaxies without a catalogue, and none that hangs on them', () => {
    const none = shellsOf(new Float64Array(0), [0.5, 0.6])[0]!;
    const plan = { ...of, shell: none, column: [none], planned: true };
    for (const { key, value } of SHELL_QUANTITIES) {
      // What galaxies change is of them; the rest follows from edges, area and cosmology.
      const ofGalaxies = value(none) !== value(shell);
      expect(shellQuantity(key, true)!.value(none), key).toBe(ofGalaxies ? null : value(shell));
      expect(/takes the galaxies/.test(explain(key, plan).uncertainty), key).toBe(ofGalaxies);
    }
    expect(explain('densityPerMpc3', plan).inputs.map(({ text }) => text)).toEqual([
      '-',
      shownText(shellQuantity('volumeMpc3')!, none, units),
    ]);
  });

  it('stands for every quantity, in both units, with inputs that are not the number itself', () => {
    for (const perH of [false, true])
      for (const { key, title } of SHELL_QUANTITIES) {
        const { inputs, uncertainty } = explain(key, { ...of, units: { ...units, perH } });
        expect(uncertainty.length).toBeGreaterThan(10);
        expect(inputs.map((input) => input.name)).not.toContain(title);
        if (key !== 'zMin' && key !== 'zMax') expect(inputs.length).toBeGreaterThan(0);
      }
  });

  it('shows inputs as the ledger shows them, in the chosen unit', () => {
    const volume = SHELL_QUANTITIES.find((q) => q.key === 'volumeMpc3')!;
    const perH = { ...units, perH: true };
    const input = explain('densityPerMpc3', { ...of, units: perH }).inputs.find((i) => i.name === 'V');
    expect(input).toEqual({ name: 'V', text: shownText(volume, shell, perH), unit: '(Mpc/h)^3' });
  });

  it('gives the Poisson share of n, 1/sqrt(400), and the share of an estimated area', () => {
    expect(explain('densityPerMpc3', of).uncertainty).toMatch(/5\.0 %.*The area is exact/);
    expect(explain('densityPerMpc3', { ...of, estimate }).uncertainty).toContain('estimated area adds 5.0 %');
    // k goes with V to the power -1/3.
    expect(explain('fundamentalWavenumberPerMpc', { ...of, estimate }).uncertainty).toContain('1.7 %');
    expect(
      explain('volumeMpc3', { ...of, estimate }).inputs.find((i) => i.name === 'area, an estimate')?.text,
    ).toBe('100.0 ± 5.0');
  });
});

describe('the drawing of a shell', () => {
  const box = { width: 300, height: 80 };
  const numbers = (path: string) => path.match(/-?\d+(\.\d+)?/g)!.map(Number);

  it('is true to scale: depth and width have one scale and fill one side of the box', () => {
    for (const [near, far, degrees] of [
      [1000, 1200, 5],
      [1000, 3000, 1],
      [0, 2000, 30],
      [500, 600, 85],
    ] as const) {
      const half = (degrees * Math.PI) / 180;
      const { pxPerMpc, nearX, farX } = shellOutline(near, far, half, box);
      const depth = (far - near * Math.cos(half)) * pxPerMpc;
      const width = 2 * far * Math.sin(half) * pxPerMpc;
      expect(farX - nearX).toBeCloseTo((far - near) * pxPerMpc, 6);
      expect(Math.max(depth / box.width, width / box.height)).toBeCloseTo(1, 9);
    }
  });

  it('stays inside its box, also for a wide shell and for one all around', () => {
    for (const degrees of [0.5, 45, 100, 150, 180, 400]) {
      const { path, pxPerMpc } = shellOutline(800, 1000, (degrees * Math.PI) / 180, box);
      expect(Number.isFinite(pxPerMpc)).toBe(true);
      for (const [, x, y] of path.matchAll(/[ML]?(-?[\d.]+) (-?[\d.]+)(?=[AMLZ]|$)/g)) {
        // Coordinates are rounded to a hundredth of a pixel.
        expect(Number(x)).toBeGreaterThan(-0.02);
        expect(Number(x)).toBeLessThan(box.width + 0.02);
        expect(Number(y)).toBeGreaterThan(-0.02);
        expect(Number(y)).toBeLessThan(box.height + 0.02);
      }
    }
  });

  it('begins at the observer when the near edge is at redshift 0', () => {
    const { path, nearX } = shellOutline(0, 1000, 0.1, box);
    expect(path.match(/A/g)).toHaveLength(1);
    expect(numbers(path)).toContain(Math.round(nearX * 100) / 100);
  });

  it('has a scale bar of 1, 2 or 5 times a power of ten, as long as may be', () => {
    for (const most of [0.03, 1, 1.99, 2, 4.9, 5, 9.99, 723, 1e5]) {
      const bar = roundLength(most);
      expect(['1', '2', '5']).toContain(bar.toExponential()[0]);
      expect(bar).toBeLessThanOrEqual(most * (1 + 1e-12));
      expect(bar * 2.5).toBeGreaterThanOrEqual(most * (1 - 1e-12));
    }
  });
});

describe('a number that tells the place of an edge', () => {
  it('knows which edge, and in what it is typed', () => {
    expect(edgeTold('zMin', 1, 5)).toEqual({ index: 1, unit: 'redshift' });
    expect(edgeTold('zMax', 1, 5)).toEqual({ index: 2, unit: 'redshift' });
    expect(edgeTold('comovingMaxMpc', null, 5)).toEqual({ index: 5, unit: 'comoving' });
    expect(edgeTold('lookbackMinGyr', null, 5)).toEqual({ index: 0, unit: 'lookback' });
    // An age is no reading of the depth: its edge is typed as a redshift.
    expect(edgeTold('ageMaxGyr', 0, 5)).toEqual({ index: 1, unit: 'redshift' });
    expect(edgeTold('volumeMpc3', 0, 5)).toBeNull();
  });
});

it("the sheet's drawing is of the field that the map looks at, also where there are fewer than before", () => {
  for (const fields of [['a', 'b', 'c', 'd'], ['a', 'b'], ['a'], []])
    for (const field of [0, 1, 3]) {
      const app = { engine: { footprint: { value: { fields } } }, view: { field: { value: field } } };
      expect(fieldInView(app as unknown as App)).toBe(fields[fieldIndex(fields, field)]);
    }
  expect(fieldIndex(['a', 'b'], 3)).toBe(1);
});
