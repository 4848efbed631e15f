import { cos, sin } from '../numerics/elementary/elementary.ts';
import { cross, dot, RAD_PER_DEG, raDecToUnit, type Vec3 } from '../sky/vectors.ts';
import { type DepthAxis, reachDeg } from './depthAxis.ts';
import { type FieldSky, widenedHalfRaDeg } from './fieldSky.ts';

/** A box of cubic cells along the middle line of a field. */
export interface Lattice {
  /** Unit vectors of the sky's frame: away from the observer, east, north. */
  readonly axes: readonly [along: Vec3, east: Vec3, north: Vec3];
  /** The first corner, along those axes (Mpc). */
  readonly low: readonly [number, number, number];
  /** Corners along each axis. */
  readonly corners: readonly [number, number, number];
  readonly spacingMpc: number;
}

/** The lattice that holds every place from which matter may come into the field. */
export function latticeAround(sky: FieldSky, axis: DepthAxis, spacingMpc: number): Lattice {
  const ra = sky.middleRaDeg * RAD_PER_DEG;
  const along = raDecToUnit(sky.middleRaDeg, sky.middleDecDeg);
  const east: Vec3 = [-sin(ra), cos(ra), 0];
  const axes = [along, east, cross(along, east)] as const;
  const low: [number, number, number] = [Infinity, Infinity, Infinity];
  const high: [number, number, number] = [-Infinity, -Infinity, -Infinity];
  const farMpc = axis.fromMpc + (axis.redshift.length - 1) * axis.stepMpc;
  for (const r of [axis.fromMpc, farMpc]) {
    edgePlaces(sky, reachDeg(r), (direction) => {
      axes.forEach((one, k) => {
        const place = r * dot(one, direction);
        low[k] = Math.min(low[k]!, place);
        high[k] = Math.max(high[k]!, place);
      });
    });
  }
  const corners = (k: 0 | 1 | 2) => Math.ceil((high[k] - low[k]) / spacingMpc) + 2;
  return { axes, low, corners: [corners(0), corners(1), corners(2)], spacingMpc };
}

/** Greatest slopes east/along and north/along within the field: half the opening of its needle. */
export function halfSlopes(sky: FieldSky, lattice: Lattice): [east: number, north: number] {
  const [along, east, north] = lattice.axes;
  const most: [number, number] = [0, 0];
  edgePlaces(sky, 0, (direction) => {
    const depth = dot(along, direction);
    most[0] = Math.max(most[0], Math.abs(dot(east, direction)) / depth);
    most[1] = Math.max(most[1], Math.abs(dot(north, direction)) / depth);
  });
  return most;
}

/** Visits directions spread over the box around the field, its rim included. */
function edgePlaces(sky: FieldSky, marginDeg: number, visit: (direction: Vec3) => void): void {
  const halfRa = widenedHalfRaDeg(sky, marginDeg);
  const halfDec = sky.halfDecDeg + marginDeg;
  for (let i = -4; i <= 4; i++) {
    for (let j = -4; j <= 4; j++) {
      visit(raDecToUnit(sky.middleRaDeg + (i / 4) * halfRa, sky.middleDecDeg + (j / 4) * halfDec));
    }
  }
}
