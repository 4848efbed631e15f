import type { ColumnMapping } from '../catalogue/catalogue.ts';
import type { Region, SkyShape } from '../sky/region.ts';

/*
 * The scenario. Observatory, survey, fields and galaxies are invented; no real survey, sky area or instrument is meant.
 */

export const DEMO_NAME = 'Ostrewick depth survey (invented)';

export const DEMO_DESCRIPTION =
  'An invented survey of an invented universe, made by code from a seed for trying the program: ' +
  'the observatory of Ostrewick does not exist, and neither do its galaxies. ' +
  'One wide field with a hole around a bright star, two small deep fields, and some spoiled rows as in real files.';

/** What the demo's first shells are cut at. */
export const DEMO_EDGES: readonly number[] = [0.5, 0.7, 0.9, 1.1, 1.4, 2];

/** One piece of sky that the invented observatory looked at. */
export interface SurveyField {
  readonly name: string;
  readonly shape: Extract<SkyShape, { kind: 'box' | 'cap' }>;
  /** The faintest magnitude measured here. */
  readonly depthMag: number;
  /** Share of galaxies whose redshift was measured, in the worst and the best pointing. */
  readonly completeness: readonly [worst: number, best: number];
}

export const FIELDS: readonly SurveyField[] = [
  {
    name: 'wide',
    shape: { kind: 'box', raMinDeg: 202, raMaxDeg: 222, decMinDeg: 7, decMaxDeg: 17 },
    depthMag: 21.9,
    completeness: [0.72, 0.97],
  },
  {
    name: 'deep-south',
    shape: { kind: 'cap', raDeg: 71.5, decDeg: -38.25, radiusDeg: 1.2 },
    depthMag: 24,
    completeness: [0.88, 0.97],
  },
  {
    name: 'deep-north',
    shape: { kind: 'cap', raDeg: 318.75, decDeg: 27.5, radiusDeg: 1.2 },
    depthMag: 24,
    completeness: [0.88, 0.97],
  },
];

/** No galaxy is measured this near the (invented) star, in the wide field. */
export const BRIGHT_STAR = { kind: 'cap', raDeg: 215.4, decDeg: 13.1, radiusDeg: 0.65 } as const;

export const DEMO_REGION: Region = { parts: FIELDS.map((field) => field.shape), holes: [BRIGHT_STAR] };

/**
 * Galaxies are chosen for follow-up by colour, which lets redshifts in gradually: none below the first number, all
 * from the second to the third, none above the fourth.
 */
export const SELECTION_REDSHIFTS = [0.5, 0.58, 1.85, 2.05] as const;

/** Share of galaxies at a redshift that are let in. */
export function selectedShare(z: number): number {
  const [none, all, last, end] = SELECTION_REDSHIFTS;
  if (z <= none || z >= end) return 0;
  if (z < all) return smoothStep((z - none) / (all - none));
  return z > last ? smoothStep((end - z) / (end - last)) : 1;
}

function smoothStep(t: number): number {
  return t * t * (3 - 2 * t);
}

/** Pointings of the spectrograph are squares of this many degrees. */
export const POINTING_DEG = 2;

/** One measurement's error of the redshift, in units of 1 + z. */
export const REDSHIFT_ERROR = 0.0003;

/** Columns of the file, in order. */
export const DEMO_COLUMNS = ['id', 'ra', 'dec', 'z', 'mag', 'colour', 'weight', 'field'] as const;

export const DEMO_MAPPING: ColumnMapping = {
  ra: 'ra',
  dec: 'dec',
  radial: { column: 'z', kind: 'redshift' },
  weight: 'weight',
  magnitude: 'mag',
  id: 'id',
};
