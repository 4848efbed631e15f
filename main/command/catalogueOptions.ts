import type { Command } from 'commander';
import type { Cut, SetAsideRow } from '../../shared-core/catalogue/catalogue.ts';
import { parseColumnMap } from '../../shared-core/catalogue/columnMap.ts';
import type { LoadedCatalogue, LoadOptions } from '../../shared-core/catalogue/loadCatalogue.ts';
import { loadCatalogue } from '../../shared-core/catalogue/loadCatalogue.ts';
import { SET_ASIDE_HEADER, setAsideLine } from '../../shared-core/catalogue/setAsideCsv.ts';
import type { Footprint } from '../../shared-core/sky/region.ts';
import { parseCut } from './cuts.ts';
import { fileBytes, fromHere, readableSize } from './files.ts';
import { PieceQueue } from './pieceQueue.ts';
import { progressBar } from './progress.ts';
import { writeOutput } from './writeOutput.ts';

export interface CatalogueOptions {
  columns?: string;
  cut?: Cut[];
  setAside?: string;
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
      'keep rows whose number lies in the range, an end may be left out; repeat it for several',
      (text: string, before: Cut[] = []) => [...before, parseCut(text)],
    )
    .option('--set-aside <file>', 'write the rows that are not used there, each with its line and reason')
    .option('--overwrite', 'replace output files that exist');
}

/** Reads a catalogue file under the options, with a progress bar, and writes the set-aside list if asked. */
export async function readCatalogue(
  file: string,
  options: CatalogueOptions,
  footprint: Footprint | null,
  more: Pick<LoadOptions, 'onKept'> = {},
): Promise<LoadedCatalogue> {
  const path = fromHere(file);
  const size = await readableSize(path);
  const bar = progressBar(`Reading ${file}`);
  const list = options.setAside === undefined ? null : new PieceQueue();
  const writing =
    list === null
      ? null
      : writeOutput(fromHere(options.setAside!), list, { overwrite: options.overwrite === true });
  list?.add(SET_ASIDE_HEADER);
  try {
    const loaded = await loadCatalogue(fileBytes(path), {
      mapping: options.columns === undefined ? undefined : parseColumnMap(options.columns),
      cuts: options.cut ?? [],
      contains: footprint === null ? null : (ra, dec) => footprint.contains(ra, dec),
      onProgress: (bytesRead) => bar.update(bytesRead / size),
      onSetAside: list === null ? undefined : (row: SetAsideRow) => list.add(setAsideLine(row)),
      ...more,
    });
    list?.end();
    await writing;
    return loaded;
  } catch (error) {
    list?.fail(error);
    await writing?.catch(() => undefined);
    throw error;
  } finally {
    bar.end();
  }
}
