import { lstat, readlink, realpath, stat } from 'node:fs/promises';
import { basename, dirname, join, resolve } from 'node:path';
import { Refusal } from '../../shared-core/base/refusal.ts';
import { errorCode, fileRefusal } from '../files/fileTrouble.ts';
import { fromHere } from './files.ts';
import { existsAlready, type WriteOptions } from './writeOutput.ts';

const MOST_LINKS = 40;

/**
 * Looks at the places of all outputs before anything is read or written.
 *
 * @param outputs files to write, as the person named them, by their option; undefined where it was not given
 * @param inputs files that will be read, as the person named them; they need not exist
 * @returns the absolute path to write to for each output: where a link leads, if it is one
 * @throws Refusal ('use') for an output that is an input, another output, no regular file, or there already while
 *   `overwrite` is off
 */
export async function outputPlaces<Option extends string>(
  outputs: Readonly<Record<Option, string | undefined>>,
  inputs: readonly string[],
  { overwrite }: WriteOptions,
): Promise<Record<Option, string>> {
  const taken = await Promise.all(
    inputs.map(async (name) => ({ place: await placeOf(fromHere(name)), as: 'which is read' })),
  );
  const places: Partial<Record<Option, string>> = {};
  for (const [option, name] of Object.entries(outputs) as [Option, string | undefined][]) {
    if (name === undefined) continue;
    const place = await placeOf(fromHere(name));
    for (const other of taken)
      if (isSamePlace(place, other.place))
        throw new Refusal(
          `${option} ${name} is the same file as one ${other.as}: give another name, so that neither is lost.`,
          'use',
        );
    if (place.found === 'other')
      throw new Refusal(`${option} ${name} is there and is no regular file: name a file to write.`, 'use');
    if (place.found === 'file' && !overwrite) throw existsAlready(name);
    taken.push({ place, as: `that ${option} writes` });
    places[option] = place.path;
  }
  return places as Record<Option, string>;
}

interface Place {
  readonly path: string;
  readonly found: 'nothing' | 'file' | 'other';
  /** Device and file number, which tell that two names are one file; null where nothing stands. */
  readonly identity: string | null;
}

const isSamePlace = (a: Place, b: Place): boolean =>
  a.path === b.path || (a.identity !== null && a.identity === b.identity);

async function placeOf(named: string): Promise<Place> {
  try {
    const path = await followLinks(named);
    const found = await stat(path, { bigint: true }).catch((error: unknown) => {
      if (errorCode(error) === 'ENOENT') return null;
      throw error;
    });
    if (found === null) return { path, found: 'nothing', identity: null };
    return { path, found: found.isFile() ? 'file' : 'other', identity: `${found.dev}:${found.ino}` };
  } catch (error) {
    throw fileRefusal(error, named, 'be used');
  }
}

/** The real path of a name, also where the file, or folders on the way to it, are still to be made. */
async function followLinks(named: string, links = 0): Promise<string> {
  try {
    return await realpath(named);
  } catch (error) {
    if (errorCode(error) !== 'ENOENT' || links > MOST_LINKS) throw error;
  }
  // A link that leads to nothing yet: the file is made where it leads.
  const isLink = await lstat(named).then(
    (found) => found.isSymbolicLink(),
    () => false,
  );
  if (isLink) return await followLinks(resolve(dirname(named), await readlink(named)), links + 1);
  return join(await followLinks(dirname(named), links), basename(named));
}
