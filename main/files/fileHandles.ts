import { randomBytes } from 'node:crypto';
import { basename } from 'node:path';
import { Refusal } from '../../shared-core/base/refusal.ts';
import type { OpenedFile } from '../../shared-core/bridge/messages.ts';
import { regularFile } from './fileStamp.ts';
import { fileRefusal } from './fileTrouble.ts';

interface Handle {
  id: string;
  path: string;
  writable: boolean;
}

/**
 * The only way from a window to a file: an id that cannot be guessed, made when the user gave the file. A window
 * never names a path.
 */
export class FileHandles {
  readonly #byId = new Map<string, Handle>();
  readonly #byPath = new Map<string, Handle>();
  readonly #urlOf: (id: string) => string;

  constructor(urlOf: (id: string) => string) {
    this.#urlOf = urlOf;
  }

  /** The id for a path that the user gave. Writable once granted stays writable. */
  grant(path: string, writable: boolean): string {
    let handle = this.#byPath.get(path);
    if (handle === undefined) {
      handle = { id: randomBytes(16).toString('hex'), path, writable: false };
      this.#byPath.set(path, handle);
      this.#byId.set(handle.id, handle);
    }
    handle.writable ||= writable;
    return handle.id;
  }

  /** Describes a regular file and grants it for reading. Throws Refusal. */
  async open(path: string): Promise<OpenedFile> {
    try {
      const info = await regularFile(path);
      const id = this.grant(path, false);
      return { id, name: basename(path), ...info, path, url: this.#urlOf(id) };
    } catch (error) {
      throw fileRefusal(error, path, 'be opened');
    }
  }

  pathOf(id: string): string {
    return this.#get(id).path;
  }

  writablePathOf(id: string): string {
    const handle = this.#get(id);
    if (!handle.writable)
      throw new Refusal('That file was opened for reading only: choose where to save the study.', 'use');
    return handle.path;
  }

  /** The path behind an id, or undefined: for requests that answer "not found". */
  find(id: string): string | undefined {
    return this.#byId.get(id)?.path;
  }

  #get(id: string): Handle {
    const handle = this.#byId.get(id);
    if (handle === undefined)
      throw new Refusal(
        'That file is not open any more, the program was started anew: open it again.',
        'use',
      );
    return handle;
  }
}
