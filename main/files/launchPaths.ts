import { realpath, stat } from 'node:fs/promises';
import { dirname, isAbsolute, join, relative, resolve, sep } from 'node:path';
import { regularFile } from './fileStamp.ts';
import { fileRefusal } from './fileTrouble.ts';

/** True for the names that studies have; decides what a file named on the command line is opened as. */
export function isStudyPath(path: string): boolean {
  return /\.json$/i.test(path);
}

/** Absolute paths of the files named on the command line. */
export function launchPaths(named: readonly string[], baseFolder: string): string[] {
  return named.map((path) => (isAbsolute(path) ? resolve(path) : resolve(baseFolder, path)));
}

/** Throws Refusal for the first that is no readable regular file, so that a mistyped name is told in the terminal. */
export async function checkLaunchPaths(paths: readonly string[]): Promise<void> {
  for (const path of paths)
    await regularFile(path).catch((error: unknown) => {
      throw fileRefusal(error, path, 'be opened');
    });
}

/** What decides where studies are saved. */
export interface SavePlaces {
  /** The folder that the user started the program in. */
  readonly baseFolder: string;
  /** The folder of the program itself. */
  readonly programFolder: string;
  readonly homeFolder: string;
}

/**
 * Where studies are saved by name: the folder of the first file named, else the folder the program was started in.
 * That is the program's own where it is started as it was fetched: a person's work does not belong among its sources,
 * and goes to the home folder's Documents, or to the home folder where there is none.
 */
export async function saveFolderFor(
  paths: readonly string[],
  { baseFolder, programFolder, homeFolder }: SavePlaces,
): Promise<string> {
  const [first] = paths;
  if (first !== undefined) return dirname(first);
  if (!(await liesIn(baseFolder, programFolder))) return resolve(baseFolder);
  const documents = join(homeFolder, 'Documents');
  const isThere = await stat(documents).then(
    (found) => found.isDirectory(),
    () => false,
  );
  return isThere ? documents : homeFolder;
}

/** Whether `inner` is `outer` or below it, by whatever links either was reached. */
async function liesIn(inner: string, outer: string): Promise<boolean> {
  const [from, to] = await Promise.all(
    [outer, inner].map((path) => realpath(path).catch(() => resolve(path))),
  );
  const way = relative(from!, to!);
  return way !== '..' && !way.startsWith(`..${sep}`) && !isAbsolute(way);
}
