import fc from 'fast-check';
import { describe, expect, it } from 'vitest';
import { untouchedText } from '../../../renderer/strip/EdgeForm.tsx';
import { edgeName } from '../../../renderer/strip/EdgeHandles.tsx';
import {
  draggedTo,
  edgeLimits,
  movedByKey,
  redshiftPerPixel,
  snapStep,
  tidyRedshift,
} from '../../../renderer/strip/edgeMoves.ts';
import { radialPixel } from '../../../renderer/strip/layout.ts';
import { drawnAxis, readingsOf } from '../../../renderer/strip/readings.ts';
import { divideShells, rangeInNumbers, rangeToDivide, typedRange } from '../../../renderer/strip/schemes.ts';
import {
  mergeWithNext,
  middleOfShell,
  shellAt,
  splitShell,
  standingShell,
  takeOut,
  widestShell,
} from '../../../renderer/strip/shellActions.ts';
import { typedRedshift } from '../../../renderer/strip/typedRedshift.ts';
import { createCosmology } from '../../../shared-core/cosmology/cosmology.ts';
import { findPublishedSet } from '../../../shared-core/cosmology/publishedSets.ts';
import { checkEdges, edgesOf } from '../../../shared-core/shells/edges.ts';
import { sortSample } from '../../../shared-core/shells/sample.ts';
import { shellStatistics } from '../../../shared-core/shells/statistics.ts';
import { emptyStudy } from '../../../shared-core/study/document.ts';
import { moveEdge } from '../../../shared-core/study/edits.ts';
import { RADIAL_READINGS, type Study } from '../../../shared-core/study/schema.ts';

const cosmology = createCosmology(findPublishedSet('planck2018').parameters);
const readings = readingsOf(cosmology, { perH: true, h: cosmology.h });
const EDGES = [0.4, 0.6, 0.8, 1, 1.25];
const scaleOf = (kind: (typeof RADIAL_READINGS)[number], window: readonly [number, number] = [0, 1.7]) =>
  radialPixel(drawnAxis(kind, cosmology), window, 592);
const study: Study = { ...emptyStudy('test'), edges: EDGES };

/** Ascending edges with gaps from a billionth to large. */
const manyEdges = fc
  .array(fc.double({ min: 1e-9, max: 0.3, noNaN: true }), { minLength: 2, maxLength: 12 })
  .map((gaps) => {
    let z = 0.01;
    return gaps.map((gap) => (z += gap));
  });

describe('an edge that is dragged', () => {
  it('never makes edges that cannot be, wherever the pointer goes', () => {
    fc.assert(
      fc.property(
        manyEdges,
        fc.nat(),
        fc.double({ min: -2000, max: 3000, noNaN: true }),
        fc.constantFrom(...RADIAL_READINGS),
        fc.boolean(),
        (edges, pick, px, kind, snap) => {
          const index = pick % edges.length;
          const scale = scaleOf(kind, [0, Math.max(1, edges.at(-1)! * 1.04)]);
          const limits = edgeLimits(edges, index, redshiftPerPixel(scale, edges[index]!));
          const z = draggedTo(px, limits, scale, readings[kind], snap);
          expect(() => checkEdges(edges.with(index, z))).not.toThrow();
          expect(() => moveEdge(index, z, 'g').apply({ ...study, edges })).not.toThrow();
        },
      ),
      { numRuns: 400 },
    );
  });
  it('goes where it is pointed, to a redshift of few digits', () => {
    const scale = scaleOf('redshift');
    const limits = edgeLimits(EDGES, 1, redshiftPerPixel(scale, 0.6));
    const px = scale.at(0.7123456);
    const z = draggedTo(px, limits, scale, readings.redshift, false);
    expect(Math.abs(scale.at(z) - px)).toBeLessThan(0.5);
    expect(String(z).length).toBeLessThanOrEqual(5);
  });
  it('stops before its neighbours', () => {
    const scale = scaleOf('redshift');
    const zPerPx = redshiftPerPixel(scale, 0.6);
    const limits = edgeLimits(EDGES, 1, zPerPx);
    expect(draggedTo(1e4, limits, scale, readings.redshift, false)).toBe(limits.high);
    expect(draggedTo(-1e4, limits, scale, readings.redshift, false)).toBe(limits.low);
    expect(0.8 - limits.high).toBeGreaterThan(0);
    expect(0.8 - limits.high).toBeLessThan(2 * zPerPx);
    expect(String(limits.high).length).toBeLessThanOrEqual(6);
  });
  it('snaps to round values of the reading in use', () => {
    const scale = scaleOf('comoving');
    const step = snapStep(scale, readings.comoving.factor);
    const limits = edgeLimits(EDGES, 1, redshiftPerPixel(scale, 0.6));
    const z = draggedTo(scale.at(0.7), limits, scale, readings.comoving, true);
    const shown = cosmology.comovingMpc(z) * cosmology.h;
    // The exact inverse, to the last digits.
    expect(shown / step).toBeCloseTo(Math.round(shown / step), 8);
    expect(Math.abs(scale.at(z) - scale.at(0.7))).toBeLessThan(2.5 * 5);
  });
  it('keeps round values inside its limits too', () => {
    const scale = scaleOf('redshift');
    const limits = edgeLimits(EDGES, 1, redshiftPerPixel(scale, 0.6));
    const step = snapStep(scale, 1);
    const z = draggedTo(1e4, limits, scale, readings.redshift, true);
    expect(z / step).toBeCloseTo(Math.round(z / step), 9);
    expect(z).toBeLessThan(0.8);
  });
  it('is tidied to what a pixel tells', () => {
    expect(tidyRedshift(0.123456, 0.003)).toBe(0.123);
    expect(tidyRedshift(0.123456, 3)).toBe(0);
    expect(tidyRedshift(0.123456789, 1e-7)).toBe(0.12345679);
  });
});

