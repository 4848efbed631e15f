import { cos, exp, sin } from '../numerics/elementary/elementary.ts';
import type { Random } from '../numerics/random.ts';
import { RAD_PER_DEG } from '../sky/vectors.ts';
import { SITE, type Web } from './cosmicWeb.ts';
import { type DepthAxis, onAxis, reachDeg } from './depthAxis.ts';
import { type FieldSky, widenedHalfRaDeg, widenedSr } from './fieldSky.ts';
import { createRadialSampler } from './radialSampler.ts';

/** Finds places of galaxies in and around one field. */
export interface Sites {
  /** Fills `site` (see SITE) with the next place. */
  draw(site: Float64Array): void;
}

/** What decides where the galaxies of a field are. */
export interface SitesPlan {
  readonly sky: FieldSky;
  readonly axis: DepthAxis;
  readonly web: Web;
  /** Galaxies per comoving volume at the knots of the axis, up to a constant. */
  readonly countPerVolume: Float64Array;
  readonly random: Random;
}

const FULL_LOG_DENSITY = 3;
const BIAS_POWER = 0.8;

/** Galaxies shun thin places: kept with probability (density / full density)^power, at most 1. */
export function keptShare(logDensity: number): number {
  return logDensity >= FULL_LOG_DENSITY ? 1 : exp(BIAS_POWER * (logDensity - FULL_LOG_DENSITY));
}

/** Starts matter evenly in and around the field and follows each piece: right for up to some 100 000 galaxies. */
export function followedSites(plan: SitesPlan): Sites {
  const { sky, axis, web, random } = plan;
  const marginDeg = new Float64Array(axis.redshift.length);
  const startWeight = new Float64Array(axis.redshift.length);
  for (let i = 0; i < startWeight.length; i++) {
    const r = axis.fromMpc + i * axis.stepMpc;
    marginDeg[i] = reachDeg(r);
    startWeight[i] = plan.countPerVolume[i]! * r * r * widenedSr(sky, marginDeg[i]!);
  }
  const distances = createRadialSampler(axis, startWeight);
  return {
    draw(site) {
      for (;;) {
        const r = distances.distanceMpc(random.uniform());
        const up = 2 * random.uniform() - 1;
        const aside = 2 * random.uniform() - 1;
        // The corners of the box around a round field are too far away to matter.
        if (sky.round && up * up + aside * aside > 1) continue;
        const margin = onAxis(axis, marginDeg, r);
        const dec = sky.middleDecDeg + up * (sky.halfDecDeg + margin);
        const cosDec = cos(dec * RAD_PER_DEG);
        // Even in sin(Dec) by rejection: a uniform Dec is thinned by its cosine.
        if (random.uniform() > cosDec) continue;
        const ra = sky.middleRaDeg + aside * widenedHalfRaDeg(sky, margin);
        const x = r * cosDec * cos(ra * RAD_PER_DEG);
        const y = r * cosDec * sin(ra * RAD_PER_DEG);
        web.settle(x, y, r * sin(dec * RAD_PER_DEG), site);
        if (random.uniform() < keptShare(site[SITE.logDensity]!)) return;
      }
    },
  };
}
