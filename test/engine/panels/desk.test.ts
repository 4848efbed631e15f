import { describe, expect, it } from 'vitest';
import { regionTrouble } from '../../../renderer/engine/regionReady.ts';
import { judgeRows } from '../../../renderer/panels/columns/judgeRows.ts';
import {
  draftOf,
  EMPTY_DRAFT,
  finishDraft,
  fittingDraft,
  isGuessable,
  roleOf,
} from '../../../renderer/panels/columns/mappingDraft.ts';
import { parameterTrouble, readMasses } from '../../../renderer/panels/cosmology/parameterFields.ts';
import { withoutShape, withShapes } from '../../../renderer/panels/region/regionParts.ts';
import {
  draftOfShape,
  finishShape,
  newDraft,
  type ShapeDraft,
} from '../../../renderer/panels/region/shapeDraft.ts';
import { setAsideLines, sourceChanged } from '../../../renderer/panels/source/sourceFacts.ts';
import { DECIMAL_POINTS } from '../../../shared-core/catalogue/formats/delimited/decimals.ts';
import {
  findPublishedSet,
  PUBLISHED_SETS,
  publishedSetKey,
} from '../../../shared-core/cosmology/publishedSets.ts';
import type { SkyShape } from '../../../shared-core/sky/region.ts';

describe('the choice of columns', () => {
  const header = ['alfa', 'beta', 'gamma', 'w', ''];
  const half = { ...EMPTY_DRAFT, ra: 'alfa', dec: 'beta' };

  it('says what is still missing', () => {
    expect(finishDraft(EMPTY_DRAFT, header)).toEqual({
      sentence: 'Choose the column of right ascension, declination and redshift.',
    });
    expect(finishDraft(half, header)).toEqual({ sentence: 'Choose the column of redshift.' });
  });

  it('becomes a mapping once it is whole, and back', () => {
    const whole = { ...half, radialColumn: 'gamma', radialKind: 'czKmS', weight: 'w' } as const;
    const done = finishDraft(whole, header);
    expect(done).toEqual({
      mapping: {
        ra: 'alfa',
        dec: 'beta',
        radial: { column: 'gamma', kind: 'czKmS' },
        weight: 'w',
        magnitude: null,
        id: null,
      },
    });
    if ('mapping' in done) expect(draftOf(done.mapping)).toEqual(whole);
  });

  it('refuses one column in two parts, in the words of the core', () => {
    expect(finishDraft({ ...half, radialColumn: 'alfa' }, header)).toEqual({
      sentence: expect.stringMatching(/"alfa" is named for two/),
    });
  });

  it('leaves open what another file does not have', () => {
    expect(fittingDraft({ ...half, radialColumn: 'gone', weight: 'gone' }, header)).toEqual(half);
    expect(roleOf('beta', half)).toBe('Dec');
    expect(roleOf('gamma', half)).toBeNull();
  });

  it('knows whether names are enough', () => {
    expect(isGuessable(['RA', 'Dec', 'z'])).toBe(true);
    expect(isGuessable(header)).toBe(false);
  });
});

describe('rows of the preview', () => {
  const header = ['ra', 'dec', 'z'];
  const draft = { ...EMPTY_DRAFT, ra: 'ra', dec: 'dec', radialColumn: 'z' };

  it('are judged as the reader judges them, with the cell to blame', () => {
    const judged = judgeRows(
      [
        ['10', '20', '0.5'],
        ['10', '99', '0.5'],
        ['10', '20', ''],
        ['10', '20', '12h30m'],
        ['10', '20'],
      ],
      header,
      draft,
      '.',
    );
    expect(judged?.map((row) => row.blamedCell)).toEqual([-1, 1, 2, 2, -1]);
    expect(judged?.map((row) => row.reason !== null)).toEqual([false, true, true, true, true]);
  });

  it('wait until the three columns are chosen', () => {
    expect(judgeRows([['1', '2', '3']], header, { ...draft, dec: null }, '.')).toBeNull();
  });

  it('have decimal commas where the file has', () => {
    const judged = judgeRows(
      [
        ['10,5', '-1', '0,5'],
        ['10.5', '-1', '0,5'],
      ],
      header,
      draft,
      ',',
    );
    expect(judged?.map((row) => row.blamedCell)).toEqual([-1, 0]);
  });
});

