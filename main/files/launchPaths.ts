import { dirname, isAbsolute, resolve } from 'node:path';
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

/** Where studies are saved by name: the folder of the first study named, else the folder the program was started in. */
export function saveFolderFor(paths: readonly string[], baseFolder: string): string {
  const study = paths.find(isStudyPath);
  return study === undefined ? resolve(baseFolder) : dirname(study);
}
