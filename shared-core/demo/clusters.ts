import { cbrt, pow } from '../numerics/elementary/elementary.ts';
import type { Random } from '../numerics/random.ts';

/** Galaxies that share a knot of the web. A lone galaxy is a cluster of one. */
export interface Cluster {
  members: number;
  /** The members lie within this radius, their density falling as 1/r^2; comoving. */
  radiusMpc: number;
  /** Spread of their velocities along the line of sight. */
  dispersionKmS: number;
}

/** Only where the flow has gathered this much matter, natural logarithm over the mean. */
const KNOT_LOG_DENSITY = 3.5;
/** Share of galaxies at such places that turn out to be the seed of a cluster. */
const SEED_SHARE = 0.022;
const LEAST_MEMBERS = 6;
const MOST_MEMBERS = 110;
/** Number of clusters richer than N falls as N^-slope. */
const RICHNESS_SLOPE = 1.1;
/** Velocities of lone galaxies: the more matter around, the faster, as in groups too small to tell apart. */
const CALM_KM_S = 80;
const STIRRED_KM_S = 28;

/**
 * Decides what a galaxy belongs to, from the matter gathered at its place.
 *
 * Sizes go as the cube root of the richness (equal densities), velocities as its 0.4th power, up to 700 km/s:
 * the fingers that point at the observer.
 *
 * @param memberScale factor on the number of members that are bright enough to be seen
 */
export function drawCluster(logDensity: number, memberScale: number, random: Random, cluster: Cluster): void {
  if (logDensity < KNOT_LOG_DENSITY || random.uniform() >= SEED_SHARE) {
    cluster.members = 1;
    cluster.radiusMpc = 0;
    cluster.dispersionKmS = CALM_KM_S + STIRRED_KM_S * Math.min(6, Math.max(0, logDensity - 1));
    return;
  }
  const rich = Math.min(MOST_MEMBERS, LEAST_MEMBERS * pow(1 - random.uniform(), -1 / RICHNESS_SLOPE));
  const times = rich / LEAST_MEMBERS;
  cluster.members = Math.max(1, Math.round(rich * memberScale));
  cluster.radiusMpc = 1.1 * cbrt(times);
  cluster.dispersionKmS = 220 * pow(times, 0.4);
}
