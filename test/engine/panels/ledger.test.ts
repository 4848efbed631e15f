import { describe, expect, it } from 'vitest';
import { NARROW_LEDGER, WHOLE_LEDGER } from '../../../renderer/panels/ledger/ledgerColumns.ts';
import { copyLedger, exportLedger, LEDGER_FORMATS } from '../../../renderer/panels/ledger/ledgerFormats.ts';
import { asTsv, ledgerJson, ledgerTable } from '../../../renderer/panels/ledger/ledgerTable.ts';
import { nextOrder, sortShells } from '../../../renderer/panels/ledger/sortShells.ts';
import { SHEET_GROUPS, SHEET_KEYS } from '../../../renderer/panels/sheet/sheetLayout.ts';
import type { App } from '../../../renderer/state/app.ts';
import { DECIMAL_POINTS } from '../../../shared-core/catalogue/formats/delimited/decimals.ts';
import { LEDGER_QUANTITIES } from '../../../shared-core/report/ledgerQuantities.ts';
import { SHELL_QUANTITIES } from '../../../shared-core/report/shellQuantities.ts';
import { emptyStudy } from '../../../shared-core/study/document.ts';
import { cosmology, evenly, shellsOf } from './shellFixture.ts';

const keys = SHELL_QUANTITIES.map((q) => q.key);

describe('what the panels show of a shell', () => {
  it('leaves out no quantity of the core, and shows none twice', () => {
    const whole = WHOLE_LEDGER.flatMap((column) => column.quantities.map((q) => q.key));
    expect(whole.toSorted()).toEqual(keys.toSorted());
    expect(SHEET_KEYS.toSorted()).toEqual(keys.toSorted());
  });

  it('puts the numbers of the LaTeX tabular beside the cone', () => {
    expect(NARROW_LEDGER.flatMap((column) => column.quantities)).toEqual(LEDGER_QUANTITIES);
    for (const { quantities, headings } of NARROW_LEDGER) {
      for (const quantity of quantities) expect(SHELL_QUANTITIES).toContain(quantity);
      expect(headings === undefined || headings.length === quantities.length).toBe(true);
    }
  });
});

describe('the names of numbers', () => {
  it('is one for V eff uniform: ledger, sheet and tables', () => {
    const key = 'effectiveVolumeUniformMpc3';
    const { title } = SHELL_QUANTITIES.find((q) => q.key === key)!;
    const column = WHOLE_LEDGER.find((c) => c.quantities.some((q) => q.key === key))!;
    expect(column.headings).toBeUndefined();
    expect(SHEET_GROUPS.flatMap((g) => [...g.rows]).find((row) => row.key === key)?.name).toBe(title);
  });
});

describe('the order of the ledger', () => {
  const shells = shellsOf(
    Float64Array.of(0.21, 0.22, 0.23, 0.35, 0.51, 0.52, 0.53),
    [0.2, 0.3, 0.4, 0.5, 0.6],
  );

  it('is that of redshift until a column is pressed', () => {
    expect(sortShells(shells, null, SHELL_QUANTITIES)).toEqual([0, 1, 2, 3]);
  });

  it('is stable among equals, both ways', () => {
    expect(sortShells(shells, { key: 'count', direction: 'ascending' }, SHELL_QUANTITIES)).toEqual([
      2, 1, 0, 3,
    ]);
    expect(sortShells(shells, { key: 'count', direction: 'descending' }, SHELL_QUANTITIES)).toEqual([
      0, 3, 1, 2,
    ]);
  });

  it('puts a shell without the number last, both ways', () => {
    for (const direction of ['ascending', 'descending'] as const)
      expect(sortShells(shells, { key: 'zEffective', direction }, SHELL_QUANTITIES).at(-1)).toBe(2);
  });

  it('goes up, down and back to redshift', () => {
    const up = nextOrder(null, 'count');
    const down = nextOrder(up, 'count');
    expect([up?.direction, down?.direction]).toEqual(['ascending', 'descending']);
    expect(nextOrder(down, 'count')).toBeNull();
    expect(nextOrder(up, 'zMin')).toEqual({ key: 'zMin', direction: 'ascending' });
  });
});

