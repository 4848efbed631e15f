import { createHash } from 'node:crypto';
import { stat } from 'node:fs/promises';
import { basename, dirname, join } from 'node:path';
import { Refusal } from '../../shared-core/base/refusal.ts';
import { z } from '../../shared-core/base/schema.ts';
import { pathSchema, type RecentStudy } from '../../shared-core/bridge/messages.ts';
import { isStudyPath } from './launchPaths.ts';
import { OwnRecord } from './ownRecord.ts';

const entrySchema = z.strictObject({
  path: pathSchema,
  kind: z.enum(['study', 'source']),
  usedMs: z.number().finite(),
});
const historySchema = z.strictObject({ version: z.literal(1), files: z.array(entrySchema) });

const MOST_FILES = 500;
const MOST_RECENT = 20;

/**
 * The files that the user gave to the program by dialog, drop or command line, newest first. A study may have one of
 * these opened again without asking; its studies are the recent ones.
 */
export class FileHistory {
  readonly #record: OwnRecord<z.infer<typeof historySchema>>;

  constructor(userFolder: string, lockFolder: string, warn: (sentence: string) => void) {
    const path = join(userFolder, 'history.json');
    this.#record = new OwnRecord(path, historySchema, { version: 1, files: [] }, lockFolder, warn);
  }

  /** Puts files that the user gave to the front. */
  async add(paths: readonly string[]): Promise<void> {
    if (paths.length === 0) return;
    const usedMs = Date.now();
    const added = [...new Set(paths)].map((path) => ({ path, kind: kindOf(path), usedMs }));
    await this.#record.change(({ files }) => ({
      version: 1,
      files: [...added, ...files.filter(({ path }) => !paths.includes(path))].slice(0, MOST_FILES),
    }));
  }

  async holds(path: string): Promise<boolean> {
    return (await this.#record.read()).files.some((file) => file.path === path);
  }

  async recent(): Promise<RecentStudy[]> {
    const studies = (await this.#record.read()).files
      .filter((file) => file.kind === 'study')
      .slice(0, MOST_RECENT);
    return Promise.all(
      studies.map(async ({ path, usedMs }) => ({
        id: idOf(path),
        name: basename(path),
        folder: dirname(path),
        usedMs,
        found: await stat(path).then(
          (info) => info.isFile(),
          () => false,
        ),
      })),
    );
  }

  async pathOf(id: string): Promise<string> {
    const file = (await this.#record.read()).files.find(({ path }) => idOf(path) === id);
    if (file === undefined)
      throw new Refusal('That study is not in the list of recent studies any more: open it as a file.');
    return file.path;
  }

  async forget(id: string): Promise<void> {
    await this.#record.change(({ files }) => ({
      version: 1,
      files: files.filter(({ path }) => idOf(path) !== id),
    }));
  }
}

function kindOf(path: string): 'study' | 'source' {
  return isStudyPath(path) ? 'study' : 'source';
}

function idOf(path: string): string {
  return createHash('sha256').update(path).digest('hex').slice(0, 32);
}
