import { cube, exp, square } from '../numerics/elementary/elementary.ts';
import type { Random } from '../numerics/random.ts';
import { fourierCube } from './fft3.ts';
import { matterPowerShape } from './matterSpectrum.ts';

/** A periodic cube of a Gaussian random field, one band of its waves, turned some way in space. */
export interface WaveTile {
  /** Cells along an edge, a power of two. */
  readonly cells: number;
  readonly cellsPerMpc: number;
  /** Four numbers a cell, C order: the flow (Mpc, along the tile's own axes) and the linear contrast. */
  readonly field: Float32Array;
  /** Rows are the tile's axes in the sky's frame. */
  readonly rotation: Float64Array;
  readonly offsetCells: Float64Array;
}

/** What the waves are made of. Wave numbers per Mpc; the band is kMin < k <= kMax. */
export interface WaveBand {
  readonly cells: number;
  readonly boxMpc: number;
  readonly kMinPerMpc: number;
  readonly kMaxPerMpc: number;
  readonly smoothingMpc: number;
  /** Factor from `matterPowerShape` to power in Mpc^3. */
  readonly powerFactor: number;
}

/**
 * Draws one tile: white noise is coloured in Fourier space, and the flow psi follows from the contrast delta by
 * div psi = -delta, that is psi(k) = i k delta(k) / k^2 (Zel'dovich 1970, A&A 5, 84).
 */
export function drawWaveTile(band: WaveBand, random: Random): WaveTile {
  const n = band.cells;
  const count = cube(n);
  const noiseRe = new Float64Array(count);
  const noiseIm = new Float64Array(count);
  for (let i = 0; i < count; i++) noiseRe[i] = random.normal();
  fourierCube(noiseRe, noiseIm, n, 'forward');

  // Four real fields in two complex transforms: psiX + i psiY, and psiZ + i delta.
  const acrossRe = new Float64Array(count);
  const acrossIm = new Float64Array(count);
  const alongRe = new Float64Array(count);
  const alongIm = new Float64Array(count);
  const unit = (2 * Math.PI) / band.boxMpc;
  const cellVolume = cube(band.boxMpc / n);
  const half = n / 2;
  const whole = (i: number) => (i < half ? i : i - n);
  // The amplitude depends on a^2 + b^2 + c^2 alone, a whole number: worked out once for each.
  const amplitude = new Float64Array(3 * half * half + 1);
  for (let m = 1; m < amplitude.length; m++) {
    const k = unit * Math.sqrt(m);
    if (k <= band.kMinPerMpc || k > band.kMaxPerMpc) continue;
    const power = band.powerFactor * matterPowerShape(k) * exp(-square(k * band.smoothingMpc));
    amplitude[m] = Math.sqrt(power / cellVolume) / count;
  }
  for (let a = 0, at = 0; a < n; a++) {
    for (let b = 0; b < n; b++) {
      for (let c = 0; c < n; c++, at++) {
        // The waves of exactly half the sampling rate have no sign, so no gradient: left out.
        if (a === half || b === half || c === half) continue;
        const kx = whole(a);
        const ky = whole(b);
        const kz = whole(c);
        const m = kx * kx + ky * ky + kz * kz;
        const scale = amplitude[m]!;
        if (scale === 0) continue;
        const re = noiseRe[at]! * scale;
        const im = noiseIm[at]! * scale;
        const perK2 = 1 / (m * unit);
        acrossRe[at] = (-kx * im - ky * re) * perK2;
        acrossIm[at] = (kx * re - ky * im) * perK2;
        alongRe[at] = -(kz * perK2 + 1) * im;
        alongIm[at] = (kz * perK2 + 1) * re;
      }
    }
  }
  fourierCube(acrossRe, acrossIm, n, 'inverse');
  fourierCube(alongRe, alongIm, n, 'inverse');

  const field = new Float32Array(4 * count);
  for (let i = 0; i < count; i++) {
    field[4 * i] = acrossRe[i]!;
    field[4 * i + 1] = acrossIm[i]!;
    field[4 * i + 2] = alongRe[i]!;
    field[4 * i + 3] = alongIm[i]!;
  }
  return {
    cells: n,
    cellsPerMpc: n / band.boxMpc,
    field,
    rotation: randomRotation(random),
    offsetCells: Float64Array.of(n * random.uniform(), n * random.uniform(), n * random.uniform()),
  };
}

/** A rotation drawn evenly from all: a unit quaternion of four normal numbers, as a matrix in rows. */
function randomRotation(random: Random): Float64Array {
  const four = [random.normal(), random.normal(), random.normal(), random.normal()];
  const norm = Math.sqrt(four.reduce((sum, v) => sum + v * v, 0));
  const [w, x, y, z] = four.map((v) => v / norm) as [number, number, number, number];
  return Float64Array.of(
    1 - 2 * (y * y + z * z),
    2 * (x * y - w * z),
    2 * (x * z + w * y),
    2 * (x * y + w * z),
    1 - 2 * (x * x + z * z),
    2 * (y * z - w * x),
    2 * (x * z - w * y),
    2 * (y * z + w * x),
    1 - 2 * (x * x + y * y),
  );
}
