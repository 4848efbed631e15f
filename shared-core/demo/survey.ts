import { createCosmology } from '../cosmology/cosmology.ts';
import { findPublishedSet } from '../cosmology/publishedSets.ts';
import { createRandom, type Random } from '../numerics/random.ts';
import { drawCosmicWeb } from './cosmicWeb.ts';
import { createDepthAxis } from './depthAxis.ts';
import { brightnessAbove, characteristicMag } from './galaxyBrightness.ts';
import type { GalaxyColumns } from './galaxyColumns.ts';
import { createObserver, type Observer, type Universe } from './observer.ts';
import { FIELDS, SELECTION_REDSHIFTS } from './scenario.ts';

/** The survey underway: an observer for each field, and how the galaxies are shared out among them. */
export interface Survey {
  readonly observers: readonly Observer[];
  /** Whole numbers for the fields that add up to `total`, in proportion to what each field sees. */
  share(total: number): number[];
  /** For choices that belong to no field. */
  readonly random: Random;
}

/**
 * Sets the survey up in the universe that the seed stands for.
 *
 * @param seed whole number from 0 to 2^32 - 1
 * @param richness factor on the members of every cluster
 * @param sites how places of galaxies are found
 */
export function openSurvey(seed: number, richness: number, sites: Universe['sites']): Survey {
  const cosmology = createCosmology(findPublishedSet('planck2018').parameters);
  const fullMag = characteristicMag(cosmology, SELECTION_REDSHIFTS[1]);
  const universe: Universe = {
    axis: createDepthAxis(cosmology),
    web: drawCosmicWeb(createRandom([seed, 1])),
    sites,
    unitCount: brightnessAbove(FIELDS[0]!.depthMag, Float64Array.of(fullMag)).count[0]!,
    richness,
  };
  const observers = FIELDS.map((field, i) => createObserver(field, universe, createRandom([seed, 2, i])));
  const sum = observers.reduce((total, observer) => total + observer.expected, 0);
  return {
    observers,
    random: createRandom([seed, 3]),
    share(total) {
      const counts = observers.map((observer) => Math.floor((total * observer.expected) / sum));
      counts[0] = total - counts.slice(1).reduce((a, b) => a + b, 0);
      return counts;
    },
  };
}

/** Puts the rows from `from` up to `to` in a random order (Fisher & Yates 1938), all columns alike. */
export function shuffleRows(columns: GalaxyColumns, from: number, to: number, random: Random): void {
  const all = Object.values(columns) as Float64Array[];
  for (let i = to - 1; i > from; i--) {
    const j = from + random.integer(i - from + 1);
    for (const column of all) {
      const value = column[i]!;
      column[i] = column[j]!;
      column[j] = value;
    }
  }
}
