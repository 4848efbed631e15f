import type { Command } from 'commander';
import { Refusal } from '../../../shared-core/base/refusal.ts';
import type { LoadedCatalogue } from '../../../shared-core/catalogue/loadCatalogue.ts';
import { columnNamed } from '../../../shared-core/catalogue/mapping.ts';
import { LEDGER_QUANTITIES } from '../../../shared-core/report/ledgerQuantities.ts';
import { describeAccount } from '../../../shared-core/report/notes.ts';
import { shellsJson } from '../../../shared-core/report/shellsJson.ts';
import { shellsTable } from '../../../shared-core/report/shellsTable.ts';
import { edgesOf } from '../../../shared-core/shells/edges.ts';
import { sortSample } from '../../../shared-core/shells/sample.ts';
import type { ShellScheme } from '../../../shared-core/shells/shell.ts';
import {
  allAsOne,
  DEFAULT_P0_MPC3_PER_H3,
  type ShellConditions,
  shellStatistics,
} from '../../../shared-core/shells/statistics.ts';
import { estimateFootprint } from '../../../shared-core/sky/estimate.ts';
import {
  addCatalogueOptions,
  type CatalogueOptions,
  listPlaces,
  readCatalogue,
} from '../catalogueOptions.ts';
import { addCosmologyOptions, type CosmologyOptions, cosmologyOf } from '../cosmologyOptions.ts';
import { numberList, oneNumber } from '../numbers.ts';
import { outputPlaces } from '../outputPlaces.ts';
import { addOutputOptions, formatOf, type OutputOptions, render } from '../outputs.ts';
import { addRegionOptions, type RegionOptions, regionFiles, regionOf } from '../region.ts';

interface ShellsOptions extends CatalogueOptions, RegionOptions, CosmologyOptions, OutputOptions {
  edges?: number[];
  shells?: Exclude<ShellScheme, { kind: 'edges' }>;
  zRange?: number[];
  p0: number;
  allColumns?: true;
}

const DEFAULT_SHELLS = { kind: 'redshift', shells: 5, zMin: null, zMax: null } as const;

/** conewright shells: a catalogue cut into redshift shells, and what each is worth. */
export function addShells(program: Command, print: (text: string) => void): void {
  const command = program
    .command('shells')
    .argument('<file>', 'catalogue: CSV or TSV, plain or gzip')
    .description('cut a catalogue into redshift shells and say what each is worth');
  addCatalogueOptions(command);
  addRegionOptions(command);
  command
    .option('--edges <z,...>', 'redshift edges of the shells', numberList('--edges'))
    .option(
      '--shells <scheme:n>',
      'n shells equal in redshift, comoving (thickness), lookback, volume or count, such as volume:4 (redshift:5 if nothing is given)',
      parseScheme,
    )
    .option(
      '--z-range <z,z>',
      'where the scheme begins and ends (the least and greatest redshift kept if not given)',
      numberList('--z-range'),
    )
    .option(
      '--p0 <n>',
      'power at which effective volume and redshift are taken, (Mpc/h)^3',
      oneNumber('--p0'),
      DEFAULT_P0_MPC3_PER_H3,
    );
  addOutputOptions(addCosmologyOptions(command)).option(
    '--all-columns',
    'with --latex: every quantity, not only those of the ledger',
  );
  command
    .addHelpText(
      'after',
      '\nExample:\n  npm run -s conewright -- shells survey.csv --region box:130,230,-2,30 --shells volume:4 --h-units',
    )
    .action(async (file: string, options: ShellsOptions) => {
      const { cosmology, set } = cosmologyOf(options);
      const scheme = schemeOf(options);
      if (formatOf(options) !== 'latex' && options.allColumns)
        throw new Refusal(
          '--all-columns came without --latex, and every other form has all columns anyway: leave it out, or add --latex.',
          'use',
        );
      const places = await outputPlaces(listPlaces(options), [file, ...regionFiles(options)], {
        overwrite: options.overwrite === true,
      });
      const given = await regionOf(options);
      tryOnNothing(scheme, {
        cosmology,
        areaDeg2: given?.footprint.areaDeg2 ?? 1,
        p0Mpc3PerH3: options.p0,
      });
      const loaded = await readCatalogue(file, options, {
        footprint: given?.footprint ?? null,
        places,
      });
      const { catalogue } = loaded;
      if (catalogue.account.kept === 0) throw new Refusal(nothingLeft(loaded));
      const footprint = given?.footprint ?? estimateFootprint(catalogue.raDeg, catalogue.decDeg);
      const sample = sortSample(catalogue.redshift, catalogue.weight);
      const edges = edgesOf(scheme, sample, cosmology);
      const conditions = { cosmology, areaDeg2: footprint.areaDeg2, p0Mpc3PerH3: options.p0 };
      const table = shellsTable({
        shells: shellStatistics(sample, edges, conditions),
        all: allAsOne(sample, edges, conditions),
        units: { perH: options.hUnits === true, h: cosmology.h },
        account: catalogue.account,
        mapping: loaded.mapping,
        cuts: (options.cut ?? []).map((cut) => ({ ...cut, column: columnNamed(loaded.header, cut.column) })),
        region: given?.region ?? null,
        footprint,
        cosmology,
        set,
        p0Mpc3PerH3: options.p0,
      });
      const shown =
        options.latex && !options.allColumns ? { ...table, quantities: LEDGER_QUANTITIES } : table;
      print(render(shown, options, () => shellsJson(table)));
    });
}

