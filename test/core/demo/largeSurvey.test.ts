import { beforeAll, describe, expect, it } from 'vitest';
import { DEFAULT_SEED, makeDemoSurvey } from '../../../shared-core/demo/demoSurvey.ts';
import { makeLargeSurvey } from '../../../shared-core/demo/largeSurvey.ts';
import { asciiText } from '../../../shared-core/demo/rowWriter.ts';
import { DEMO_COLUMNS, FIELDS } from '../../../shared-core/demo/scenario.ts';
import { countsInCells, fieldOf, placesIn, readDemo } from './readDemo.ts';

/** Enough for the lattice to be used. */
const COUNT = 210_000;
const MIDDLE = { raDeg: 212, decDeg: 12 };

/** Correlation of counts in 40 Mpc cells of the wide field between z 0.6 and 1. */
async function correlation(one: Iterable<string | Uint8Array>, other: Iterable<string | Uint8Array>) {
  const counts = async (chunks: Iterable<string | Uint8Array>) =>
    countsInCells(
      placesIn((await readDemo(chunks)).catalogue, 0, MIDDLE),
      [2300, -300, -120],
      [25, 15, 6],
      40,
    );
  const [a, b] = [await counts(one), await counts(other)];
  const mean = (values: Float64Array) => values.reduce((sum, v) => sum + v, 0) / values.length;
  const [ma, mb] = [mean(a), mean(b)];
  let [ab, aa, bb] = [0, 0, 0];
  for (let i = 0; i < a.length; i++) {
    ab += (a[i]! - ma) * (b[i]! - mb);
    aa += (a[i]! - ma) ** 2;
    bb += (b[i]! - mb) ** 2;
  }
  return ab / Math.sqrt(aa * bb);
}

describe('makeLargeSurvey', () => {
  let chunks: Uint8Array[];
  beforeAll(() => {
    chunks = [...makeLargeSurvey(COUNT)];
  });

  it('makes as many good rows as asked for, in chunks of whole lines', async () => {
    expect(chunks.length).toBe(5);
    for (const chunk of chunks) expect(chunk.at(-1)).toBe(10);
    expect(asciiText(chunks[0]!.subarray(0, 60)).split('\n')[0]).toBe(DEMO_COLUMNS.join(','));
    const { catalogue } = await readDemo(chunks);
    expect(catalogue.account).toMatchObject({ rowsRead: COUNT, kept: COUNT, setAside: 0 });
  });

  it('is the universe of the demo survey with more galaxies, not another one', async () => {
    // Chance in counts of a few a cell keeps the correlation below 1; unlike universes have none.
    expect(await correlation([makeDemoSurvey().csv], chunks)).toBeGreaterThan(0.6);
    const other = makeLargeSurvey(30_000, DEFAULT_SEED + 1);
    expect(Math.abs(await correlation(other, chunks))).toBeLessThan(0.15);
  });

  it('makes the same bytes from the same seed', () => {
    const [again] = makeLargeSurvey(COUNT);
    expect(Buffer.compare(again!, chunks[0]!)).toBe(0);
  });

  it('shows every field and all depths from the first chunk on', async () => {
    const { catalogue } = await readDemo([chunks[0]!]);
    expect(catalogue.account.kept).toBe(50_000);
    const counts = FIELDS.map(() => [0, 0]);
    for (let i = 0; i < catalogue.raDeg.length; i++) {
      const pair = counts[fieldOf(catalogue.raDeg[i]!, catalogue.decDeg[i]!)]!;
      const far = catalogue.redshift[i]! > 1.1 ? 1 : 0;
      pair[far] = pair[far]! + 1;
    }
    for (const [near, far] of counts) {
      expect(near).toBeGreaterThan(500);
      expect(far).toBeGreaterThan(500);
    }
  });

  it('makes a survey of one galaxy', async () => {
    const { catalogue } = await readDemo(makeLargeSurvey(1));
    expect(catalogue.account.kept).toBe(1);
  });

  it.each([0, -3, 1.5, 1e9, Number.NaN])('refuses %s galaxies with a sentence', (count) => {
    expect(() => makeLargeSurvey(count)).toThrow(
      /galaxies was asked for; give a whole number from 1 to 99999999/,
    );
  });

  it('refuses a seed that is none with a sentence, before anything is made', () => {
    expect(() => makeLargeSurvey(10, 0.5)).toThrow(/The seed is 0.5.* give a whole number/);
  });
});
