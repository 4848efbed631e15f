import { describe, expect, it } from 'vitest';
import { drawCosmicWeb, flowAt, SITE } from '../../../shared-core/demo/cosmicWeb.ts';
import { matterPowerShape, smoothedVariance } from '../../../shared-core/demo/matterSpectrum.ts';
import { drawWaveTile } from '../../../shared-core/demo/waveTile.ts';
import { integrate } from '../../../shared-core/numerics/quadrature.ts';
import { createRandom } from '../../../shared-core/numerics/random.ts';

const SMOOTHING_MPC = 25;
const BAND = {
  cells: 32,
  boxMpc: 640,
  kMinPerMpc: 0,
  kMaxPerMpc: Infinity,
  smoothingMpc: SMOOTHING_MPC,
  powerFactor: 1 / smoothedVariance(SMOOTHING_MPC),
};

describe('matter spectrum', () => {
  it('rises with the tilt on large scales and falls towards k^(tilt - 4) ln^2 k on small ones', () => {
    const slope = (k: number) => Math.log(matterPowerShape(k * 1.01) / matterPowerShape(k)) / Math.log(1.01);
    // Limits of Bardeen et al. 1986, eq. G3: T goes to 1 and to ln(2.34 q) / q^2.
    expect(slope(1e-5)).toBeCloseTo(0.965, 2);
    expect(slope(1e4)).toBeGreaterThan(0.965 - 4);
    expect(slope(1e4)).toBeLessThan(0.965 - 4 + 0.35);
  });

  it('has the variance that an adaptive quadrature gives', () => {
    const direct = integrate(
      (k) => (k * k * matterPowerShape(k) * Math.exp(-((k * 8) ** 2))) / (2 * Math.PI ** 2),
      1e-6,
      2,
    );
    // The waves beyond 60 Gpc that the table leaves out carry less than 1e-6
    expect(smoothedVariance(8) / direct).toBeCloseTo(1, 5);
  });
});

describe('a tile of waves', () => {
  const tile = drawWaveTile(BAND, createRandom(11));
  const at = (a: number, b: number, c: number, channel: number) => {
    const wrap = (i: number) => (i + BAND.cells) % BAND.cells;
    return tile.field[4 * ((wrap(a) * BAND.cells + wrap(b)) * BAND.cells + wrap(c)) + channel]!;
  };

  it('has the contrast that was asked for', () => {
    let sum = 0;
    for (let i = 3; i < tile.field.length; i += 4) sum += tile.field[i]! ** 2;
    // A box of 640 Mpc lacks the longest waves and is one draw: a tenth of chance either way
    expect(Math.sqrt(sum / BAND.cells ** 3)).toBeGreaterThan(0.85);
    expect(Math.sqrt(sum / BAND.cells ** 3)).toBeLessThan(1.15);
  });

  it('flows towards contrast: div psi = -delta', () => {
    const cellMpc = BAND.boxMpc / BAND.cells;
    let product = 0;
    let divergences = 0;
    let contrasts = 0;
    for (let a = 0; a < BAND.cells; a++) {
      for (let b = 0; b < BAND.cells; b++) {
        for (let c = 0; c < BAND.cells; c++) {
          const divergence =
            (at(a + 1, b, c, 0) -
              at(a - 1, b, c, 0) +
              at(a, b + 1, c, 1) -
              at(a, b - 1, c, 1) +
              at(a, b, c + 1, 2) -
              at(a, b, c - 1, 2)) /
            (2 * cellMpc);
          product -= divergence * at(a, b, c, 3);
          divergences += divergence ** 2;
          contrasts += at(a, b, c, 3) ** 2;
        }
      }
    }
    expect(product / Math.sqrt(divergences * contrasts)).toBeGreaterThan(0.99);
    // Central differences lose a share of the shorter waves, sin(kh) / kh
    expect(product / contrasts).toBeGreaterThan(0.8);
    expect(product / contrasts).toBeLessThan(1);
  });

  it('is turned by a rotation', () => {
    const r = tile.rotation;
    for (let i = 0; i < 3; i++) {
      for (let j = 0; j < 3; j++) {
        const product = r[3 * i]! * r[3 * j]! + r[3 * i + 1]! * r[3 * j + 1]! + r[3 * i + 2]! * r[3 * j + 2]!;
        expect(product).toBeCloseTo(i === j ? 1 : 0, 14);
      }
    }
  });

  it('repeats after its own length, but not together with another tile', () => {
    const other = drawWaveTile({ ...BAND, boxMpc: 517 }, createRandom(12));
    const [dx, dy, dz] = tile.rotation.subarray(0, 3).map((cosine) => cosine * BAND.boxMpc);
    const here = new Float64Array(4);
    const there = new Float64Array(4);
    flowAt([tile], 100, 200, 300, here);
    flowAt([tile], 100 + dx!, 200 + dy!, 300 + dz!, there);
    for (let i = 0; i < 4; i++) expect(there[i]).toBeCloseTo(here[i]!, 9);
    flowAt([tile, other], 100, 200, 300, here);
    flowAt([tile, other], 100 + dx!, 200 + dy!, 300 + dz!, there);
    expect(Math.abs(there[3]! - here[3]!)).toBeGreaterThan(0.01);
  });
});

describe('the web', () => {
  const web = drawCosmicWeb(createRandom(5));
  const site = new Float64Array(SITE.size);
  const settle = (x: number, y: number, z: number) => {
    web.settle(x, y, z, site);
    return site.slice();
  };

  it('keeps matter: the density is one over the volume that a small cube flows into', () => {
    const random = createRandom(6);
    const step = 0.05;
    let [xx, xy, yy] = [0, 0, 0];
    for (let i = 0; i < 400; i++) {
      const [x, y, z] = [2000 + 900 * random.uniform(), 900 * random.uniform(), 900 * random.uniform()];
      const here = settle(x, y, z);
      const [a, b, c] = [settle(x + step, y, z), settle(x, y + step, z), settle(x, y, z + step)].map((end) =>
        [0, 1, 2].map((k) => (end[k]! - here[k]!) / step),
      ) as [number[], number[], number[]];
      const determinant =
        a[0]! * (b[1]! * c[2]! - b[2]! * c[1]!) -
        a[1]! * (b[0]! * c[2]! - b[2]! * c[0]!) +
        a[2]! * (b[0]! * c[1]! - b[1]! * c[0]!);
      const emptied = -here[SITE.logDensity]!;
      const volume = Math.log(Math.abs(determinant));
      xx += emptied ** 2;
      xy += emptied * volume;
      yy += volume ** 2;
    }
    // Straight lines between the cells' middles take some 15% off the flow's steepest changes, not off the contrast.
    expect(xy / Math.sqrt(xx * yy)).toBeGreaterThan(0.97);
    expect(xy / xx).toBeGreaterThan(0.8);
    expect(xy / xx).toBeLessThan(1.05);
  });

  it('gathers: much matter in little room, little in much', () => {
    const random = createRandom(7);
    const densities: number[] = [];
    for (let i = 0; i < 4000; i++) {
      densities.push(settle(4000 * random.uniform(), 4000 * random.uniform(), 4000 * random.uniform())[3]!);
    }
    densities.sort((p, q) => p - q);
    // A quarter of all matter stands where it is more than ten times as dense as the mean; volume that it fills is
    // the mean of 1 / density.
    const dense = densities.filter((logDensity) => logDensity > Math.log(10));
    expect(dense.length / densities.length).toBeGreaterThan(0.25);
    const room = dense.reduce((sum, logDensity) => sum + Math.exp(-logDensity), 0) / densities.length;
    expect(room).toBeLessThan(0.03);
  });
});
