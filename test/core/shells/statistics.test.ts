import fc from 'fast-check';
import { describe, expect, it } from 'vitest';
import { Refusal } from '../../../shared-core/base/refusal.ts';
import { createCosmology } from '../../../shared-core/cosmology/cosmology.ts';
import { findPublishedSet } from '../../../shared-core/cosmology/publishedSets.ts';
import { edgesOf } from '../../../shared-core/shells/edges.ts';
import { sortSample } from '../../../shared-core/shells/sample.ts';
import { shellStatistics, WHOLE_SKY_DEG2 } from '../../../shared-core/shells/statistics.ts';

const cosmology = createCosmology(findPublishedSet('flat70').parameters);
const conditions = { cosmology, areaDeg2: 100, p0Mpc3PerH3: 10_000 };

/** Redshifts spread evenly over comoving volume: a sample of one density. */
function uniformSample(count: number, zMin: number, zMax: number): Float64Array {
  const [from, to] = [cosmology.comovingVolumeMpc3(zMin), cosmology.comovingVolumeMpc3(zMax)];
  return Float64Array.from({ length: count }, (_, i) =>
    cosmology.redshiftAtVolumeMpc3(from + ((to - from) * (i + 0.5)) / count),
  );
}

describe('what a shell is worth', () => {
  it('counts each galaxy once: an edge belongs to the shell above it, the last edge to the last shell', () => {
    const sample = sortSample(Float64Array.of(0.1, 0.2, 0.2, 0.3, 0.4, 0.05, 0.5), null);
    const shells = shellStatistics(sample, [0.1, 0.2, 0.4], conditions);
    expect(shells.map((s) => s.count)).toEqual([1, 4]);
    expect(shells[0]!.zMean).toBeCloseTo(0.1, 15);
    expect(shells[0]!.zMedian).toBe(0.1);
    // The mean of 0.2 0.2 0.3 0.4; a sum of four numbers is exact to the last bits.
    expect(shells[1]!.zMean).toBeCloseTo(0.275, 15);
    expect(shells[1]!.zMedian).toBeCloseTo(0.25, 15);
  });

  it('gives V/4 at nP = 1 and 9V/16 at nP = 3 for an even density (Tegmark 1997; computed)', () => {
    for (const [power, share] of [
      [1, 1 / 4],
      [3, 9 / 16],
    ] as const) {
      const sample = sortSample(uniformSample(6400, 0.4, 0.6), null);
      const plain = shellStatistics(sample, [0.4, 0.6], conditions)[0]!;
      const p0 = (power / plain.densityPerMpc3) * cosmology.h ** 3;
      const shell = shellStatistics(sample, [0.4, 0.6], { ...conditions, p0Mpc3PerH3: p0 })[0]!;
      expect(shell.effectiveVolumeUniformMpc3 / shell.volumeMpc3).toBeCloseTo(share, 12);
      // In slices each count is rounded to whole galaxies, about 1 in 200.
      expect(shell.effectiveVolumeMpc3 / shell.volumeMpc3).toBeCloseTo(share, 3);
    }
  });

  it('puts the effective redshift of an even density from z to 0 at 3/4 of z max (computed)', () => {
    const sample = sortSample(uniformSample(20_000, 0, 0.01), null);
    const shell = shellStatistics(sample, [0, 0.01], conditions)[0]!;
    // The limit holds to first order in z, here 0.01.
    expect(shell.zEffective! / 0.01).toBeCloseTo(0.75, 2);
  });

  it('weights: sums, densities and errors follow the weights, N does not', () => {
    const sample = sortSample(Float64Array.of(0.5, 0.45, 0.55), Float64Array.of(1, 2, 0.5));
    const shell = shellStatistics(sample, [0.4, 0.6], conditions)[0]!;
    expect(shell.count).toBe(3);
    expect(shell.weightedCount).toBe(3.5);
    expect(shell.densityPerMpc3).toBe(3.5 / shell.volumeMpc3);
    expect(shell.densityErrorPerMpc3).toBe(Math.sqrt(5.25) / shell.volumeMpc3);
    // One slice, so one n(z): the weights alone remain.
    expect(shell.zEffective).toBeCloseTo((0.5 + 0.9 + 0.275) / 3.5, 14);
  });

  it('an empty shell has a volume and no redshifts', () => {
    const shell = shellStatistics(sortSample(new Float64Array(0), null), [0.4, 0.6], conditions)[0]!;
    expect(shell).toMatchObject({
      count: 0,
      zMean: null,
      zMedian: null,
      zEffective: null,
      effectiveVolumeMpc3: 0,
    });
    expect(shell.volumeMpc3).toBeGreaterThan(0);
  });

  it('shell volumes and counts add up to the whole, wherever the edges are', () => {
    const sample = sortSample(uniformSample(500, 0.01, 2), null);
    fc.assert(
      fc.property(
        fc.uniqueArray(fc.double({ min: 0.02, max: 1.9, noNaN: true }), { minLength: 1, maxLength: 12 }),
        (inner) => {
          const edges = [0.01, ...inner.sort((a, b) => a - b), 2];
          const shells = shellStatistics(sample, edges, conditions);
          const whole = shellStatistics(sample, [0.01, 2], conditions)[0]!;
          expect(shells.reduce((n, s) => n + s.count, 0)).toBe(whole.count);
          // Sums of up to 13 rounded volumes.
          expect(shells.reduce((v, s) => v + s.volumeMpc3, 0) / whole.volumeMpc3).toBeCloseTo(1, 12);
        },
      ),
    );
  });

  it('does not depend on the order of the rows, to the last digit, also with weights and equal redshifts', () => {
    const row = fc.tuple(fc.integer({ min: 1, max: 40 }), fc.double({ min: 0, max: 9, noNaN: true }));
    fc.assert(
      fc.property(
        fc
          .array(row, { minLength: 1, maxLength: 60 })
          .chain((rows) =>
            fc.tuple(fc.constant(rows), fc.shuffledSubarray(rows, { minLength: rows.length })),
          ),
        ([rows, shuffled]) => {
          const shellsOf = (r: typeof rows) =>
            shellStatistics(
              sortSample(
                Float64Array.from(r, ([z]) => z / 50),
                Float64Array.from(r, ([, w]) => w),
              ),
              [0, 0.3, 0.8],
              conditions,
            );
          expect(shellsOf(shuffled)).toEqual(shellsOf(rows));
        },
      ),
    );
  });

  it('refuses P0 of 0 and areas that no sky has, each with a sentence', () => {
    const sample = sortSample(Float64Array.of(0.5), null);
    const with_ = (change: object) => () => shellStatistics(sample, [0.4, 0.6], { ...conditions, ...change });
    expect(with_({ p0Mpc3PerH3: 0 })).toThrow(/P0 is 0, expected a number above 0/);
    expect(with_({ areaDeg2: 0 })).toThrow(/area is 0 square degrees/);
    expect(with_({ areaDeg2: 41_253 })).toThrow(/at most 41252.96/);
    expect(WHOLE_SKY_DEG2).toBeCloseTo(41_252.96125, 5);
  });
});

