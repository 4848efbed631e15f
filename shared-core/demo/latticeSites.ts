import { log } from '../numerics/elementary/elementary.ts';
import { SITE } from './cosmicWeb.ts';
import { onAxis, REACH_MPC } from './depthAxis.ts';
import { halfSlopes, type Lattice, latticeAround } from './lattice.ts';
import { keptShare, type Sites, type SitesPlan } from './sites.ts';

const SPACING_MPC = 24;
/** Few, so that a batch of galaxies takes a sweep or more; not so few that memory is read at random. */
const DRAWS_A_CELL = 0.2;
/** Numbers kept at a corner: where its matter settles, and what else a site has. */
const CHANNELS = SITE.size;

/**
 * Follows matter from the corners of a lattice only and places galaxies between them, linearly: for millions of
 * galaxies. Only cells that send galaxies into the field are visited, in proportion to how many they send, so few
 * draws are in vain.
 *
 * The cells are swept again and again in the order in which they lie in memory, with steps of random length: a
 * Poisson process, so the places are as random as if each cell had been picked by itself. One sweep is therefore a
 * fair sample; part of one is not.
 *
 * Memory: 28 bytes a corner and 16 a cell in use, some 30 MB for the wide field.
 */
export function latticeSites(plan: SitesPlan): Sites {
  const { random } = plan;
  const lattice = latticeAround(plan.sky, plan.axis, SPACING_MPC);
  const followed = followCorners(plan, lattice);
  const { corners } = followed;
  const { cells, weights, most } = usefulCells(plan, lattice, followed);
  const meanStep = weights.reduce((sum, weight) => sum + weight, 0) / (DRAWS_A_CELL * cells.length);
  const [, ny, nz] = lattice.corners;
  const row01 = nz * CHANNELS;
  const row10 = ny * nz * CHANNELS;
  const row11 = row10 + row01;
  // Between draws in an array: a captured number would be boxed at every change.
  const state = Float64Array.of(0, weights[0]!);
  return {
    draw(site) {
      let cell = state[0]! | 0;
      let ahead = state[1]!;
      for (;;) {
        let step = -meanStep * log(1 - random.uniform());
        while (step > ahead) {
          step -= ahead;
          cell = cell + 1 < cells.length ? cell + 1 : 0;
          ahead = weights[cell]!;
        }
        ahead -= step;
        const wa = random.uniform();
        const wb = random.uniform();
        const wc = random.uniform();
        const w00 = (1 - wa) * (1 - wb);
        const w01 = (1 - wa) * wb;
        const w10 = wa * (1 - wb);
        const w11 = wa * wb;
        const at = cells[cell]! * CHANNELS;
        for (let k = 0; k < CHANNELS; k++) {
          const i = at + k;
          const j = i + CHANNELS;
          const near =
            w00 * corners[i]! +
            w01 * corners[i + row01]! +
            w10 * corners[i + row10]! +
            w11 * corners[i + row11]!;
          const far =
            w00 * corners[j]! +
            w01 * corners[j + row01]! +
            w10 * corners[j + row10]! +
            w11 * corners[j + row11]!;
          site[k] = near + wc * (far - near);
        }
        if (random.uniform() * most[cell]! < keptShare(site[SITE.logDensity]!)) break;
      }
      state[0] = cell;
      state[1] = ahead;
    },
  };
}

interface FollowedCorners {
  /** Sites, CHANNELS numbers a corner; NaN where matter cannot reach the field. */
  readonly corners: Float32Array;
  /** Their slopes east/along and north/along as seen by the observer, two numbers a corner. */
  readonly slopes: Float32Array;
}

