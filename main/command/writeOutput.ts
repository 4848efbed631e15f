import { once } from 'node:events';
import { mkdir, readFile } from 'node:fs/promises';
import { dirname } from 'node:path';
import { Refusal } from '../../shared-core/base/refusal.ts';
import { systemCalls } from '../files/fileCalls.ts';
import { fileRefusal } from '../files/fileTrouble.ts';
import { createPart, movePart, movePartToFreeName, syncFolder } from '../files/partFile.ts';

export interface WriteOptions {
  /** Whether a file of that name may be replaced; without it, one that differs is never touched. */
  readonly overwrite: boolean;
}

/**
 * Writes a file so that its name never stands for half of it: pieces (text as UTF-8, or bytes) go to a file beside it, which takes the name
 * when it is whole.
 * @throws Refusal when something else stands there and `overwrite` is off, or the disk says no
 */
export async function writeOutput(
  path: string,
  pieces: Iterable<string | Uint8Array> | AsyncIterable<string | Uint8Array>,
  { overwrite }: WriteOptions,
): Promise<void> {
  try {
    await mkdir(dirname(path), { recursive: true });
    const part = await createPart(systemCalls, path, 0o666);
    try {
      const stream = part.file.createWriteStream({ encoding: 'utf8' });
      for await (const piece of pieces) if (!stream.write(piece)) await once(stream, 'drain');
      stream.end();
      await once(stream, 'close');
      if (overwrite) await movePart(systemCalls, part.path, path);
      else if (!(await movePartToFreeName(systemCalls, part.path, path))) {
        const same = (await readFile(path)).equals(await readFile(part.path));
        await systemCalls.unlink(part.path);
        if (!same)
          throw new Refusal(
            `${path} exists already and holds something else: give another name, or --overwrite.`,
            'use',
          );
      }
    } catch (error) {
      await part.file.close().catch(() => undefined);
      await systemCalls.unlink(part.path).catch(() => undefined);
      throw error;
    }
    await syncFolder(systemCalls, dirname(path));
  } catch (error) {
    if (error instanceof Refusal) throw error;
    throw fileRefusal(error, path, 'be written');
  }
}