describe('an edge moved by keys', () => {
  const scale = scaleOf('redshift');
  const limits = edgeLimits(EDGES, 1, redshiftPerPixel(scale, 0.6));
  const press = (key: string, coarse = false, z = 0.6, snap = false) =>
    movedByKey(key, coarse, z, limits, scale, readings.redshift, snap);
  it('steps finely, and coarsely with Shift, to multiples', () => {
    const fine = press('ArrowRight')! - 0.6;
    expect(fine).toBeGreaterThan(0);
    expect(press('ArrowLeft')).toBeCloseTo(0.6 - fine, 12);
    expect(press('ArrowUp')).toBe(press('ArrowRight'));
    expect(press('ArrowRight', true)! - 0.6).toBeCloseTo(10 * fine, 9);
    expect(press('ArrowRight', false, 0.60012)).toBeCloseTo(0.6 + fine, 12);
  });
  it('goes to its limits, and no further', () => {
    expect(press('Home')).toBe(limits.low);
    expect(press('End')).toBe(limits.high);
    expect(press('ArrowRight', true, limits.high)).toBe(limits.high);
    expect(press('ArrowLeft', true, limits.low)).toBe(limits.low);
    expect(press('x')).toBeNull();
  });
  it('takes the last edge to the end of what is in view', () => {
    const last = edgeLimits(EDGES, 4, redshiftPerPixel(scale, 1.25));
    expect(movedByKey('End', false, 1.25, last, scale, readings.redshift, false)).toBeCloseTo(1.7, 9);
  });
  it('can walk every edge anywhere without a refusal', () => {
    fc.assert(
      fc.property(
        manyEdges,
        fc.nat(),
        fc.array(fc.constantFrom('ArrowLeft', 'ArrowRight', 'Home', 'End', 'ArrowUp'), { maxLength: 30 }),
        fc.constantFrom(...RADIAL_READINGS),
        fc.boolean(),
        (edges, pick, keys, kind, coarse) => {
          const index = pick % edges.length;
          const axis = scaleOf(kind, [0, Math.max(1, edges.at(-1)! * 1.04)]);
          let now: readonly number[] = edges;
          for (const key of keys) {
            const z = now[index]!;
            const range = edgeLimits(now, index, redshiftPerPixel(axis, z));
            now = checkEdges(
              now.with(index, movedByKey(key, coarse, z, range, axis, readings[kind], coarse)!),
            );
          }
          expect(now).toHaveLength(edges.length);
        },
      ),
      { numRuns: 60 },
    );
  });
  it('has a name', () => {
    expect(edgeName(0, 3)).toBe('Edge 1 of 3, where shell 1 begins');
    expect(edgeName(1, 3)).toBe('Edge 2 of 3, between shells 1 and 2');
    expect(edgeName(2, 3)).toBe('Edge 3 of 3, where shell 2 ends');
    expect(edgeName(0, 1)).toBe('Edge 1 of 1, the only one');
  });
});

