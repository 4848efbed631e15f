import type { Command } from 'commander';
import type { Cut, SetAsideRow } from '../../shared-core/catalogue/catalogue.ts';
import { parseColumnMap } from '../../shared-core/catalogue/columnMap.ts';
import type { LoadedCatalogue, LoadOptions } from '../../shared-core/catalogue/loadCatalogue.ts';
import { loadCatalogue } from '../../shared-core/catalogue/loadCatalogue.ts';
import { findRepeats } from '../../shared-core/catalogue/positions.ts';
import { REPEATS_HEADER, repeatLines } from '../../shared-core/catalogue/repeatsCsv.ts';
import { checkCuts } from '../../shared-core/catalogue/selection.ts';
import { SET_ASIDE_HEADER, setAsideLine } from '../../shared-core/catalogue/setAsideCsv.ts';
import type { Footprint } from '../../shared-core/sky/region.ts';
import { parseCut } from './cuts.ts';
import { fileBytes, fromHere, readableSize } from './files.ts';
import { progressBar } from './progress.ts';
import { OutputFile } from './writeOutput.ts';

export interface CatalogueOptions {
  columns?: string;
  cut?: Cut[];
  setAside?: string;
  repeats?: string;
  overwrite?: true;
}

/** The options of every verb that reads a catalogue. */
export function addCatalogueOptions(command: Command): Command {
  return command
    .option(
      '--columns <map>',
      'which column is what: ra=RA,dec=DEC,cz=V,mag=Mag (keys ra, dec, z, cz, weight, mag, id)',
    )
    .option(
      '--cut <column:min..max>',
      'keep rows whose number lies in the range, bounds included; an end may be left out; repeat it for several',
      (text: string, before: Cut[] = []) => [...before, parseCut(text)],
    )
    .option(
      '--set-aside <file>',
      'write the rows that are not used there (CSV), each with its line, name and reason',
    )
    .option(
      '--repeats <file>',
      'write the kept rows that repeat the position of an earlier one there (CSV), each with its line, name and the line it repeats',
    )
    .option('--overwrite', 'replace output files that exist');
}

export interface CatalogueReading extends Pick<LoadOptions, 'onKept'> {
  readonly footprint: Footprint | null;
  /** Absolute paths of the lists that are asked for, as outputPlaces gives them. */
  readonly places: Readonly<Partial<Record<keyof ReturnType<typeof listPlaces>, string>>>;
}

/** Where the lists of rows are to be written, by option. */
export function listPlaces({ setAside, repeats }: CatalogueOptions) {
  return { '--set-aside': setAside, '--repeats': repeats };
}

/** Reads a catalogue file under the options, with a progress bar, and writes the lists that are asked for. */
export async function readCatalogue(
  file: string,
  options: CatalogueOptions,
  { footprint, places, onKept }: CatalogueReading,
): Promise<LoadedCatalogue> {
  const path = fromHere(file);
  const mapping = options.columns === undefined ? undefined : parseColumnMap(options.columns);
  const cuts = options.cut ?? [];
  checkCuts(cuts);
  const size = await readableSize(path);
  const bar = progressBar(`Reading ${file}`);
  const begin = async (place: string | undefined): Promise<OutputFile | null> =>
    place === undefined ? null : OutputFile.begin(place, { overwrite: options.overwrite === true });
  const list = await begin(places['--set-aside']);
  let repeats: OutputFile | null = null;
  try {
    repeats = await begin(places['--repeats']);
    list?.addText(SET_ASIDE_HEADER);
    const loaded = await loadCatalogue(fileBytes(path), {
      mapping,
      cuts,
      contains: footprint === null ? null : (ra, dec) => footprint.contains(ra, dec),
      onProgress: (bytesRead) => bar.update(bytesRead / size),
      onSetAside: list === null ? undefined : (row: SetAsideRow) => list.addText(setAsideLine(row)),
      onKept,
    });
    if (repeats !== null) await addRepeats(repeats, loaded, async () => fileBytes(path));
    await list?.finish();
    await repeats?.finish();
    return loaded;
  } catch (error) {
    await list?.abandon();
    await repeats?.abandon();
    throw error;
  } finally {
    bar.end();
  }
}

async function addRepeats(
  output: OutputFile,
  { catalogue, mapping }: LoadedCatalogue,
  open: () => Promise<AsyncIterable<Uint8Array>>,
): Promise<void> {
  output.addText(REPEATS_HEADER);
  const found = findRepeats(catalogue.raDeg, catalogue.decDeg);
  for await (const line of repeatLines(catalogue, found, { mapping, open })) output.addText(line);
}