describe('a shape by numbers and text', () => {
  const finish = (draft: ShapeDraft) => finishShape(draft, async (regions) => regionTrouble(regions));
  const box: SkyShape = { kind: 'box', raMinDeg: 350, raMaxDeg: 10, decMinDeg: -5, decMaxDeg: 5 };
  const cap: SkyShape = { kind: 'cap', raDeg: 10.5, decDeg: -20, radiusDeg: 1.25 };
  const polygon: SkyShape = {
    kind: 'polygon',
    verticesDeg: [
      [10, 0],
      [20, 0],
      [15, 10],
    ],
    side: 'smaller',
  };

  it('survives being changed without a change', async () => {
    for (const shape of [box, cap, polygon, { kind: 'wholeSky' } as const])
      expect(await finish(draftOfShape(shape))).toEqual({ shapes: [shape] });
  });

  it('puts the sentence under the field at fault', async () => {
    const draft = draftOfShape(box);
    const put = (fields: Partial<typeof draft.fields>) =>
      finish({ ...draft, fields: { ...draft.fields, ...fields } });
    expect(await put({ raMax: 'ten' })).toEqual({
      field: 'raMax',
      sentence: expect.stringContaining('"ten"'),
    });
    expect(await put({ decMin: '' })).toEqual({
      field: 'decMin',
      sentence: expect.stringContaining('empty'),
    });
    expect(await put({ decMin: '-91' })).toMatchObject({ field: 'decMin' });
    expect(await put({ decMin: '6' })).toMatchObject({ field: 'decMax' });
    expect(
      await finish({ ...draftOfShape(cap), fields: { ...draftOfShape(cap).fields, radius: '0' } }),
    ).toMatchObject({
      field: 'radius',
    });
    expect(await finish(newDraft('polygon'))).toMatchObject({ field: 'vertices' });
    // A bow tie.
    expect(await finish({ ...newDraft('polygon'), vertices: '0 0\n10 10\n10 0\n0 10' })).toMatchObject({
      field: 'vertices',
    });
  });

  it('may be several polygons in one text', async () => {
    const done = await finish({ ...newDraft('polygon'), vertices: '0 0\n10 0\n5 8\n\n30 0\n40 0\n35 8\n' });
    expect(done).toMatchObject({ shapes: [{ kind: 'polygon' }, { kind: 'polygon' }] });
  });

  it('takes its place in the region, and moves between observed and hole', () => {
    const region = withShapes(withShapes(null, 'parts', [box, cap], null), 'holes', [polygon], null);
    expect(region).toEqual({ parts: [box, cap], holes: [polygon] });
    expect(withShapes(region, 'parts', [polygon], { list: 'parts', index: 0 })).toEqual({
      parts: [polygon, cap],
      holes: [polygon],
    });
    expect(withShapes(region, 'holes', [cap], { list: 'parts', index: 1 })).toEqual({
      parts: [box],
      holes: [polygon, cap],
    });
    expect(withoutShape(region, { list: 'holes', index: 0 })).toEqual({ parts: [box, cap], holes: [] });
    expect(withoutShape({ parts: [box], holes: [cap] }, { list: 'parts', index: 0 })).toBeNull();
  });
});

describe('parameters of a cosmology', () => {
  const { parameters } = findPublishedSet('planck2018');

  it('name the field that the core blames, in the words of the form', () => {
    expect(parameterTrouble(parameters)).toBeNull();
    for (const [change, field, words] of [
      [{ h0KmSMpc: 0.7 }, 'h0KmSMpc', 'H₀ is 0.7'],
      [{ w0: 20 }, 'w0', 'w₀ is 20'],
      [{ wa: Number.NaN }, 'wa', 'wₐ is NaN'],
      [{ neutrinoMassesEv: [-1] }, 'neutrinoMassesEv', 'The neutrino masses'],
      [{ omegaDe0: 5 }, 'omegaDe0', 'Ω dark energy is 5'],
    ] as const) {
      const trouble = parameterTrouble({ ...parameters, ...change });
      expect(trouble?.field).toBe(field);
      expect(trouble?.sentence).toContain(words);
    }
  });

  it('are a published set exactly when nothing differs', () => {
    for (const set of PUBLISHED_SETS) expect(publishedSetKey(structuredClone(set.parameters))).toBe(set.key);
    expect(publishedSetKey({ ...parameters, w0: -0.99 })).toBeNull();
  });

  it('read neutrino masses parted by commas or spaces', () => {
    expect(readMasses('0, 0 ,0.06')).toEqual([0, 0, 0.06]);
    expect(readMasses('0.02 0.03')).toEqual([0.02, 0.03]);
    expect(readMasses('')).toEqual([]);
    expect(readMasses('0,x')).toBeNull();
  });
});

describe('the source', () => {
  const source = { kind: 'file', name: 'a.csv', path: null, sizeBytes: 1, sha256: 'a'.repeat(64) } as const;
  const loaded = (sha256: string) =>
    ({ sha256, sizeBytes: 1 }) as NonNullable<Parameters<typeof sourceChanged>[1]>;

  it('has changed only when another fingerprint was known before', () => {
    expect(sourceChanged(source, loaded('b'.repeat(64)))).toBe(true);
    expect(sourceChanged(source, loaded(source.sha256))).toBe(false);
    // Without a fingerprint the size is all that is known.
    const read = loaded('b'.repeat(64));
    expect(sourceChanged({ ...source, sha256: null, sizeBytes: read.sizeBytes }, read)).toBe(false);
    expect(sourceChanged({ ...source, sha256: null, sizeBytes: read.sizeBytes + 1 }, read)).toBe(true);
    expect(sourceChanged({ kind: 'demo', seed: 1 }, loaded('b'.repeat(64)))).toBe(false);
    expect(sourceChanged(source, null)).toBe(false);
  });

  it('lists every row set aside under a reason', () => {
    const account = {
      rowsRead: 20,
      kept: 10,
      setAside: 10,
      reasons: { outsideCuts: 4, missingValue: 6 },
      repeatedPositions: 0,
      decimals: DECIMAL_POINTS,
    };
    const lines = setAsideLines(account);
    expect(lines.map((line) => line.count)).toEqual([6, 4]);
    expect(lines.reduce((sum, line) => sum + line.count, 0)).toBe(account.setAside);
  });
});
