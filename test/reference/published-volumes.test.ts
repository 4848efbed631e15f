import { describe, expect, it } from 'vitest';
import { createCosmology } from '../../shared-core/cosmology/cosmology.ts';
import { findPublishedSet } from '../../shared-core/cosmology/publishedSets.ts';
import { sortSample } from '../../shared-core/shells/sample.ts';
import { shellStatistics } from '../../shared-core/shells/statistics.ts';

/** Flat, matter and a cosmological constant alone, as the papers state it. */
const flat = (omegaM0: number, h: number) =>
  createCosmology({ ...findPublishedSet('flat70').parameters, omegaM0, h0KmSMpc: 100 * h });

/** Shell volumes in Gpc^3, or (Gpc/h)^3, by the function that the ledger and the command use. */
function volumes(
  cosmology: ReturnType<typeof flat>,
  areaDeg2: number,
  edges: readonly number[],
  perH: boolean,
) {
  const shells = shellStatistics(sortSample(new Float64Array(0), null), edges, {
    cosmology,
    areaDeg2,
    p0Mpc3PerH3: 10_000,
  });
  return shells.map((s) => (s.volumeMpc3 * (perH ? cosmology.h ** 3 : 1)) / 1e9);
}

const within = (actual: number, expected: number, tolerance: number) =>
  expect(Math.abs(actual - expected), `${actual} against ${expected}`).toBeLessThan(tolerance);

describe('shell volumes and densities in published papers', () => {
  it('Eisenstein et al. 2005, astro-ph/0501171: 3816 deg2, z 0.16 to 0.47, 0.72 (Gpc/h)^3 (read)', () => {
    const [v] = volumes(flat(0.3, 0.7), 3816, [0.16, 0.47], true);
    // Half of the last digit printed.
    within(v!, 0.72, 0.005);
  });

  it('Alam et al. 2017, 1607.03155: 9329 deg2, z 0.2 to 0.75, 18.7 Gpc^3 (read)', () => {
    const [v] = volumes(flat(0.31, 0.676), 9329, [0.2, 0.75], false);
    // Half of the last digit printed.
    within(v!, 18.7, 0.05);
  });

  it.each([
    [0.2, 0.5, 6.4],
    [0.4, 0.6, 7.3],
    [0.5, 0.75, 12.3],
  ])('the same paper, table 2: z %f to %f, %f Gpc^3 (value from memory)', (from, to, printed) => {
    const [v] = volumes(flat(0.31, 0.676), 9329, [from, to], false);
    // Half of the last digit printed.
    within(v!, printed, 0.05);
  });

  it('Euclid preparation VII, 1910.09273, table 3: volumes and densities of four shells (value from memory)', () => {
    const cosmology = flat(0.32, 0.67);
    const edges = [0.9, 1.1, 1.3, 1.5, 1.8];
    const areaDeg2 = 15_000;
    const perDeg2PerZ = [1815.0, 1701.5, 1410.0, 940.97];
    // One galaxy in each shell stands for all of it by its weight.
    const redshift = Float64Array.of(1, 1.2, 1.4, 1.65);
    const weight = Float64Array.from(perDeg2PerZ, (n, i) => n * areaDeg2 * (edges[i + 1]! - edges[i]!));
    const shells = shellStatistics(sortSample(redshift, weight), edges, {
      cosmology,
      areaDeg2,
      p0Mpc3PerH3: 10_000,
    });
    for (const [i, [volume, density]] of [
      [7.94, 6.86],
      [9.15, 5.58],
      [10.05, 4.21],
      [16.22, 2.61],
    ].entries()) {
      // Half of the last digit printed, and a little for constants.
      within((shells[i]!.volumeMpc3 * cosmology.h ** 3) / 1e9, volume!, 0.006);
      within((shells[i]!.densityPerMpc3 / cosmology.h ** 3) * 1e4, density!, 0.01);
    }
  });

  it('an area one per cent too large fails the bound: the check can fail', () => {
    const [v] = volumes(flat(0.31, 0.676), 9329 * 1.01, [0.2, 0.75], false);
    expect(Math.abs(v! - 18.7)).toBeGreaterThan(0.05);
  });
});