describe('an edge that is typed', () => {
  it('is read to the last digit in any reading', () => {
    expect(typedRedshift('0.6125', 'redshift', readings)).toEqual({ z: 0.6125 });
    const mpc = typedRedshift('1500', 'comoving', readings);
    expect('z' in mpc && cosmology.comovingMpc(mpc.z) * cosmology.h).toBeCloseTo(1500, 9);
    const gyr = typedRedshift('5', 'lookback', readings);
    expect('z' in gyr && cosmology.lookbackGyr(gyr.z)).toBeCloseTo(5, 11);
  });
  it('stands in its field in the unit that is shown', () => {
    expect(untouchedText(0.2, 'redshift', readings)).toBe('0.2');
    const mpc = Number(untouchedText(0.2, 'comoving', readings));
    // Six digits are shown.
    expect(mpc / (cosmology.comovingMpc(0.2) * cosmology.h)).toBeCloseTo(1, 5);
  });
  it('is answered with a sentence where there is no such place', () => {
    for (const [text, kind] of [
      ['', 'redshift'],
      ['abc', 'comoving'],
      ['-1', 'redshift'],
      ['99', 'lookback'],
      ['99999', 'comoving'],
    ] as const) {
      const read = typedRedshift(text, kind, readings);
      expect('sentence' in read ? read.sentence : '').toMatch(/give|expected/);
    }
  });
});

describe('shells', () => {
  it('are found as the core counts them', () => {
    const sample = sortSample(
      Float64Array.from({ length: 400 }, (_, i) => 0.3 + i / 400),
      null,
    );
    const counts = shellStatistics(sample, EDGES, { cosmology, areaDeg2: 10, p0Mpc3PerH3: 1e4 }).map(
      (s) => s.count,
    );
    const found = EDGES.slice(1).map(() => 0);
    for (const z of sample.redshift) {
      const shell = shellAt(EDGES, z);
      if (shell !== null) found[shell]!++;
    }
    expect(found).toEqual(counts);
    expect([shellAt(EDGES, 1.25), shellAt(EDGES, 1.2500001), shellAt([], 1), shellAt([1], 1)]).toEqual([
      3,
      null,
      null,
      null,
    ]);
  });
  it('are split in the middle of the reading', () => {
    const scale = scaleOf('comoving');
    const z = middleOfShell(EDGES, 1, scale);
    const middle = (cosmology.comovingMpc(0.6) + cosmology.comovingMpc(0.8)) / 2;
    expect(scale.at(z)).toBeCloseTo(scale.atReading(middle), 0);
    const { edit, selected } = splitShell(EDGES, 1, scale);
    expect(edit.label).toBe('Split shell 2');
    expect(edit.apply(study).edges).toEqual([0.4, 0.6, z, 0.8, 1, 1.25]);
    expect(selected).toBe(1);
    // A shell thinner than a pixel is split all the same.
    const thin = [0.5, 0.5 + 1e-7];
    const half = middleOfShell(thin, 0, scale);
    expect(half > thin[0]! && half < thin[1]!).toBe(true);
  });
  it('are merged and removed, with a shell left selected', () => {
    const merged = mergeWithNext(EDGES, 0)!;
    expect(merged.edit.apply(study).edges).toEqual([0.4, 0.8, 1, 1.25]);
    expect(merged.edit.label).toBe('Merge shells 1 and 2');
    expect(mergeWithNext(EDGES, 3)).toBeNull();
    expect(takeOut(EDGES, 3)).toMatchObject({ selected: 2 });
    expect(takeOut([0.1, 0.2], 0)).toMatchObject({ selected: null });
    expect(standingShell(EDGES, 4)).toBeNull();
    expect(standingShell(EDGES, 3)).toBe(3);
    expect(widestShell(EDGES, scaleOf('redshift'))).toBe(3);
    expect(widestShell([], scaleOf('redshift'))).toBeNull();
  });
});

