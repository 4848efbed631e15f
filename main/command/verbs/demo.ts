import { readFile } from 'node:fs/promises';
import { join } from 'node:path';
import type { Command } from 'commander';
import { loadCatalogue } from '../../../shared-core/catalogue/loadCatalogue.ts';
import { SET_ASIDE_HEADER, setAsideLine } from '../../../shared-core/catalogue/setAsideCsv.ts';
import { createCosmology } from '../../../shared-core/cosmology/cosmology.ts';
import { findPublishedSet } from '../../../shared-core/cosmology/publishedSets.ts';
import { makeDemoSurvey } from '../../../shared-core/demo/demoSurvey.ts';
import { LEDGER_QUANTITIES } from '../../../shared-core/report/ledgerQuantities.ts';
import { shellsJson } from '../../../shared-core/report/shellsJson.ts';
import { shellsTable } from '../../../shared-core/report/shellsTable.ts';
import { asCsv, asEcsv, asLatex, asText } from '../../../shared-core/report/table.ts';
import { sortSample } from '../../../shared-core/shells/sample.ts';
import { allAsOne, DEFAULT_P0_MPC3_PER_H3, shellStatistics } from '../../../shared-core/shells/statistics.ts';
import { compileRegion } from '../../../shared-core/sky/compileRegion.ts';
import { formatShape } from '../../../shared-core/sky/regionText.ts';
import { fromHere } from '../files.ts';
import { oneNumber } from '../numbers.ts';
import { outputPlaces } from '../outputPlaces.ts';
import { writeOutput } from '../writeOutput.ts';

/** conewright demo: the invented survey as files, measured, its ledger printed. */
export function addDemo(program: Command, print: (text: string) => void, say: (text: string) => void): void {
  program
    .command('demo')
    .description('write an invented survey and its shell tables to a folder, and print the ledger')
    .requiredOption('-o, --output <folder>', 'folder to write to; made if it is not there')
    .option('--seed <n>', 'another invented universe', oneNumber('--seed'))
    .option('--overwrite', 'replace files of the same names')
    .addHelpText('after', '\nExample:\n  npm run -s conewright -- demo -o conewright-demo')
    .action(async (options: { output: string; seed?: number; overwrite?: true }) => {
      const survey = makeDemoSurvey(options.seed);
      const set = findPublishedSet('planck2018');
      const cosmology = createCosmology(set.parameters);
      const footprint = compileRegion(survey.region);
      let setAside = SET_ASIDE_HEADER;
      const { catalogue, mapping } = await loadCatalogue(once(survey.csv), {
        mapping: survey.columns,
        contains: (ra, dec) => footprint.contains(ra, dec),
        onSetAside: (row) => {
          setAside += setAsideLine(row);
        },
      });
      const sample = sortSample(catalogue.redshift, catalogue.weight);
      const conditions = { cosmology, areaDeg2: footprint.areaDeg2, p0Mpc3PerH3: DEFAULT_P0_MPC3_PER_H3 };
      const bare = shellsTable({
        shells: shellStatistics(sample, survey.edges, conditions),
        all: allAsOne(sample, survey.edges, conditions),
        units: { perH: false, h: cosmology.h },
        account: catalogue.account,
        mapping,
        cuts: [],
        region: survey.region,
        footprint,
        cosmology,
        set,
        p0Mpc3PerH3: DEFAULT_P0_MPC3_PER_H3,
      });
      const table = { ...bare, notes: [`${survey.name}. ${survey.description}`, ...bare.notes] };
      const text = asText(table);
      const files: Record<string, string> = {
        'catalogue.csv': survey.csv,
        'region.txt': `${[...survey.region.parts.map((s) => `--region ${formatShape(s)}`), ...survey.region.holes.map((s) => `--hole ${formatShape(s)}`)].join('\n')}\n`,
        'set-aside.csv': setAside,
        'shells.txt': text,
        'shells.csv': asCsv(table),
        'shells.ecsv': asEcsv(table),
        'shells.tex': asLatex({ ...table, quantities: LEDGER_QUANTITIES }),
        'shells.json': `${JSON.stringify(shellsJson(table), null, 2)}\n`,
      };
      await writeNew(options.output, files, options.overwrite === true);
      print(text);
      say(`Written to ${options.output}: ${Object.keys(files).join(', ')}.`);
    });
}

/** Writes those files that do not stand there already as they would be written. */
async function writeNew(
  folder: string,
  files: Readonly<Record<string, string>>,
  overwrite: boolean,
): Promise<void> {
  const wanted: Record<string, string> = {};
  for (const [name, content] of Object.entries(files)) {
    const there = await readFile(fromHere(join(folder, name)), 'utf8').catch(() => null);
    if (there !== content) wanted[name] = join(folder, name);
  }
  const places = await outputPlaces(wanted, [], { overwrite });
  for (const [name, place] of Object.entries(places)) await writeOutput(place, [files[name]!], { overwrite });
}

async function* once(text: string): AsyncIterable<Uint8Array> {
  yield new TextEncoder().encode(text);
}
