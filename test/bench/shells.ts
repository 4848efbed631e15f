import { createCosmology } from '../../shared-core/cosmology/cosmology.ts';
import { findPublishedSet } from '../../shared-core/cosmology/publishedSets.ts';
import { sortSample } from '../../shared-core/shells/sample.ts';
import { shellStatistics } from '../../shared-core/shells/statistics.ts';

const COUNT = 1_000_000;

/** An edge dragged over a million galaxies, beside counting every galaxy anew as a script would. */
export async function bench() {
  const cosmology = createCosmology(findPublishedSet('planck2018').parameters);
  const redshift = Float64Array.from({ length: COUNT }, (_, i) => 0.5 + 1.5 * ((i * 0.6180339887498949) % 1));
  const conditions = { cosmology, areaDeg2: 1000, p0Mpc3PerH3: 10_000 };
  const edges = Array.from({ length: 11 }, (_, i) => 0.5 + 0.15 * i);
  const sortStart = performance.now();
  const sample = sortSample(redshift, null);
  const sortSeconds = (performance.now() - sortStart) / 1000;

  const moves = 50;
  const moved = (i: number) => edges.with(5, 1.25 + 0.001 * i);
  for (let i = 0; i < 10; i++) shellStatistics(sample, moved(i), conditions);
  const start = performance.now();
  for (let i = 0; i < moves; i++) shellStatistics(sample, moved(i), conditions);
  const seconds = (performance.now() - start) / 1000 / moves;

  const scanStart = performance.now();
  const counts = new Float64Array(10);
  for (const z of redshift)
    for (let s = 0; s < 10; s++) if (z >= edges[s]! && z < edges[s + 1]!) counts[s]!++;
  const scanSeconds = (performance.now() - scanStart) / 1000;
  return {
    name: `An edge moved, ten shells, ${COUNT} galaxies`,
    rows: [
      { what: 'counting every galaxy anew (counts alone)', seconds: scanSeconds, ratio: 1 },
      { what: 'the whole ledger from running sums', seconds, ratio: scanSeconds / seconds },
      {
        what: 'sorting and summing, once a catalogue',
        seconds: sortSeconds,
        ratio: scanSeconds / sortSeconds,
      },
    ],
  };
}
