import { isAbsolute, resolve } from 'node:path';
import { z } from '../../shared-core/base/schema.ts';
import { pathSchema } from '../../shared-core/bridge/messages.ts';

/**
 * The files named when the program was started, as absolute paths. What begins with a dash before "--" is a switch
 * for Chromium; when Electron runs the program from its sources, the first plain word is the program itself.
 */
export function namedFiles(argv: readonly string[], runsFromSources: boolean, folder: string): string[] {
  const words = argv.slice(1);
  const dashes = words.indexOf('--');
  const plain = words.slice(0, dashes < 0 ? words.length : dashes).filter((word) => !word.startsWith('-'));
  const files = [
    ...(runsFromSources ? plain.slice(1) : plain),
    ...(dashes < 0 ? [] : words.slice(dashes + 1)),
  ];
  return files.map((file) => (isAbsolute(file) ? file : resolve(folder, file)));
}

const handedOverSchema = z.object({ paths: z.array(pathSchema).max(100) });

/** The files that a second start hands over to the running program; anything else in it counts as none. */
export function handedOverFiles(data: unknown): string[] {
  const parsed = handedOverSchema.safeParse(data);
  return parsed.success ? parsed.data.paths.filter((path) => isAbsolute(path)) : [];
}
