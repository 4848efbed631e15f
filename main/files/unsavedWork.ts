import { mkdir, readdir, readFile, stat, unlink, utimes } from 'node:fs/promises';
import { hostname } from 'node:os';
import { join } from 'node:path';
import { Refusal } from '../../shared-core/base/refusal.ts';
import { z } from '../../shared-core/base/schema.ts';
import { idSchema, type UnsavedWork } from '../../shared-core/bridge/messages.ts';
import { saveAtomically } from './atomicSave.ts';
import { errorCode, fileRefusal } from './fileTrouble.ts';
import { withLock } from './pathLock.ts';
import { isProcessAlive } from './processes.ts';

/** How often a living program says so, and how long without it before its work counts as left behind. */
export const HEARTBEAT_MS = 10_000;
const SILENT_AFTER_MS = 45_000;

const WORK_ENDING = '.study.json';
const ABOUT_ENDING = '.about.json';

const aboutSchema = z.strictObject({
  version: z.literal(1),
  title: z.string(),
  owner: z.strictObject({ host: z.string(), pid: z.int(), windowId: idSchema }).nullable(),
});
type About = z.infer<typeof aboutSchema>;

/**
 * Work that was not saved yet, kept for after a crash: the study's bytes, and beside them a title and which window
 * holds them. A work is offered back once its window, or the whole program, is gone.
 */
export class UnsavedWorks {
  readonly #folder: string;
  readonly #lockFolder: string;
  readonly #livingWindows: ReadonlySet<string>;
  readonly #pid: number;

  constructor(userFolder: string, lockFolder: string, livingWindows: ReadonlySet<string>, pid = process.pid) {
    this.#folder = join(userFolder, 'unsaved');
    this.#lockFolder = lockFolder;
    this.#livingWindows = livingWindows;
    this.#pid = pid;
  }

  async keep(workId: string, title: string, bytes: Uint8Array, windowId: string): Promise<void> {
    await mkdir(this.#folder, { recursive: true, mode: 0o700 });
    await this.#locked(workId, async () => {
      await this.#refuseIfOthers(workId, windowId);
      await this.#write(`${workId}${WORK_ENDING}`, bytes);
      await this.#writeAbout(workId, title, windowId);
    });
  }

  /** Works that no living window holds, newest first. */
  async list(): Promise<UnsavedWork[]> {
    const works: UnsavedWork[] = [];
    for (const workId of await this.#workIds()) {
      const info = await stat(join(this.#folder, workId + WORK_ENDING)).catch(() => null);
      if (info === null || (await this.#isHeld(workId))) continue;
      const title = (await this.#about(workId))?.about.title ?? '';
      works.push({ workId, title, keptMs: Math.floor(info.mtimeMs), sizeBytes: info.size });
    }
    return works.sort((a, b) => b.keptMs - a.keptMs);
  }

  /** The bytes of a work; whose it is stays. Throws Refusal when they cannot be read. */
  async read(workId: string): Promise<Uint8Array> {
    const path = join(this.#folder, workId + WORK_ENDING);
    return await readFile(path).catch((error: unknown) => {
      throw fileRefusal(error, path, 'be read');
    });
  }

  /** The bytes of a work, which the asking window holds from now on. Throws Refusal when another holds it. */
  async take(workId: string, windowId: string): Promise<Uint8Array> {
    return await this.#locked(workId, async () => {
      await this.#refuseIfOthers(workId, windowId);
      const bytes = await this.read(workId);
      await this.#writeAbout(workId, (await this.#about(workId))?.about.title ?? '', windowId);
      return bytes;
    });
  }

  async drop(workId: string, windowId: string): Promise<void> {
    await this.#locked(workId, async () => {
      await this.#refuseIfOthers(workId, windowId);
      for (const ending of [WORK_ENDING, ABOUT_ENDING])
        await unlink(join(this.#folder, workId + ending)).catch((error: unknown) => {
          if (errorCode(error) !== 'ENOENT') throw fileRefusal(error, workId, 'be removed');
        });
    });
  }

  /** Says that the windows of this process still hold their works. */
  async beat(): Promise<void> {
    const now = new Date();
    for (const workId of await this.#workIds()) {
      const about = await this.#about(workId);
      if (about !== null && this.#isOurs(about.about))
        await utimes(join(this.#folder, workId + ABOUT_ENDING), now, now).catch(() => undefined);
    }
  }

  async #workIds(): Promise<string[]> {
    const names = await readdir(this.#folder).catch((error: unknown) => {
      if (errorCode(error) === 'ENOENT') return [];
      throw fileRefusal(error, this.#folder, 'be looked through');
    });
    const ids = names
      .filter((name) => name.endsWith(WORK_ENDING))
      .map((name) => name.slice(0, -WORK_ENDING.length));
    return ids.filter((id) => idSchema.safeParse(id).success);
  }

  async #about(workId: string): Promise<{ about: About; ageMs: number } | null> {
    const path = join(this.#folder, workId + ABOUT_ENDING);
    try {
      const about = aboutSchema.parse(JSON.parse(await readFile(path, 'utf8')));
      return { about, ageMs: Date.now() - (await stat(path)).mtimeMs };
    } catch {
      // Without a readable note the work has no owner, and is offered: nothing is lost.
      return null;
    }
  }

  #isOurs({ owner }: About): boolean {
    return owner?.host === hostname() && owner.pid === this.#pid && this.#livingWindows.has(owner.windowId);
  }

  async #isHeld(workId: string): Promise<boolean> {
    const found = await this.#about(workId);
    const owner = found?.about.owner;
    if (!found || !owner) return false;
    if (owner.host === hostname()) {
      if (owner.pid === this.#pid) return this.#livingWindows.has(owner.windowId);
      if (!isProcessAlive(owner.pid)) return false;
    }
    return found.ageMs < SILENT_AFTER_MS;
  }

  async #refuseIfOthers(workId: string, windowId: string): Promise<void> {
    const owner = (await this.#about(workId))?.about.owner;
    const mine = owner?.pid === this.#pid && owner.windowId === windowId;
    if (!mine && (await this.#isHeld(workId)))
      throw new Refusal(
        'That unsaved work is open in another window: go on there, or close that window first.',
      );
  }

  async #writeAbout(workId: string, title: string, windowId: string): Promise<void> {
    const about: About = { version: 1, title, owner: { host: hostname(), pid: this.#pid, windowId } };
    await this.#write(workId + ABOUT_ENDING, new TextEncoder().encode(JSON.stringify(about)));
  }

  async #write(name: string, bytes: Uint8Array): Promise<void> {
    const outcome = await saveAtomically(join(this.#folder, name), bytes, {
      lockFolder: this.#lockFolder,
      expected: 'any',
      newFileMode: 0o600,
    });
    if (outcome.kind !== 'saved') throw new Refusal(outcome.sentence);
  }

  #locked<T>(workId: string, work: () => Promise<T>): Promise<T> {
    return withLock(this.#lockFolder, `unsaved ${workId}`, work);
  }
}
