import { SPEED_OF_LIGHT_KM_S } from '../cosmology/constants.ts';
import { asin, atan2, cos, sin, square } from '../numerics/elementary/elementary.ts';
import type { Random } from '../numerics/random.ts';
import { DEG_PER_RAD } from '../sky/vectors.ts';
import { type Cluster, drawCluster } from './clusters.ts';
import { SITE, type Web } from './cosmicWeb.ts';
import { type DepthAxis, onAxis, redshiftBetween } from './depthAxis.ts';
import { createFieldSky } from './fieldSky.ts';
import { brightnessAbove } from './galaxyBrightness.ts';
import type { GalaxyColumns } from './galaxyColumns.ts';
import { createPointings } from './pointings.ts';
import { REDSHIFT_ERROR, type SurveyField, selectedShare } from './scenario.ts';
import type { Sites, SitesPlan } from './sites.ts';

/** Looks at one field. */
export interface Observer {
  /** Galaxies to expect, up to a constant that all fields share. */
  readonly expected: number;
  /** Fills the rows from `from` up to `to` with galaxies, cluster by cluster, in no other order. */
  observe(columns: GalaxyColumns, from: number, to: number): void;
}

/** The universe that all fields look into. */
export interface Universe {
  readonly axis: DepthAxis;
  readonly web: Web;
  /** How places of galaxies are found. */
  readonly sites: (plan: SitesPlan) => Sites;
  /** Galaxies per volume (as `brightnessAbove` counts) where clusters show the members that they are drawn with. */
  readonly unitCount: number;
  /** Factor on the members of every cluster, for larger surveys of the same universe. */
  readonly richness: number;
}

/** Coherent motions as a share of the flow: small, because the flow is stronger than nature's. */
const COHERENT_SHARE = 0.32;
/** Positions are kept as the file writes them, so that the region holds for the rows. */
const POSITION_STEPS = 1e6;

export function createObserver(field: SurveyField, universe: Universe, random: Random): Observer {
  const { axis, web } = universe;
  const sky = createFieldSky(field);
  const pointings = createPointings(field, sky, random);
  const knots = axis.redshift.length;
  const brightness = brightnessAbove(field.depthMag, axis.characteristicMag);
  const memberScale = new Float64Array(knots);
  let expected = 0;
  for (let i = 0; i < knots; i++) {
    const r = axis.fromMpc + i * axis.stepMpc;
    const count = brightness.count[i]!;
    memberScale[i] = (universe.richness * count) / universe.unitCount;
    expected += count * r * r * sky.areaSr * selectedShare(axis.redshift[i]!);
  }
  const sites = universe.sites({ sky, axis, web, countPerVolume: brightness.count, random });
  const nearestMpc = axis.fromMpc;
  const farthestMpc = axis.fromMpc + (knots - 1) * axis.stepMpc;
  const site = new Float64Array(SITE.size);
  const cluster: Cluster = { members: 0, radiusMpc: 0, dispersionKmS: 0 };

  /**
   * Measures a galaxy near the site; false when it lies outside the field or was not measured.
   * @param spread of its redshift, in units of 1 + z
   */
  function measure(columns: GalaxyColumns, row: number, spread: number): boolean {
    let x = site[SITE.x]!;
    let y = site[SITE.y]!;
    let z = site[SITE.z]!;
    if (cluster.radiusMpc > 0) {
      const u = cluster.radiusMpc * random.uniform();
      const polar = 2 * random.uniform() - 1;
      const across = Math.sqrt(1 - polar * polar);
      const turn = 2 * Math.PI * random.uniform();
      x += u * across * cos(turn);
      y += u * across * sin(turn);
      z += u * polar;
    }
    const r = Math.sqrt(x * x + y * y + z * z);
    if (!(r > nearestMpc && r < farthestMpc)) return false;
    const ra = atan2(y, x) * DEG_PER_RAD;
    const raDeg = Math.round((ra < 0 ? ra + 360 : ra) * POSITION_STEPS) / POSITION_STEPS;
    const decDeg = Math.round(asin(z / r) * DEG_PER_RAD * POSITION_STEPS) / POSITION_STEPS;
    if (!sky.contains(raDeg, decDeg)) return false;

    const at = (r - axis.fromMpc) / axis.stepMpc;
    const knot = Math.floor(at) | 0;
    const part = at - knot;
    const cosmological = redshiftBetween(axis, knot, part);
    const selected = selectedShare(cosmological);
    if (selected < 1 && random.uniform() >= selected) return false;
    const magnitude = brightness.magnitude(knot, part, random.uniform());
    const success = pointings.success(raDeg, decDeg, magnitude);
    if (random.uniform() >= success) return false;

    // Redshift space: dz = H s / c for a coherent displacement s, and (1 + z) v / c for velocities of its own.
    const coherent = COHERENT_SHARE * site[SITE.flowAlong]! * axis.slopePerMpc[knot]!;
    const measured = cosmological + coherent + (1 + cosmological) * spread * random.normal();

    // Two kinds of galaxies: red ones crowd where matter does.
    const redShare = Math.min(0.85, Math.max(0.15, 0.2 * site[SITE.logDensity]! - 0.25));
    const red = random.uniform() < redShare;
    const colour =
      (red ? 1.3 : 0.6) + (red ? 0.5 : 0.3) * cosmological + (red ? 0.1 : 0.22) * random.normal();

    columns.raDeg[row] = raDeg;
    columns.decDeg[row] = decDeg;
    columns.redshift[row] = measured;
    columns.magnitude[row] = magnitude;
    columns.colour[row] = colour;
    columns.weight[row] = 1 / success;
    return true;
  }

  return {
    expected,
    observe(columns, from, to) {
      let row = from;
      while (row < to) {
        sites.draw(site);
        const r = Math.sqrt(square(site[SITE.x]!) + square(site[SITE.y]!) + square(site[SITE.z]!));
        if (!(r > nearestMpc && r < farthestMpc)) continue;
        drawCluster(site[SITE.logDensity]!, onAxis(axis, memberScale, r), random, cluster);
        const velocity = cluster.dispersionKmS / SPEED_OF_LIGHT_KM_S;
        // Velocities of their own and errors of measurement together, in units of 1 + z
        const spread = Math.sqrt(velocity * velocity + REDSHIFT_ERROR * REDSHIFT_ERROR);
        for (let i = 0; i < cluster.members && row < to; i++) {
          if (measure(columns, row, spread)) row++;
        }
      }
    },
  };
}
