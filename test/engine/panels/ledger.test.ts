import { describe, expect, it } from 'vitest';
import { NARROW_LEDGER, WHOLE_LEDGER } from '../../../renderer/panels/ledger/ledgerColumns.ts';
import { asTsv, ledgerJson, ledgerTable } from '../../../renderer/panels/ledger/ledgerTable.ts';
import { nextOrder, sortShells } from '../../../renderer/panels/ledger/sortShells.ts';
import { SHEET_KEYS } from '../../../renderer/panels/sheet/sheetLayout.ts';
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

  it('puts only numbers of the core beside the cone', () => {
    for (const { quantities, headings } of NARROW_LEDGER) {
      for (const quantity of quantities) expect(SHELL_QUANTITIES).toContain(quantity);
      expect(headings === undefined || headings.length === quantities.length).toBe(true);
    }
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
    cosmology,
    account: null,
    mapping: null,
    footprint: { origin: 'given', areaDeg2: 100, estimate: null },
  } as const;

  it('has a column for each quantity, a line for each shell, and every digit', () => {
    const table = ledgerTable({ ...facts, units: { perH: false, h: cosmology.h } });
    const lines = asTsv(table)
      .trimEnd()
      .split('\n')
      .map((line) => line.split('\t'));
    expect(lines[0]).toEqual(keys);
    expect(lines).toHaveLength(3);
    for (const [i, shell] of facts.shells.entries())
      for (const [k, quantity] of SHELL_QUANTITIES.entries()) {
        const cell = lines[i + 1]![k]!;
        // An empty cell for no number; else the text reads back to the very number.
        expect(cell === '' ? null : Number(cell)).toBe(quantity.value(shell));
      }
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

  it('notes a plan, the exact area, the cosmology with its name and P0', () => {
    const { notes } = ledgerTable({ ...facts, units: { perH: false, h: cosmology.h } });
    expect(notes.join('\n')).toMatch(/plan.*no catalogue/i);
    expect(notes.join('\n')).toContain('100 deg^2');
    expect(notes.join('\n')).toContain('Flat 70 / 0.3');
    expect(notes.join('\n')).toContain('10000 (Mpc/h)^3');
  });
});
