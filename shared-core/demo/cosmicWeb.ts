import { square } from '../numerics/elementary/elementary.ts';
import type { Random } from '../numerics/random.ts';
import { smoothedVariance } from './matterSpectrum.ts';
import { drawWaveTile, type WaveTile } from './waveTile.ts';

/*
 * Matter is carried along the streamlines of its first, linear flow, which never changes: the frozen-flow
 * approximation of Matarrese, Lucchin, Moscardini & Saez 1992, MNRAS 259, 437. Streams never cross, so what flows
 * together stays together: voids empty into walls, walls into filaments, filaments into knots.
 *
 * Two periodic tiles, each with its own band of waves and turned its own way, are added. Their sum has no period,
 * so the pattern does not repeat though the survey is far longer than either tile.
 */

/** Linear contrast (rms) at which the flow is stopped: beyond nature's, so that a sparse sample shows the web. */
const CONTRAST = 2.7;
const SMOOTHING_MPC = 7.5;
const SPLIT_PER_MPC = 0.05;
const CELLS = 64;
const LONG_BOX_MPC = 1700;
const SHORT_BOX_MPC = 530;
const STEPS = 8;

/** Places in the array that `settle` fills. */
export const SITE = { x: 0, y: 1, z: 2, logDensity: 3, flowAlong: 4, size: 5 } as const;

/** Where matter comes to rest, in comoving Mpc in the frame of the sky with the observer at its origin. */
export interface Web {
  /**
   * Fills `site`: the place where the flow carries the matter that started at x, y, z (Mpc), the natural logarithm
   * of its density there over the mean, and the flow at that place along the line of sight (Mpc, away from the
   * observer positive; the displacement of unit growth).
   */
  settle(x: number, y: number, z: number, site: Float64Array): void;
}

/** Draws the waves of one invented universe. The same numbers give the same universe. */
export function drawCosmicWeb(random: Random): Web {
  const powerFactor = square(CONTRAST) / smoothedVariance(SMOOTHING_MPC);
  const common = { cells: CELLS, smoothingMpc: SMOOTHING_MPC, powerFactor };
  const long = { ...common, boxMpc: LONG_BOX_MPC, kMinPerMpc: 0, kMaxPerMpc: SPLIT_PER_MPC };
  const short = { ...common, boxMpc: SHORT_BOX_MPC, kMinPerMpc: SPLIT_PER_MPC, kMaxPerMpc: Infinity };
  return webOf([drawWaveTile(long, random), drawWaveTile(short, random)]);
}

function webOf(tiles: readonly WaveTile[]): Web {
  const flow = new Float64Array(4);
  const step = 1 / STEPS;
  return {
    settle(x, y, z, site) {
      let logDensity = 0;
      let beforeX = 0;
      let beforeY = 0;
      let beforeZ = 0;
      for (let i = 0; i < STEPS; i++) {
        flowAt(tiles, x, y, z, flow);
        const flowX = flow[0]!;
        const flowY = flow[1]!;
        const flowZ = flow[2]!;
        // Adams & Bashforth's second order, one look at the field a step; Euler's for the first.
        const now = i === 0 ? step : 1.5 * step;
        const before = i === 0 ? 0 : -0.5 * step;
        x += now * flowX + before * beforeX;
        y += now * flowY + before * beforeY;
        z += now * flowZ + before * beforeZ;
        beforeX = flowX;
        beforeY = flowY;
        beforeZ = flowZ;
        // d ln(density) = -div(flow) = linear contrast, along the path.
        logDensity += step * flow[3]!;
      }
      site[SITE.x] = x;
      site[SITE.y] = y;
      site[SITE.z] = z;
      site[SITE.logDensity] = logDensity;
      const along = flow[0]! * x + flow[1]! * y + flow[2]! * z;
      site[SITE.flowAlong] = along / Math.sqrt(x * x + y * y + z * z);
    },
  };
}

/** Flow (Mpc) and linear contrast at a place: the tiles' sum, each interpolated linearly between eight cells. */
export function flowAt(tiles: readonly WaveTile[], x: number, y: number, z: number, out: Float64Array): void {
  let flowX = 0;
  let flowY = 0;
  let flowZ = 0;
  let contrast = 0;
  for (let i = 0; i < tiles.length; i++) {
    const { cells: n, cellsPerMpc: s, field: f, rotation: r, offsetCells: o } = tiles[i]!;
    const a = s * (r[0]! * x + r[1]! * y + r[2]! * z) + o[0]!;
    const b = s * (r[3]! * x + r[4]! * y + r[5]! * z) + o[1]!;
    const c = s * (r[6]! * x + r[7]! * y + r[8]! * z) + o[2]!;
    // The | 0 lets the engine index with whole numbers.
    const a0 = Math.floor(a) | 0;
    const b0 = Math.floor(b) | 0;
    const c0 = Math.floor(c) | 0;
    const wa = a - a0;
    const wb = b - b0;
    const wc = c - c0;
    const mask = n - 1;
    let p = 0;
    let q = 0;
    let t = 0;
    for (let da = 0; da < 2; da++) {
      for (let db = 0; db < 2; db++) {
        // n is a power of two: & wraps around, for negative numbers too.
        const row = (((a0 + da) & mask) * n + ((b0 + db) & mask)) * n;
        const weight = (da === 0 ? 1 - wa : wa) * (db === 0 ? 1 - wb : wb);
        const w0 = weight * (1 - wc);
        const w1 = weight * wc;
        const i = 4 * (row + (c0 & mask));
        const j = 4 * (row + ((c0 + 1) & mask));
        p += w0 * f[i]! + w1 * f[j]!;
        q += w0 * f[i + 1]! + w1 * f[j + 1]!;
        t += w0 * f[i + 2]! + w1 * f[j + 2]!;
        contrast += w0 * f[i + 3]! + w1 * f[j + 3]!;
      }
    }
    flowX += r[0]! * p + r[3]! * q + r[6]! * t;
    flowY += r[1]! * p + r[4]! * q + r[7]! * t;
    flowZ += r[2]! * p + r[5]! * q + r[8]! * t;
  }
  out[0] = flowX;
  out[1] = flowY;
  out[2] = flowZ;
  out[3] = contrast;
}
