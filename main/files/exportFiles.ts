import { randomBytes } from 'node:crypto';
import type { FileHandle } from 'node:fs/promises';
import { dirname } from 'node:path';
import { Refusal } from '../../shared-core/base/refusal.ts';
import { type FileCalls, systemCalls } from './fileCalls.ts';
import { fileRefusal } from './fileTrouble.ts';
import { createPart, movePart, syncFolder } from './partFile.ts';

interface Export {
  windowId: string;
  target: string;
  part: { path: string; file: FileHandle };
}

/**
 * Exported files while they are written, piece by piece, beside their target; they get its name only when whole, so
 * a full disk in the middle leaves no half file. The user agreed to replace the target in the save dialog.
 */
export class ExportFiles {
  readonly #running = new Map<string, Export>();
  readonly #calls: FileCalls;

  constructor(calls: FileCalls = systemCalls) {
    this.#calls = calls;
  }

  async start(target: string, windowId: string): Promise<string> {
    try {
      const part = await createPart(this.#calls, target, 0o666);
      const id = randomBytes(16).toString('hex');
      this.#running.set(id, { windowId, target, part });
      return id;
    } catch (error) {
      throw fileRefusal(error, target, 'be written');
    }
  }

  async add(id: string, windowId: string, bytes: Uint8Array): Promise<void> {
    const { target, part } = this.#get(id, windowId);
    try {
      await part.file.appendFile(bytes);
    } catch (error) {
      await this.#abandon(id);
      throw fileRefusal(error, target, 'be written');
    }
  }

  async finish(id: string, windowId: string, keep: boolean): Promise<void> {
    const { target, part } = this.#get(id, windowId);
    if (!keep) return await this.#abandon(id);
    try {
      await part.file.sync();
      await part.file.close();
      await movePart(this.#calls, part.path, target);
      this.#running.delete(id);
      await syncFolder(this.#calls, dirname(target));
    } catch (error) {
      await this.#abandon(id);
      throw fileRefusal(error, target, 'be written');
    }
  }

  /** Removes what a window that is gone was writing. */
  async abandonAllOf(windowId: string): Promise<void> {
    for (const [id, running] of this.#running) if (running.windowId === windowId) await this.#abandon(id);
  }

  #get(id: string, windowId: string): Export {
    const running = this.#running.get(id);
    if (running?.windowId !== windowId)
      throw new Refusal('That export was ended before: start it again.', 'use');
    return running;
  }

  async #abandon(id: string): Promise<void> {
    const running = this.#running.get(id);
    this.#running.delete(id);
    if (running === undefined) return;
    await running.part.file.close().catch(() => undefined);
    await this.#calls.unlink(running.part.path).catch(() => undefined);
  }
}
