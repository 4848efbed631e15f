import { createCosmology } from '../../../shared-core/cosmology/cosmology.ts';
import type { CosmologyParameters } from '../../../shared-core/cosmology/parameters.ts';
import type { SortedSample } from '../../../shared-core/shells/sample.ts';
import type { Background } from '../protocol.ts';
import type { StageTools } from '../surroundings.ts';

const GALAXIES_A_STEP = 1 << 18;

/** Comoving distance and lookback time of every galaxy of the sample. */
export async function distances(
  { count, redshift }: SortedSample,
  cosmology: CosmologyParameters,
  { floats, pause }: StageTools,
): Promise<Background> {
  const table = createCosmology(cosmology).table();
  const comovingMpc = floats(count);
  const lookbackGyr = floats(count);
  for (let from = 0; from < count; from += GALAXIES_A_STEP) {
    const z = redshift.subarray(from, from + GALAXIES_A_STEP);
    const distance = new Float64Array(z.length);
    const time = new Float64Array(z.length);
    table.fill(z, distance, time);
    comovingMpc.set(distance, from);
    lookbackGyr.set(time, from);
    await pause();
  }
  return { comovingMpc, lookbackGyr };
}
