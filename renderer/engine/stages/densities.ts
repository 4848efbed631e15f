import type { Catalogue } from '../../../shared-core/catalogue/catalogue.ts';
import { createCosmology } from '../../../shared-core/cosmology/cosmology.ts';
import type { CosmologyParameters } from '../../../shared-core/cosmology/parameters.ts';
import { localDensity } from '../../../shared-core/shells/localDensity.ts';
import type { SortedSample } from '../../../shared-core/shells/sample.ts';
import type { StageTools } from '../surroundings.ts';

/** The local density around every galaxy of the sample. */
export async function densities(
  { raDeg, decDeg }: Catalogue,
  { count, redshift, order }: SortedSample,
  cosmology: CosmologyParameters,
  { floats, pause }: StageTools,
): Promise<Float32Array> {
  const comovingMpc = new Float64Array(count);
  createCosmology(cosmology).table().fill(redshift, comovingMpc, null);
  await pause();
  const density = floats(count);
  density.set(localDensity(raDeg, decDeg, order, comovingMpc));
  return density;
}
