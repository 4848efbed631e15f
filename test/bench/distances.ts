import { createCosmology } from '../../shared-core/cosmology/cosmology.ts';
import { findPublishedSet } from '../../shared-core/cosmology/publishedSets.ts';
import { createRandom } from '../../shared-core/numerics/random.ts';

const GALAXIES = 10_000_000;
const DIRECT = 20_000;

/** Ten million redshifts to comoving distance and lookback time: the table against quadrature for each galaxy. */
export async function bench(): Promise<{
  name: string;
  rows: { what: string; seconds: number; ratio: number }[];
}> {
  const cosmology = createCosmology(findPublishedSet('planck2018').parameters);
  const random = createRandom(1);
  const redshift = Float64Array.from({ length: GALAXIES }, () => 0.01 + 2 * random.uniform());
  const comovingMpc = new Float64Array(GALAXIES);
  const lookbackGyr = new Float64Array(GALAXIES);

  const beforeTable = performance.now();
  const table = cosmology.table();
  const built = (performance.now() - beforeTable) / 1000;
  table.fill(
    redshift.subarray(0, 100_000),
    comovingMpc.subarray(0, 100_000),
    lookbackGyr.subarray(0, 100_000),
  );

  const beforeFill = performance.now();
  table.fill(redshift, comovingMpc, lookbackGyr);
  const filled = (performance.now() - beforeFill) / 1000;

  const beforeDirect = performance.now();
  let difference = 0;
  for (let i = 0; i < DIRECT; i++) {
    const z = redshift[i]!;
    difference = Math.max(
      difference,
      Math.abs(comovingMpc[i]! / cosmology.comovingMpc(z) - 1),
      Math.abs(lookbackGyr[i]! / cosmology.lookbackGyr(z) - 1),
    );
  }
  const direct = (((performance.now() - beforeDirect) / 1000) * GALAXIES) / DIRECT;

  return {
    name: `Distances and lookback times of ${GALAXIES} galaxies, Planck 2018 (greatest relative difference ${difference.toExponential(1)})`,
    rows: [
      { what: `quadrature for each galaxy (scaled from ${DIRECT})`, seconds: direct, ratio: 1 },
      { what: 'build the table', seconds: built, ratio: direct / built },
      { what: 'read the table', seconds: filled, ratio: direct / filled },
    ],
  };
}
