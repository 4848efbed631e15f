import fc from 'fast-check';
import { describe, expect, it } from 'vitest';
import { createCosmology } from '../../../shared-core/cosmology/cosmology.ts';
import { findPublishedSet } from '../../../shared-core/cosmology/publishedSets.ts';
import { type Cluster, drawCluster } from '../../../shared-core/demo/clusters.ts';
import { createDepthAxis, redshiftBetween } from '../../../shared-core/demo/depthAxis.ts';
import { brightnessAbove } from '../../../shared-core/demo/galaxyBrightness.ts';
import { createGalaxyColumns } from '../../../shared-core/demo/galaxyColumns.ts';
import { createRadialSampler } from '../../../shared-core/demo/radialSampler.ts';
import { asciiText, cellsOf, RowWriter } from '../../../shared-core/demo/rowWriter.ts';
import { createRandom } from '../../../shared-core/numerics/random.ts';

const axis = createDepthAxis(createCosmology(findPublishedSet('planck2018').parameters));

describe('depth axis', () => {
  it('gives the redshift that the cosmology gives', () => {
    const cosmology = createCosmology(findPublishedSet('planck2018').parameters);
    for (let at = 0.37; at < axis.redshift.length - 1; at += 7.61) {
      const knot = Math.floor(at);
      const z = redshiftBetween(axis, knot, at - knot);
      const direct = cosmology.redshiftAtComovingMpc(axis.fromMpc + at * axis.stepMpc);
      expect(Math.abs(z / direct - 1)).toBeLessThan(1e-9);
    }
  });
});

describe('brightness above a limit', () => {
  // E1 by scipy.special.exp1 (computed)
  const exact = [
    [0.01, 4.037929576538113],
    [0.1, 1.8229239584193906],
    [0.5, 0.5597735947761608],
    [1, 0.21938393439552062],
    [2, 0.048900510708061125],
    [5, 0.0011482955912753257],
  ] as const;
  const characteristic = Float64Array.from(exact, ([x]) => 22 + 2.5 * Math.log10(x));
  const brightness = brightnessAbove(22, characteristic);

  it('counts galaxies by the exponential integral', () => {
    for (const [i, [, e1]] of exact.entries()) {
      expect(Math.abs(brightness.count[i]! / e1 - 1)).toBeLessThan(2e-4);
    }
  });

  it('gives each magnitude its share of the galaxies, none beyond the limit', () => {
    for (const share of [0.01, 0.3, 0.5, 0.9]) {
      // For x = 0.1: the share of E1 above the luminosity that the magnitude stands for
      const luminosity = 10 ** (-0.4 * (brightness.magnitude(1, 0, share) - characteristic[1]!));
      const above = brightnessAbove(characteristic[1]! - 2.5 * Math.log10(luminosity), characteristic)
        .count[1]!;
      expect(above / brightness.count[1]!).toBeCloseTo(share, 3);
    }
    expect(brightness.magnitude(1, 0, 1 - 2 ** -53)).toBeCloseTo(22, 9);
    expect(brightness.magnitude(1, 0, 0)).toBeGreaterThan(22 - 2.5 * Math.log10(30 / 0.1));
  });
});

describe('radial sampler', () => {
  it('draws with the density that was asked for', () => {
    // Density proportional to the distance past the start: the share u lies within sqrt(u) of the length.
    const weight = Float64Array.from(axis.redshift, (_, i) => i);
    const sampler = createRadialSampler(axis, weight);
    const lengthMpc = (weight.length - 1) * axis.stepMpc;
    for (const u of [0, 0.04, 0.25, 0.5, 0.81]) {
      // Straight lines within a knot's step: a few thousandths of the length near the start
      expect((sampler.distanceMpc(u) - axis.fromMpc) / lengthMpc).toBeCloseTo(Math.sqrt(u), 2);
    }
    expect(sampler.distanceMpc(1 - 2 ** -53)).toBeCloseTo(axis.fromMpc + lengthMpc, 6);
  });
});

describe('clusters', () => {
  it('stand only in knots, few are rich, and the rich are wide and fast', () => {
    const random = createRandom(3);
    const cluster: Cluster = { members: 0, radiusMpc: 0, dispersionKmS: 0 };
    for (let i = 0; i < 200; i++) {
      drawCluster(2, 1, random, cluster);
      expect(cluster.members).toBe(1);
      expect(cluster.radiusMpc).toBe(0);
      expect(cluster.dispersionKmS).toBeLessThan(300);
    }
    const found: Cluster[] = [];
    for (let i = 0; i < 100_000; i++) {
      drawCluster(6, 1, random, cluster);
      if (cluster.members > 1) found.push({ ...cluster });
    }
    const poor = found.filter(({ members }) => members < 20);
    const rich = found.filter(({ members }) => members >= 60);
    expect(found.length).toBeLessThan(5000);
    expect(poor.length).toBeGreaterThan(5 * rich.length);
    expect(rich.length).toBeGreaterThan(20);
    const least = Math.min(...rich.map(({ dispersionKmS }) => dispersionKmS));
    expect(least).toBeGreaterThan(Math.max(...poor.map(({ dispersionKmS }) => dispersionKmS)));
  });
});

describe('row writer', () => {
  it('writes every number as fixed decimals, within half a unit of the last', () => {
    const writer = new RowWriter(1);
    const columns = createGalaxyColumns(1);
    fc.assert(
      fc.property(
        fc.double({ min: 0, max: 360, noNaN: true }),
        fc.double({ min: -90, max: 90, noNaN: true }),
        fc.double({ min: -5, max: 30, noNaN: true }),
        (raDeg, decDeg, other) => {
          columns.raDeg[0] = raDeg;
          columns.decDeg[0] = decDeg;
          for (const name of ['redshift', 'magnitude', 'colour', 'weight'] as const) columns[name][0] = other;
          writer.galaxy(columns, 0, 'wide');
          const text = asciiText(writer.take());
          expect(text).toMatch(
            /^OD\d{8}(,-?\d{1,3}\.\d{6}){2},-?\d{1,3}\.\d{5}(,-?\d{1,3}\.\d{3}){3},wide\n$/,
          );
          const cells = text.split(',').slice(1, 7).map(Number);
          const wanted = [raDeg, decDeg, other, other, other, other];
          const units = [1e-6, 1e-6, 1e-5, 1e-3, 1e-3, 1e-3];
          cells.forEach((cell, i) => {
            // A hair more than half, for values that lie in the middle
            expect(Math.abs(cell - wanted[i]!)).toBeLessThanOrEqual(0.5000001 * units[i]!);
          });
        },
      ),
    );
  });

  it('writes the same cells as text does', () => {
    const writer = new RowWriter(1);
    const columns = createGalaxyColumns(1);
    columns.raDeg[0] = 9.000001;
    columns.decDeg[0] = -0.0000021;
    columns.redshift[0] = 1.00001;
    columns.magnitude[0] = 21.9;
    columns.colour[0] = -0.25;
    columns.weight[0] = 1;
    writer.galaxy(columns, 0, 'wide');
    writer.cells(cellsOf(columns, 0, 'wide'));
    expect(asciiText(writer.take()).split('\n')).toEqual([
      'OD00000001,9.000001,-0.000002,1.00001,21.900,-0.250,1.000,wide',
      'OD00000002,9.000001,-0.000002,1.00001,21.900,-0.250,1.000,wide',
      '',
    ]);
  });
});
