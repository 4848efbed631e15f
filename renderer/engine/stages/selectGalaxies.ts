import type { Catalogue } from '../../../shared-core/catalogue/catalogue.ts';
import { select } from '../../../shared-core/catalogue/select.ts';
import { cos, sin } from '../../../shared-core/numerics/elementary/elementary.ts';
import { type SortedSample, sortSample } from '../../../shared-core/shells/sample.ts';
import { estimateFootprint } from '../../../shared-core/sky/estimate.ts';
import type { FootprintPicture, Selected, Wanted } from '../protocol.ts';
import { footprintPicture, type ReadyRegion } from '../regionReady.ts';
import type { StageTools } from '../surroundings.ts';

/**
 * The galaxies of the catalogue inside region and cuts, sorted by redshift, with the footprint they are in.
 *
 * @param given null where the region is to be estimated
 */
export async function selectGalaxies(
  catalogue: Catalogue,
  given: ReadyRegion | null,
  cuts: Wanted['cuts'],
  { floats, share, pause }: StageTools,
): Promise<Selected> {
  const { indices, account, cutCounts } = select(
    catalogue,
    given === null ? null : (ra, dec) => given.footprint.contains(ra, dec),
    cuts,
  );
  await pause();
  const footprint = given === null ? estimateOf(catalogue, indices) : given.picture;
  await pause();
  const sample = share(sortSample(catalogue.redshift, catalogue.weight, indices));
  await pause();
  return { account, cutCounts, footprint, sample, ...places(catalogue, sample, floats) };
}

/** Where the galaxies of the sample stand, and how bright they are. */
function places(
  catalogue: Catalogue,
  { count, order }: SortedSample,
  floats: StageTools['floats'],
): Pick<Selected, 'directions' | 'raDeg' | 'decDeg' | 'magnitude'> {
  const directions = { x: floats(count), y: floats(count), z: floats(count) };
  const raDeg = floats(count);
  const decDeg = floats(count);
  const magnitude = catalogue.magnitude === null ? null : floats(count);
  for (let i = 0; i < count; i++) {
    const row = order[i]!;
    const ra = (catalogue.raDeg[row]! * Math.PI) / 180;
    const dec = (catalogue.decDeg[row]! * Math.PI) / 180;
    const across = cos(dec);
    directions.x[i] = across * cos(ra);
    directions.y[i] = across * sin(ra);
    directions.z[i] = sin(dec);
    raDeg[i] = catalogue.raDeg[row]!;
    decDeg[i] = catalogue.decDeg[row]!;
    if (magnitude !== null) magnitude[i] = catalogue.magnitude![row]!;
  }
  return { directions, raDeg, decDeg, magnitude };
}

function estimateOf(catalogue: Catalogue, indices: Uint32Array): FootprintPicture | null {
  if (indices.length === 0) return null;
  const estimate = estimateFootprint(
    Float64Array.from(indices, (i) => catalogue.raDeg[i]!),
    Float64Array.from(indices, (i) => catalogue.decDeg[i]!),
  );
  return footprintPicture(estimate);
}
