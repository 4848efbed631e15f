import { createCosmology } from '../../../shared-core/cosmology/cosmology.ts';
import { findPublishedSet } from '../../../shared-core/cosmology/publishedSets.ts';
import { sortSample } from '../../../shared-core/shells/sample.ts';
import { type ShellConditions, shellStatistics } from '../../../shared-core/shells/statistics.ts';

/** Round cosmology of no paper, so that h = 0.7 exactly. */
export const cosmology = createCosmology(findPublishedSet('flat70').parameters);

export const conditions: ShellConditions = { cosmology, areaDeg2: 100, p0Mpc3PerH3: 10_000 };

/** `count` galaxies evenly in redshift between two edges. */
export function evenly(count: number, from: number, to: number): Float64Array {
  return Float64Array.from({ length: count }, (_, i) => from + ((to - from) * (i + 0.5)) / count);
}

/** The shells of a sample between edges, by the core. */
export function shellsOf(redshift: Float64Array, edges: readonly number[], area = conditions.areaDeg2) {
  return shellStatistics(sortSample(redshift, null), edges, { ...conditions, areaDeg2: area });
}