/** Settles every corner from which matter may reach the field. */
function followCorners(plan: SitesPlan, lattice: Lattice): FollowedCorners {
  const { axes, low, corners: size, spacingMpc } = lattice;
  const [along, east, north] = axes;
  const [nx, ny, nz] = size;
  const [eastSlope, northSlope] = halfSlopes(plan.sky, lattice);
  const corners = new Float32Array(nx * ny * nz * CHANNELS).fill(Number.NaN);
  const slopes = new Float32Array(nx * ny * nz * 2).fill(Number.NaN);
  const site = new Float64Array(SITE.size);
  const reach = REACH_MPC + spacingMpc;
  for (let a = 0, corner = 0; a < nx; a++) {
    const p = low[0] + a * spacingMpc;
    for (let b = 0; b < ny; b++) {
      const q = low[1] + b * spacingMpc;
      for (let c = 0; c < nz; c++, corner++) {
        const t = low[2] + c * spacingMpc;
        if (Math.abs(q) > eastSlope * p + reach || Math.abs(t) > northSlope * p + reach) continue;
        const x = p * along[0] + q * east[0] + t * north[0];
        const y = p * along[1] + q * east[1] + t * north[1];
        const z = p * along[2] + q * east[2] + t * north[2];
        plan.web.settle(x, y, z, site);
        corners.set(site, corner * CHANNELS);
        const [sx, sy, sz] = [site[SITE.x]!, site[SITE.y]!, site[SITE.z]!];
        const depth = along[0] * sx + along[1] * sy + along[2] * sz;
        slopes[2 * corner] = (east[0] * sx + east[1] * sy + east[2] * sz) / depth;
        slopes[2 * corner + 1] = (north[0] * sx + north[1] * sy + north[2] * sz) / depth;
      }
    }
  }
  return { corners, slopes };
}

/** The cells that send galaxies into the field: number of the first corner, weight, greatest share kept inside. */
function usefulCells(plan: SitesPlan, lattice: Lattice, { corners, slopes }: FollowedCorners) {
  const { axis, sky } = plan;
  const { low, spacingMpc } = lattice;
  const [nx, ny, nz] = lattice.corners;
  const [eastSlope, northSlope] = halfSlopes(sky, lattice);
  const steps = [0, 1, nz, nz + 1, ny * nz, ny * nz + 1, ny * nz + nz, ny * nz + nz + 1];
  const room = (nx - 1) * (ny - 1) * (nz - 1);
  const cells = new Uint32Array(room);
  const most = new Float32Array(room);
  const weights = new Float64Array(room);
  let found = 0;
  const farthest = axis.fromMpc + (axis.redshift.length - 1) * axis.stepMpc;
  for (let a = 0; a < nx - 1; a++) {
    const p = low[0] + (a + 0.5) * spacingMpc;
    for (let b = 0; b < ny - 1; b++) {
      const q = low[1] + (b + 0.5) * spacingMpc;
      for (let c = 0; c < nz - 1; c++) {
        const t = low[2] + (c + 0.5) * spacingMpc;
        const r = Math.sqrt(p * p + q * q + t * t);
        if (r <= axis.fromMpc || r >= farthest) continue;
        const first = (a * ny + b) * nz + c;
        let eastLow = Infinity;
        let eastHigh = -Infinity;
        let northLow = Infinity;
        let northHigh = -Infinity;
        let densest = -Infinity;
        for (let i = 0; i < 8; i++) {
          const corner = first + steps[i]!;
          // A corner that was not followed is NaN; so is then a bound, and the cell is left out below.
          eastLow = Math.min(eastLow, slopes[2 * corner]!);
          eastHigh = Math.max(eastHigh, slopes[2 * corner]!);
          northLow = Math.min(northLow, slopes[2 * corner + 1]!);
          northHigh = Math.max(northHigh, slopes[2 * corner + 1]!);
          densest = Math.max(densest, corners[corner * CHANNELS + SITE.logDensity]!);
        }
        if (!(eastLow < eastSlope && eastHigh > -eastSlope)) continue;
        if (!(northLow < northSlope && northHigh > -northSlope)) continue;
        cells[found] = first;
        most[found] = keptShare(densest);
        weights[found] = most[found]! * onAxis(axis, plan.countPerVolume, r);
        found++;
      }
    }
  }
  return { cells: cells.slice(0, found), most: most.slice(0, found), weights: weights.slice(0, found) };
}
