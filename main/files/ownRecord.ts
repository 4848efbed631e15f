import { mkdir, readFile, rename } from 'node:fs/promises';
import { basename, dirname, join } from 'node:path';
import { Refusal } from '../../shared-core/base/refusal.ts';
import type { z } from '../../shared-core/base/schema.ts';
import { saveAtomically } from './atomicSave.ts';
import { errorCode } from './fileTrouble.ts';
import { withLock } from './pathLock.ts';

/**
 * One small JSON file of the program's own, shared by all its windows: read, changed and written under a lock.
 * A file that cannot be understood is set aside under another name, never overwritten, and `warn` is told.
 */
export class OwnRecord<T> {
  readonly #path: string;
  readonly #schema: z.ZodType<T>;
  readonly #empty: T;
  readonly #lockFolder: string;
  readonly #warn: (sentence: string) => void;

  constructor(
    path: string,
    schema: z.ZodType<T>,
    empty: T,
    lockFolder: string,
    warn: (sentence: string) => void,
  ) {
    this.#path = path;
    this.#schema = schema;
    this.#empty = empty;
    this.#lockFolder = lockFolder;
    this.#warn = warn;
  }

  async read(): Promise<T> {
    let text: string;
    try {
      text = await readFile(this.#path, 'utf8');
    } catch (error) {
      if (errorCode(error) === 'ENOENT') return this.#empty;
      throw error;
    }
    const parsed = this.#schema.safeParse(parseJson(text));
    if (parsed.success) return parsed.data;
    const aside = join(dirname(this.#path), `unreadable-${Date.now()}-${basename(this.#path)}`);
    await rename(this.#path, aside);
    this.#warn(
      `${basename(this.#path)} could not be understood and was set aside as ${aside}; a new one begins.`,
    );
    return this.#empty;
  }

  async change(change: (value: T) => T): Promise<void> {
    await mkdir(dirname(this.#path), { recursive: true, mode: 0o700 });
    // The key differs from the path, which saving locks in its turn.
    await withLock(this.#lockFolder, `record ${this.#path}`, async () => {
      const bytes = new TextEncoder().encode(`${JSON.stringify(change(await this.read()), null, 1)}\n`);
      const outcome = await saveAtomically(this.#path, bytes, {
        lockFolder: this.#lockFolder,
        expected: 'any',
        newFileMode: 0o600,
      });
      if (outcome.kind !== 'saved') throw new Refusal(outcome.sentence);
    });
  }
}

function parseJson(text: string): unknown {
  try {
    return JSON.parse(text);
  } catch {
    return undefined;
  }
}
