import type { Command } from 'commander';
import { CoordinateWriter } from '../../../shared-core/report/coordinates.ts';
import { describeAccount, describeColumns, describeCosmology } from '../../../shared-core/report/notes.ts';
import {
  addCatalogueOptions,
  type CatalogueOptions,
  listPlaces,
  readCatalogue,
} from '../catalogueOptions.ts';
import { addCosmologyOptions, type CosmologyOptions, cosmologyOf } from '../cosmologyOptions.ts';
import { outputPlaces } from '../outputPlaces.ts';
import { addRegionOptions, type RegionOptions, regionFiles, regionOf } from '../region.ts';
import { OutputFile } from '../writeOutput.ts';

interface CoordinatesOptions extends CatalogueOptions, RegionOptions, CosmologyOptions {
  output: string;
  hUnits?: true;
}

/** conewright coordinates: comoving x, y, z and times of every row, streamed. */
export function addCoordinates(program: Command, say: (text: string) => void): void {
  const command = program
    .command('coordinates')
    .argument('<file>', 'catalogue: CSV or TSV, plain or gzip')
    .description(
      'comoving x, y, z, lookback time and age of every row (x to RA 0 Dec 0, y to RA 90 Dec 0, z to Dec +90)',
    )
    .requiredOption('-o, --output <file>', 'CSV file to write');
  addCatalogueOptions(command);
  addRegionOptions(command);
  addCosmologyOptions(command);
  command
    .option('--h-units', 'lengths in Mpc/h instead of Mpc')
    .addHelpText(
      'after',
      '\nExample:\n  npm run -s conewright -- coordinates survey.csv -o positions.csv --cosmology wmap9',
    )
    .action(async (file: string, options: CoordinatesOptions) => {
      const { cosmology, set } = cosmologyOf(options);
      const overwrite = options.overwrite === true;
      const places = await outputPlaces(
        { '--output': options.output, ...listPlaces(options) },
        [file, ...regionFiles(options)],
        { overwrite },
      );
      const given = await regionOf(options);
      const writer = new CoordinateWriter(cosmology, options.hUnits === true);
      const output = await OutputFile.begin(places['--output'], { overwrite });
      let begun = false;
      try {
        const { catalogue, mapping } = await readCatalogue(file, options, {
          footprint: given?.footprint ?? null,
          places,
          onKept: (row) => {
            if (!begun) output.addText(writer.header(row.id !== null));
            begun = true;
            output.addText(writer.line(row));
          },
        });
        if (!begun) output.addText(writer.header(false));
        await output.finish();
        say(`${options.output}: ${catalogue.account.kept} rows. ${describeAccount(catalogue.account)}`);
        say(describeColumns(mapping));
        say(describeCosmology(cosmology, set));
      } catch (error) {
        await output.abandon();
        throw error;
      }
    });
}
