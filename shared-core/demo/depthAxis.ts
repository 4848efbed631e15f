import { SPEED_OF_LIGHT_KM_S } from '../cosmology/constants.ts';
import type { Cosmology } from '../cosmology/cosmology.ts';
import { DEG_PER_RAD } from '../sky/vectors.ts';
import { characteristicMag } from './galaxyBrightness.ts';
import { SELECTION_REDSHIFTS } from './scenario.ts';

const STEP_MPC = 10;
/** Hardly any matter moves farther than this before it comes to rest. */
export const REACH_MPC = 72;

/** The angle of that reach at a comoving distance. */
export function reachDeg(comovingMpc: number): number {
  return (REACH_MPC / comovingMpc) * DEG_PER_RAD;
}

/** What depends on distance alone, tabulated in even steps of comoving distance. */
export interface DepthAxis {
  readonly fromMpc: number;
  readonly stepMpc: number;
  readonly redshift: Float64Array;
  /** dz/dr = H(z) / c, per Mpc. */
  readonly slopePerMpc: Float64Array;
  /** Apparent magnitude of an L* galaxy. */
  readonly characteristicMag: Float64Array;
}

/** Covers the survey's redshifts and the reach of the flow on both sides. */
export function createDepthAxis(cosmology: Cosmology): DepthAxis {
  const fromMpc = cosmology.comovingMpc(SELECTION_REDSHIFTS[0]) - 2 * REACH_MPC;
  const toMpc = cosmology.comovingMpc(SELECTION_REDSHIFTS[3]) + 2 * REACH_MPC;
  const knots = Math.ceil((toMpc - fromMpc) / STEP_MPC) + 1;
  const redshift = new Float64Array(knots);
  const slopePerMpc = new Float64Array(knots);
  const characteristic = new Float64Array(knots);
  for (let i = 0; i < knots; i++) {
    const z = cosmology.redshiftAtComovingMpc(fromMpc + i * STEP_MPC);
    redshift[i] = z;
    slopePerMpc[i] = cosmology.hubbleKmSMpc(z) / SPEED_OF_LIGHT_KM_S;
    characteristic[i] = characteristicMag(cosmology, z);
  }
  return { fromMpc, stepMpc: STEP_MPC, redshift, slopePerMpc, characteristicMag: characteristic };
}

/** Redshift a part t (0 to 1) of the way from knot i to the next: cubic Hermite, within 1e-9 of the integral. */
export function redshiftBetween(axis: DepthAxis, i: number, t: number): number {
  const s = 1 - t;
  return (
    s * s * (1 + 2 * t) * axis.redshift[i]! +
    t * t * (3 - 2 * t) * axis.redshift[i + 1]! +
    axis.stepMpc * s * t * (s * axis.slopePerMpc[i]! - t * axis.slopePerMpc[i + 1]!)
  );
}

/** A column of the axis at a comoving distance (Mpc), linear between the knots. */
export function onAxis(axis: DepthAxis, column: Float64Array, comovingMpc: number): number {
  const at = (comovingMpc - axis.fromMpc) / axis.stepMpc;
  const i = Math.floor(at);
  return column[i]! + (at - i) * (column[i + 1]! - column[i]!);
}
