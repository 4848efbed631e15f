import { acos } from '../numerics/elementary/elementary.ts';
import { type Arc, arcExtent } from './arc.ts';
import type { Vec3 } from './vectors.ts';

/** Nearer than this to a cap's or polygon's edge counts as on it: 2e-8 arcseconds, a hundred times the rounding. */
export const EDGE_TOLERANCE_RAD = 1e-13;

/** Regions below 1e-9 square degrees (a tenth of an arcsecond across) are taken for an error: no area. */
export const SMALLEST_AREA_SR = 3e-13;

/** 1 inside, 0 on the boundary, -1 outside. */
export type Side = -1 | 0 | 1;

/** A single shape made ready. */
export interface CompiledShape {
  /** The boundary: closed rings of arcs, interior on the left seen from outside. None for the whole sky. */
  readonly arcs: readonly Arc[];
  readonly areaSr: number;
  /** A cap that holds the shape. */
  readonly centre: Vec3;
  readonly radiusRad: number;
  /** raDeg in [0, 360), decDeg in [-90, 90]. */
  side(raDeg: number, decDeg: number): Side;
}

/** Room for the rounding of acos near 0 and pi. */
const BOUND_PADDING_RAD = 1e-7;

/** Radius of the cap about `centre` that holds a shape with this boundary; pi when the shape holds -centre. */
export function boundingRadius(centre: Vec3, arcs: readonly Arc[], holdsAntipode: boolean): number {
  if (holdsAntipode || arcs.length === 0) return Math.PI;
  let least = 1;
  for (const arc of arcs) least = Math.min(least, arcExtent(arc, centre).min);
  return Math.min(Math.PI, acos(Math.max(-1, least)) + BOUND_PADDING_RAD);
}