describe('the ledger on the clipboard', () => {
  const facts = {
    study: { ...emptyStudy('Plan'), cosmologySet: 'flat70' },
    shells: shellsOf(evenly(10, 0.2, 0.3), [0.2, 0.3, 0.4]),
    all: shellsOf(evenly(10, 0.2, 0.3), [0.2, 0.4])[0]!,
    cosmology,
    account: null,
    mapping: null,
    footprint: { origin: 'given', areaDeg2: 100, estimate: null },
  } as const;

  const account = {
    rowsRead: 12,
    kept: 10,
    setAside: 2,
    reasons: { outsideCuts: 2 },
    repeatedPositions: 0,
    decimals: DECIMAL_POINTS,
  };

  it('has a column for each quantity, a line for each shell and all as one, every digit, and the notes', () => {
    const table = ledgerTable({ ...facts, account, units: { perH: false, h: cosmology.h } });
    const [rows, notes] = asTsv(table).trimEnd().split('\n\n');
    const lines = rows!.split('\n').map((line) => line.split('\t'));
    expect(notes!.split('\n')).toEqual(table.notes);
    expect(lines[0]).toEqual(['shell', ...keys]);
    expect(lines.slice(1).map(([label]) => label)).toEqual(['1', '2', 'all']);
    for (const [i, shell] of [...facts.shells, facts.all].entries())
      for (const [k, quantity] of SHELL_QUANTITIES.entries()) {
        const cell = lines[i + 1]![k + 1]!;
        // An empty cell for no number; else the text reads back to the very number.
        expect(cell === '' ? null : Number(cell)).toBe(quantity.value(shell));
      }
  });

  it('is not given out while its galaxies are of another selection than its notes', async () => {
    const told: string[] = [];
    const app = {
      engine: { fresh: { value: false }, failure: { value: null }, selected: { value: null } },
      files: { missingSource: { value: null } },
      studyState: { study: { value: { source: null } } },
      notices: { tell: (sentence: string) => void told.push(sentence) },
    } as unknown as App;
    // Anything of the ledger that was asked for would throw: the app has none.
    await exportLedger(app, LEDGER_FORMATS[0]);
    await copyLedger(app, 'tabs');
    expect(told).toHaveLength(2);
    expect(told[0]).toBe('The catalogue is still being read.');
  });

  it('has no number of galaxies for a plan, where 0 would say that somebody looked', () => {
    const lines = asTsv(ledgerTable({ ...facts, units: { perH: false, h: cosmology.h } })).split('\n');
    const cell = (key: string) => lines[1]!.split('\t')[lines[0]!.split('\t').indexOf(key)];
    for (const key of ['count', 'densityPerMpc3', 'zEffective', 'effectiveVolumeMpc3'])
      expect(cell(key), key).toBe('');
    expect(Number(cell('volumeMpc3'))).toBe(facts.shells[0]!.volumeMpc3);
  });

  it('says Mpc/h in its names when lengths are in Mpc/h', () => {
    const table = ledgerTable({ ...facts, units: { perH: true, h: cosmology.h } });
    expect(asTsv(table).split('\n')[0]!.split('\t')).toContain('volumeMpc3PerH3');
  });

  it('as JSON has of a plan all that repeats it, as the command has', () => {
    const json = ledgerJson({ ...facts, units: { perH: false, h: cosmology.h } });
    expect(json).toMatchObject({
      catalogue: null,
      cosmology: { name: 'flat70', omegaDe0: 0.7, omegaK0: 0 },
      region: { areaDeg2: 100, estimated: false },
      p0Mpc3PerH3: 10_000,
      lengthUnit: 'Mpc',
      shells: [{ zMin: 0.2 }, { zMin: 0.3 }],
    });
    const noSky = ledgerJson({
      ...facts,
      shells: [],
      footprint: null,
      units: { perH: true, h: cosmology.h },
    });
    expect(noSky).toMatchObject({ region: null, lengthUnit: 'Mpc/h', shells: [] });
  });

  it('notes which columns were read, and how a velocity became a redshift', () => {
    const mapping = {
      ra: 'RA',
      dec: 'DEC',
      radial: { column: 'V', kind: 'czKmS' },
      weight: null,
      magnitude: null,
      id: null,
    } as const;
    const { notes } = ledgerTable({ ...facts, mapping, units: { perH: false, h: cosmology.h } });
    expect(notes.join('\n')).toMatch(/Columns: .*from RA.*z = cz\/c.*from V/);
  });

  it('tells the cuts that were applied, in the notes and as values', () => {
    const cuts = [{ column: 'mag', min: null, max: 22.5 }];
    const read = { ...facts, account, study: { ...facts.study, cuts }, units: { perH: false, h: 0.7 } };
    expect(ledgerTable(read).notes.join('\n')).toMatch(/^Cuts: mag <= 22\.5\. Bounds are included/m);
    expect(ledgerJson(read)).toMatchObject({ cuts, all: { zMin: 0.2, zMax: 0.4 } });
    // Nothing was read, so nothing was cut.
    const plan = { ...read, account: null };
    expect(ledgerTable(plan).notes.join('\n')).not.toContain('Cuts:');
    expect(ledgerJson(plan)).toMatchObject({ cuts: null });
  });

  it('notes a plan, the exact area, the cosmology with its name and P0', () => {
    const { notes } = ledgerTable({ ...facts, units: { perH: false, h: cosmology.h } });
    expect(notes.join('\n')).toMatch(/plan.*no catalogue/i);
    expect(notes.join('\n')).toContain('100 deg^2');
    expect(notes.join('\n')).toContain('Flat 70 / 0.3');
    expect(notes.join('\n')).toContain('10000 (Mpc/h)^3');
  });
});