/** Tries the options on no galaxies at all: what is wrong in them is told before a long file is read. */
function tryOnNothing(scheme: ShellScheme, conditions: ShellConditions): void {
  const nothing = sortSample(new Float64Array(0), null);
  const bounded: ShellScheme =
    scheme.kind === 'edges'
      ? scheme
      : {
          ...scheme,
          kind: scheme.kind === 'count' ? 'redshift' : scheme.kind,
          // Any range serves where the sample's own is not known yet.
          zMin: scheme.zMin ?? 0.001,
          zMax: scheme.zMax ?? 0.002,
        };
  shellStatistics(nothing, edgesOf(bounded, nothing, conditions.cosmology), conditions);
}

function schemeOf({ edges, shells, zRange }: ShellsOptions): ShellScheme {
  if (edges !== undefined) {
    if (shells !== undefined || zRange !== undefined)
      throw new Refusal(
        '--edges came with --shells or --z-range, which would place the edges too: give one of them.',
        'use',
      );
    return { kind: 'edges', edges };
  }
  const [zMin, zMax, ...rest] = zRange ?? [null, null];
  if (zMin === undefined || zMax === undefined || rest.length > 0)
    throw new Refusal(`--z-range is "${zRange?.join(',')}", expected two redshifts such as 0.6,1.2.`, 'use');
  return { ...(shells ?? DEFAULT_SHELLS), zMin, zMax };
}

function parseScheme(text: string): Exclude<ShellScheme, { kind: 'edges' }> {
  const [, kind, count] = /^(redshift|comoving|lookback|volume|count):(\d{1,6})$/.exec(text) ?? [];
  if (kind === undefined)
    throw new Refusal(
      `--shells is "${text}", expected redshift:N, comoving:N, lookback:N, volume:N or count:N, such as volume:4.`,
      'use',
    );
  return { kind: kind as 'redshift', shells: Number(count), zMin: null, zMax: null };
}

function nothingLeft({ catalogue }: LoadedCatalogue): string {
  const { account } = catalogue;
  if (account.rowsRead === 0) return 'The catalogue has a header and no rows: nothing can be measured.';
  return `No row of the catalogue can be used. ${describeAccount(account)} Check --columns, --region and --cut.`;
}
