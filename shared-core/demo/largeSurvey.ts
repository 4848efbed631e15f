import { Refusal } from '../base/refusal.ts';
import { createRandom } from '../numerics/random.ts';
import { DEFAULT_SEED } from './demoSurvey.ts';
import { createGalaxyColumns } from './galaxyColumns.ts';
import { latticeSites } from './latticeSites.ts';
import { RowWriter } from './rowWriter.ts';
import { FIELDS } from './scenario.ts';
import { followedSites } from './sites.ts';
import { openSurvey, shuffleRows } from './survey.ts';

const MOST_GALAXIES = 99_999_999;
const BATCH = 50_000;
/** From here on working out a lattice costs less than following each galaxy's own matter. */
const LATTICE_FROM = 200_000;
/** The number of galaxies at which clusters have the members of the demo survey. */
const DEMO_GALAXIES = 60_000;

/**
 * The demo survey with as many galaxies as wanted, for the same fields of the same universe: chunks of one CSV file
 * with the demo's columns, the header in the first, each chunk ending with a line. No row is spoiled.
 *
 * Every chunk holds galaxies of all fields and depths. Memory does not grow with the count: some 100 MB.
 *
 * @param count galaxies, a whole number from 1 to 99 999 999
 * @param seed whole number from 0 to 2^32 - 1
 * @throws Refusal for a count or seed out of range
 */
export function makeLargeSurvey(
  count: number,
  seed: number = DEFAULT_SEED,
): Generator<Uint8Array<ArrayBuffer>, void, void> {
  if (!Number.isInteger(count) || count < 1 || count > MOST_GALAXIES) {
    throw new Refusal(
      `A survey of ${count} galaxies was asked for; give a whole number from 1 to ${MOST_GALAXIES}.`,
      'use',
    );
  }
  // Refuses a bad seed at once, not at the first chunk.
  createRandom(seed);
  return chunks(count, seed);
}

function* chunks(count: number, seed: number): Generator<Uint8Array<ArrayBuffer>, void, void> {
  // More galaxies are both more clusters and more members of each.
  const richness = Math.sqrt(Math.max(1, count / DEMO_GALAXIES));
  const survey = openSurvey(seed, richness, count < LATTICE_FROM ? followedSites : latticeSites);
  const galaxies = createGalaxyColumns(Math.min(BATCH, count));
  const fieldOf = new Float64Array(galaxies.raDeg.length);
  const columns = { ...galaxies, fieldOf };
  const writer = new RowWriter(galaxies.raDeg.length);
  writer.header();
  for (let made = 0; made < count; ) {
    const rows = Math.min(BATCH, count - made);
    let from = 0;
    survey.share(rows).forEach((share, i) => {
      survey.observers[i]!.observe(galaxies, from, from + share);
      fieldOf.fill(i, from, from + share);
      from += share;
    });
    shuffleRows(columns, 0, rows, survey.random);
    for (let row = 0; row < rows; row++) writer.galaxy(galaxies, row, FIELDS[fieldOf[row]!]!.name);
    made += rows;
    yield writer.take();
  }
}
