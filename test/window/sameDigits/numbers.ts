import { createCosmology } from '../../../shared-core/cosmology/cosmology.ts';
import { PUBLISHED_SETS } from '../../../shared-core/cosmology/publishedSets.ts';
import { makeDemoSurvey } from '../../../shared-core/demo/demoSurvey.ts';
import { distanceRows } from '../../../shared-core/report/distanceQuantities.ts';
import { sortSample } from '../../../shared-core/shells/sample.ts';
import { shellStatistics } from '../../../shared-core/shells/statistics.ts';
import { compileRegion } from '../../../shared-core/sky/compileRegion.ts';
import { parseRegionShape } from '../../../shared-core/sky/regionText.ts';
import { CASES, checksum, evaluations } from '../../core/numerics/elementary/evaluations.ts';

/** The core's numbers as text, to be compared between engines to the last digit. */
export function numbers(): string {
  const region = compileRegion({
    parts: ['box:350,20,-5,12', 'cap:25,3,9.5', 'polygon:0,0,30,-4,28,20'].map(parseRegionShape),
    holes: ['cap:10,2,1.25'].map(parseRegionShape),
  });
  const redshift = Float64Array.from({ length: 5000 }, (_, i) => 0.1 + 1.4 * ((i * 0.6180339887498949) % 1));
  const sample = sortSample(redshift, null);
  const ledgers = PUBLISHED_SETS.map(({ key, parameters }) => {
    const cosmology = createCosmology(parameters);
    return {
      key,
      rows: distanceRows(cosmology, [0, 1e-6, 0.05, 0.5, 1, 3, 9.5, 1089.92]),
      shells: shellStatistics(sample, [0.1, 0.35, 0.8, 1.5], {
        cosmology,
        areaDeg2: region.areaDeg2,
        p0Mpc3PerH3: 10_000,
      }),
    };
  });
  const rings = region.outline().map((ring) => [checksum(ring.raDeg), checksum(ring.decDeg)]);
  const { csv } = makeDemoSurvey();
  const demo = checksum(Float64Array.from(csv, (letter) => letter.charCodeAt(0)));
  const elementary = Object.keys(CASES).map((name) => [name, checksum(evaluations(name, 200_000))]);
  return JSON.stringify({ elementary, areaDeg2: region.areaDeg2, rings, demo, ledgers });
}
