import type { ColumnMapping, RowAccount, SetAsideReason } from '../catalogue/catalogue.ts';
import { DECIMAL_POINTS } from '../catalogue/formats/delimited/decimals.ts';
import type { Random } from '../numerics/random.ts';
import type { Region } from '../sky/region.ts';
import { createGalaxyColumns, type GalaxyColumns } from './galaxyColumns.ts';
import { asciiText, cellsOf, RowWriter } from './rowWriter.ts';
import { DEMO_DESCRIPTION, DEMO_EDGES, DEMO_MAPPING, DEMO_NAME, DEMO_REGION, FIELDS } from './scenario.ts';
import { followedSites } from './sites.ts';
import { FAULTS, type Fault } from './spoiledRows.ts';
import { openSurvey, shuffleRows } from './survey.ts';

/** The universe that the program starts with. */
export const DEFAULT_SEED = 12;
const GALAXIES = 60_000;
/** Galaxies that were measured twice. */
const REPEATED = 26;

/** An invented survey, ready to be read like any file. */
export interface DemoSurvey {
  readonly name: string;
  readonly description: string;
  readonly seed: number;
  /** The file as text: ASCII, a header, comma-separated, lines ended by a line feed. */
  readonly csv: string;
  readonly columns: ColumnMapping;
  readonly region: Region;
  /** Redshifts of the first shells. */
  readonly edges: readonly number[];
  /** What reading the file with these columns and this region must account for. */
  readonly account: RowAccount;
}

/**
 * Makes the demo survey: 60 000 galaxies between z 0.5 and 2.1 in three fields, and rows to be set aside.
 *
 * The same seed gives the same bytes on every machine: random numbers and elementary functions are the core's own.
 *
 * @param seed whole number from 0 to 2^32 - 1
 * @throws Refusal for another seed
 */
export function makeDemoSurvey(seed: number = DEFAULT_SEED): DemoSurvey {
  const survey = openSurvey(seed, 1, followedSites);
  const spoiled = FAULTS.reduce((sum, fault) => sum + fault.rows, 0);
  const rows = GALAXIES + spoiled;
  const galaxies = createGalaxyColumns(rows);
  const counts = survey.share(rows);
  for (let i = 0, from = 0; i < counts.length; from += counts[i]!, i++) {
    survey.observers[i]!.observe(galaxies, from, from + counts[i]!);
    shuffleRows(galaxies, from, from + counts[i]!, survey.random);
  }
  const faultOf = chooseRowsToSpoil(rows, survey.random);
  repeatPositions(galaxies, counts[0]!, faultOf, survey.random);
  return {
    name: DEMO_NAME,
    description: DEMO_DESCRIPTION,
    seed,
    csv: write(galaxies, counts, faultOf, survey.random),
    columns: DEMO_MAPPING,
    region: DEMO_REGION,
    edges: DEMO_EDGES,
    account: {
      rowsRead: rows,
      kept: GALAXIES,
      setAside: spoiled,
      reasons: countReasons(),
      repeatedPositions: REPEATED,
      decimals: DECIMAL_POINTS,
    },
  };
}

function chooseRowsToSpoil(rows: number, random: Random): Map<number, Fault> {
  const faultOf = new Map<number, Fault>();
  for (const fault of FAULTS) {
    for (let left = fault.rows; left > 0; ) {
      const row = random.integer(rows);
      if (faultOf.has(row)) continue;
      faultOf.set(row, fault);
      left--;
    }
  }
  return faultOf;
}

/** Gives some good rows the position of an earlier good row: pointings of the wide field overlap. */
function repeatPositions(
  galaxies: GalaxyColumns,
  wideRows: number,
  faultOf: ReadonlyMap<number, Fault>,
  random: Random,
): void {
  const taken = new Set<number>();
  while (taken.size < REPEATED) {
    const row = 1 + random.integer(wideRows - 1);
    const source = random.integer(row);
    if (faultOf.has(row) || faultOf.has(source) || taken.has(row) || taken.has(source)) continue;
    taken.add(row);
    galaxies.raDeg[row] = galaxies.raDeg[source]!;
    galaxies.decDeg[row] = galaxies.decDeg[source]!;
    galaxies.redshift[row] = galaxies.redshift[source]! + 0.0004 * random.normal();
    galaxies.magnitude[row] = galaxies.magnitude[source]!;
    galaxies.colour[row] = galaxies.colour[source]!;
    galaxies.weight[row] = galaxies.weight[source]!;
  }
}

function write(
  galaxies: GalaxyColumns,
  counts: readonly number[],
  faultOf: ReadonlyMap<number, Fault>,
  random: Random,
): string {
  const writer = new RowWriter(galaxies.raDeg.length);
  writer.header();
  let row = 0;
  counts.forEach((count, i) => {
    const field = FIELDS[i]!.name;
    for (let end = row + count; row < end; row++) {
      const fault = faultOf.get(row);
      if (fault) writer.cells(fault.spoil(cellsOf(galaxies, row, field), random));
      else writer.galaxy(galaxies, row, field);
    }
  });
  return asciiText(writer.take());
}

function countReasons(): Partial<Record<SetAsideReason, number>> {
  const reasons: Partial<Record<SetAsideReason, number>> = {};
  for (const { reason, rows } of FAULTS) reasons[reason] = (reasons[reason] ?? 0) + rows;
  return reasons;
}