describe('schemes', () => {
  const sample = sortSample(Float64Array.of(0.1, 0.2, 0.5, 0.9, 1.4), null);
  it('divide the present shells, the sample, or what is in view', () => {
    expect(rangeToDivide(EDGES, 5, false, [0, 2])).toEqual({ zMin: 0.4, zMax: 1.25 });
    expect(rangeToDivide(EDGES, 5, true, [0, 2])).toEqual({ zMin: null, zMax: null });
    expect(rangeToDivide([], 5, false, [0, 2])).toEqual({ zMin: null, zMax: null });
    expect(rangeToDivide(EDGES, 0, true, [0, 2])).toEqual({ zMin: 0.4, zMax: 1.25 });
    expect(rangeToDivide([0.3], 0, false, [0.1, 2])).toEqual({ zMin: 0.1, zMax: 2 });
  });
  it('are the core\u2019s own', () => {
    for (const kind of ['redshift', 'comoving', 'lookback', 'volume'] as const) {
      const edit = divideShells(kind, 3, { zMin: 0.2, zMax: 1 }, sample, cosmology);
      expect(edit.apply(study).edges).toEqual(
        edgesOf({ kind, shells: 3, zMin: 0.2, zMax: 1 }, sample, cosmology),
      );
    }
    const one = divideShells('count', 1, { zMin: null, zMax: null }, sample, cosmology);
    expect(one.label).toBe('Divide into 1 shell of equal number of galaxies');
    expect(one.apply(study).edges).toEqual([0.1, 1.4]);
  });
  it('take the range that is typed; an empty field is where the shells begin or end now', () => {
    const now = { zMin: 0.4, zMax: 1.25 };
    const all = { zMin: null, zMax: null };
    expect(typedRange({ from: '0.2', to: '0.9' }, now, sample)).toEqual({ zMin: 0.2, zMax: 0.9 });
    expect(typedRange({ from: '', to: '0.9' }, now, sample)).toEqual({ zMin: 0.4, zMax: 0.9 });
    expect(typedRange({ from: ' ', to: '' }, all, sample)).toEqual(all);
    expect(rangeInNumbers(all, sample)).toEqual({ from: 0.1, to: 1.4 });
    expect(rangeInNumbers(now, sample)).toEqual({ from: 0.4, to: 1.25 });
    expect(rangeInNumbers(all, sortSample(new Float64Array(0), null))).toEqual({ from: null, to: null });
  });
  it('answer a range that cannot be with a sentence', () => {
    const why = (from: string, to: string, zMin: number | null = null) => {
      const found = typedRange({ from, to }, { zMin, zMax: null }, sample);
      return 'sentence' in found ? found.sentence : null;
    };
    expect(why('0.9', '0.2')).toBe(
      'The range begins at z 0.9 and ends at z 0.2: give an end behind the beginning.',
    );
    expect(why('', '0.05')).toMatch(/begins at z 0.1 and ends at z 0.05/);
    expect(why('', '0.4', 0.40000001)).toMatch(/give an end behind/);
    expect(why('-1', '')).toMatch(/begins at z -1: give a redshift from 0 to 1100/);
    expect(why('', '1e4')).toMatch(/ends at z 10000: give/);
    expect(why('near', '')).toMatch(/is "near": give a number/);
  });
  it('name the ends that are to be mended', () => {
    const at = (from: string, to: string) => {
      const found = typedRange({ from, to }, { zMin: null, zMax: null }, sample);
      return 'sentence' in found ? found.at : null;
    };
    expect(at('0.2', '0,9')).toEqual(['to']);
    expect(at('-1', '0.9')).toEqual(['from']);
    expect(at('0.9', '0.2')).toEqual(['from', 'to']);
  });
  it('refuse in a sentence', () => {
    const range = { zMin: null, zMax: null };
    const empty = sortSample(new Float64Array(0), null);
    expect(() => divideShells('count', 3, range, empty, cosmology).apply(study)).toThrow(/No galaxy is left/);
    expect(() => divideShells('redshift', 2.5, range, sample, cosmology).apply(study)).toThrow(
      /whole number/,
    );
  });
});
