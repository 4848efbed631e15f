import { writeFileSync } from 'node:fs';
import { type FileHandle, mkdir } from 'node:fs/promises';
import { dirname } from 'node:path';
import { Refusal } from '../../shared-core/base/refusal.ts';
import { systemCalls } from '../files/fileCalls.ts';
import { fileRefusal } from '../files/fileTrouble.ts';
import { createPart, movePart, movePartToFreeName, syncFolder } from '../files/partFile.ts';

export interface WriteOptions {
  /** Whether a file of that name may be replaced; without it, none is ever touched. */
  readonly overwrite: boolean;
}

interface Part {
  readonly path: string;
  readonly file: FileHandle;
}

const HELD_CHARACTERS = 1 << 16;

/**
 * A file being written so that its name never stands for half of it: what is added goes to a file beside it, which
 * takes the name when it is whole. End it by `finish` or `abandon`. Every method throws a Refusal when the disk says no.
 */
export class OutputFile {
  readonly #path: string;
  readonly #overwrite: boolean;
  readonly #part: Part;
  #held = '';

  private constructor(path: string, overwrite: boolean, part: Part) {
    this.#path = path;
    this.#overwrite = overwrite;
    this.#part = part;
  }

  static async begin(path: string, { overwrite }: WriteOptions): Promise<OutputFile> {
    try {
      await mkdir(dirname(path), { recursive: true });
      return new OutputFile(path, overwrite, await createPart(systemCalls, path, 0o666));
    } catch (error) {
      throw fileRefusal(error, path, 'be written');
    }
  }

  /**
   * Adds text from where nothing can be awaited (a reader's row by row call). It waits for the disk, so that a slow
   * one slows the reader and no more than a few rows are ever held.
   */
  addText(text: string): void {
    this.#held += text;
    if (this.#held.length >= HELD_CHARACTERS) this.#writeHeld();
  }

  async add(piece: string | Uint8Array): Promise<void> {
    try {
      await this.#part.file.appendFile(piece);
    } catch (error) {
      throw fileRefusal(error, this.#path, 'be written');
    }
  }

  /** @throws Refusal ('use') when something else has come to stand there and `overwrite` is off */
  async finish(): Promise<void> {
    this.#writeHeld();
    try {
      await this.#part.file.sync();
      await this.#part.file.close();
      if (this.#overwrite) await movePart(systemCalls, this.#part.path, this.#path);
      else if (!(await movePartToFreeName(systemCalls, this.#part.path, this.#path)))
        throw existsAlready(this.#path);
      await syncFolder(systemCalls, dirname(this.#path));
    } catch (error) {
      throw fileRefusal(error, this.#path, 'be written');
    }
  }

  /** Leaves nothing behind; harmless after a `finish` that failed. */
  async abandon(): Promise<void> {
    await this.#part.file.close().catch(() => undefined);
    await systemCalls.unlink(this.#part.path).catch(() => undefined);
  }

  #writeHeld(): void {
    const text = this.#held;
    this.#held = '';
    try {
      writeFileSync(this.#part.file.fd, text);
    } catch (error) {
      throw fileRefusal(error, this.#path, 'be written');
    }
  }
}

export const existsAlready = (path: string): Refusal =>
  new Refusal(`${path} exists already: give another name, or --overwrite.`, 'use');

/**
 * Writes a file from its pieces (text as UTF-8, or bytes), whole or not at all.
 * @throws Refusal when something stands there and `overwrite` is off, or the disk says no
 */
export async function writeOutput(
  path: string,
  pieces: Iterable<string | Uint8Array> | AsyncIterable<string | Uint8Array>,
  options: WriteOptions,
): Promise<void> {
  const file = await OutputFile.begin(path, options);
  try {
    for await (const piece of pieces) await file.add(piece);
    await file.finish();
  } catch (error) {
    await file.abandon();
    throw error;
  }
}