describe('edges by scheme', () => {
  const sample = sortSample(uniformSample(4000, 0.2, 1.4), null);
  const scheme = (kind: 'redshift' | 'comoving' | 'lookback' | 'volume' | 'count', shells: number) =>
    ({ kind, shells, zMin: null, zMax: null }) as const;

  it('makes shells equal in what was asked, to 1e-9', () => {
    const spread = (values: number[]) => Math.max(...values) / Math.min(...values) - 1;
    const steps = (edges: readonly number[], at: (z: number) => number) =>
      edges.slice(1).map((z, i) => at(z) - at(edges[i]!));
    expect(spread(steps(edgesOf(scheme('redshift', 5), sample, cosmology), (z) => z))).toBeLessThan(1e-9);
    expect(
      spread(steps(edgesOf(scheme('comoving', 5), sample, cosmology), (z) => cosmology.comovingMpc(z))),
    ).toBeLessThan(1e-9);
    expect(
      spread(steps(edgesOf(scheme('lookback', 5), sample, cosmology), (z) => cosmology.lookbackGyr(z))),
    ).toBeLessThan(1e-9);
    const byVolume = shellStatistics(sample, edgesOf(scheme('volume', 7), sample, cosmology), conditions);
    expect(spread(byVolume.map((s) => s.volumeMpc3))).toBeLessThan(1e-9);
    const byCount = shellStatistics(sample, edgesOf(scheme('count', 7), sample, cosmology), conditions);
    expect(byCount.map((s) => s.count)).toEqual([571, 572, 571, 572, 571, 572, 571]);
  });

  it('takes every galaxy of the sample when no range is given', () => {
    for (const kind of ['redshift', 'comoving', 'lookback', 'volume', 'count'] as const) {
      const shells = shellStatistics(sample, edgesOf(scheme(kind, 3), sample, cosmology), conditions);
      expect(shells.reduce((n, s) => n + s.count, 0)).toBe(4000);
    }
  });

  it.each([
    [{ kind: 'edges', edges: [0.5] }, /One shell edge came, at least two/],
    [{ kind: 'edges', edges: [] }, /No shell edge came/],
    [{ kind: 'edges', edges: [0.5, 0.4] }, /must increase: 0.5 is followed by 0.4/],
    [{ kind: 'edges', edges: [0.5, 0.5] }, /must increase/],
    [{ kind: 'edges', edges: [-0.1, 0.5] }, /Shell edge 1 is -0.1, expected a redshift from 0 to 1100/],
    [{ kind: 'edges', edges: [0.1, 2000] }, /Shell edge 2 is 2000/],
    [{ kind: 'edges', edges: [0.1, Number.NaN] }, /Shell edge 2 is NaN/],
    [{ kind: 'volume', shells: 0, zMin: null, zMax: null }, /0 shells were asked for/],
    [{ kind: 'volume', shells: 1.5, zMin: null, zMax: null }, /1.5 shells were asked for/],
    [{ kind: 'count', shells: 5000, zMin: null, zMax: null }, /5000 shells were asked for/],
    [
      { kind: 'count', shells: 900, zMin: 0.2, zMax: 0.3 },
      /galaxies lie between redshift 0.2 and 0.3, too few/,
    ],
  ] as const)('refuses %j', (bad, sentence) => {
    expect(() => edgesOf(bad, sample, cosmology)).toThrow(sentence);
    expect(() => edgesOf(bad, sample, cosmology)).toThrow(Refusal);
  });

  it('says what is wrong with samples that cannot be divided', () => {
    const one = sortSample(Float64Array.of(0.5, 0.5, 0.5), null);
    expect(() => edgesOf(scheme('volume', 2), one, cosmology)).toThrow(
      /All galaxies have the same redshift 0.5/,
    );
    expect(() => edgesOf(scheme('volume', 2), sortSample(new Float64Array(0), null), cosmology)).toThrow(
      /No galaxy is left/,
    );
    const tied = sortSample(Float64Array.of(0.1, 0.5, 0.5, 0.5, 0.5, 0.5, 0.6), null);
    expect(() => edgesOf(scheme('count', 5), tied, cosmology)).toThrow(/share the redshift 0.5/);
  });
});
