import type { Catalogue } from '../../../shared-core/catalogue/catalogue.ts';
import { select } from '../../../shared-core/catalogue/select.ts';
import { cos, sin } from '../../../shared-core/numerics/elementary/elementary.ts';
import { type SortedSample, sortSample } from '../../../shared-core/shells/sample.ts';
import { compileRegion } from '../../../shared-core/sky/compileRegion.ts';
import { estimateFootprint } from '../../../shared-core/sky/estimate.ts';
import { footprintFields } from '../../../shared-core/sky/fields.ts';
import type { Footprint } from '../../../shared-core/sky/region.ts';
import type { FootprintPicture, Selected, Wanted } from '../protocol.ts';
import type { StageTools } from '../surroundings.ts';

/** The galaxies of the catalogue inside region and cuts, sorted by redshift, with the footprint they are in. */
export async function selectGalaxies(
  catalogue: Catalogue,
  { region, cuts }: Pick<Wanted, 'region' | 'cuts'>,
  { floats, share, pause }: StageTools,
): Promise<Selected> {
  const given = region === null ? null : compileRegion(region);
  const { indices, account, cutCounts } = select(
    catalogue,
    given === null ? null : (ra, dec) => given.contains(ra, dec),
    cuts,
  );
  await pause();
  const estimated = given ?? estimateOf(catalogue, indices);
  const footprint = estimated === null ? null : picture(estimated);
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

function estimateOf(catalogue: Catalogue, indices: Uint32Array): Footprint | null {
  if (indices.length === 0) return null;
  return estimateFootprint(
    Float64Array.from(indices, (i) => catalogue.raDeg[i]!),
    Float64Array.from(indices, (i) => catalogue.decDeg[i]!),
  );
}

function picture(footprint: Footprint): FootprintPicture {
  return {
    origin: footprint.origin,
    areaDeg2: footprint.areaDeg2,
    estimate: footprint.estimate,
    rings: footprint.outline(),
    fields: footprintFields(footprint),
  };
}
