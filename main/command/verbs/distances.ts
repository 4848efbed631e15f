import type { Command } from 'commander';
import { DISTANCE_QUANTITIES, distanceRows } from '../../../shared-core/report/distanceQuantities.ts';
import { describeCosmology } from '../../../shared-core/report/notes.ts';
import { asObjects } from '../../../shared-core/report/table.ts';
import { addCosmologyOptions, type CosmologyOptions, cosmologyOf } from '../cosmologyOptions.ts';
import { numberList } from '../numbers.ts';
import { addOutputOptions, type OutputOptions, render } from '../outputs.ts';

/** conewright distances: distances, times and volumes at given redshifts. */
export function addDistances(program: Command, print: (text: string) => void): void {
  const command = program
    .command('distances')
    .description('distances, times and volumes at given redshifts')
    .requiredOption('--z <z,...>', 'redshifts, separated by commas', numberList('--z'));
  addOutputOptions(addCosmologyOptions(command));
  command
    .addHelpText(
      'after',
      '\nExample:\n  npm run -s conewright -- distances --z 0.5,1.4 --cosmology planck2018 --w0 -0.9',
    )
    .action((options: { z: number[] } & CosmologyOptions & OutputOptions) => {
      const { cosmology, set } = cosmologyOf(options);
      const table = {
        rows: distanceRows(cosmology, options.z),
        quantities: DISTANCE_QUANTITIES,
        units: { perH: options.hUnits === true, h: cosmology.h },
        notes: [describeCosmology(cosmology, set)],
      };
      print(render(table, options, () => asObjects(table)));
    });
}
