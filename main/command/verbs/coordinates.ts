import type { Command } from 'commander';
import { CoordinateWriter } from '../../../shared-core/report/coordinates.ts';
import { describeAccount } from '../../../shared-core/report/notes.ts';
import { addCatalogueOptions, type CatalogueOptions, readCatalogue } from '../catalogueOptions.ts';
import { addCosmologyOptions, type CosmologyOptions, cosmologyOf } from '../cosmologyOptions.ts';
import { fromHere } from '../files.ts';
import { PieceQueue } from '../pieceQueue.ts';
import { addRegionOptions, type RegionOptions, regionOf } from '../region.ts';
import { writeOutput } from '../writeOutput.ts';

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
      const { cosmology, line: cosmologyLine } = cosmologyOf(options);
      const given = await regionOf(options);
      const writer = new CoordinateWriter(cosmology, options.hUnits === true);
      const queue = new PieceQueue();
      const writing = writeOutput(fromHere(options.output), queue, { overwrite: options.overwrite === true });
      let begun = false;
      try {
        const { catalogue } = await readCatalogue(file, options, given?.footprint ?? null, {
          onKept: (row) => {
            if (!begun) queue.add(writer.header(row.id !== null));
            begun = true;
            queue.add(writer.line(row));
          },
        });
        if (!begun) queue.add(writer.header(false));
        queue.end();
        await writing;
        say(`${options.output}: ${catalogue.account.kept} rows. ${describeAccount(catalogue.account)}`);
        say(cosmologyLine);
      } catch (error) {
        queue.fail(error);
        await writing.catch(() => undefined);
        throw error;
      }
    });
}
