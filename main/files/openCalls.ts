import { open } from 'node:fs/promises';
import { basename, dirname, join } from 'node:path';
import { Refusal } from '../../shared-core/base/refusal.ts';
import { isBareFileName } from '../../shared-core/bridge/fileNames.ts';
import { LARGEST_STUDY_BYTES, type OpenedFile, type SaveTarget } from '../../shared-core/bridge/messages.ts';
import { type Calls, withBytes } from './callHandlers.ts';
import type { FileHandles } from './fileHandles.ts';
import { regularFile, sha256Of, stampOf, stampOrNull } from './fileStamp.ts';
import { fileRefusal } from './fileTrouble.ts';
import type { FileHistory } from './history.ts';
import type { HostParts } from './hostParts.ts';
import { isStudyPath } from './launchPaths.ts';
import { locateSource } from './locateSource.ts';

interface Parts {
  host: HostParts;
  handles: FileHandles;
  history: FileHistory;
}

type OpenCalls = Pick<
  Calls,
  | 'launch'
  | 'openByDialog'
  | 'openDropped'
  | 'locateSource'
  | 'fingerprint'
  | 'readStudy'
  | 'claimStudy'
  | 'openRecent'
>;

export function openCalls({ host, handles, history }: Parts): OpenCalls {
  /** Remembers files that the user gave: without that list they open all the same, so a fault in it only warns. */
  async function remember(paths: string[]): Promise<void> {
    await history.add(paths).catch((error: unknown) => {
      host.warn(error instanceof Error ? error.message : String(error));
    });
  }

  async function openGiven(paths: string[]): Promise<OpenedFile[]> {
    const files: OpenedFile[] = [];
    for (const path of paths) files.push(await handles.open(path));
    await remember(paths);
    return files;
  }

  return {
    async launch(_, { windowId }) {
      const files: OpenedFile[] = [];
      const troubles: string[] = [];
      for (const path of host.launchPaths(windowId)) {
        try {
          files.push(await handles.open(path));
        } catch (error) {
          troubles.push(fileRefusal(error, path, 'be opened').message);
        }
      }
      await remember(files.flatMap(({ path }) => path ?? []));
      return { hostKind: host.hostKind, saveFolder: host.saveFolder, files, troubles };
    },

    async openByDialog({ purpose }, { windowId }) {
      if (host.dialogs === null)
        throw new Refusal('This host has no dialogs: pick the file in the page.', 'use');
      return await openGiven(await host.dialogs.openFiles(windowId, purpose));
    },

    openDropped: ({ paths }) => openGiven(paths),

    async locateSource(source) {
      const studyPath = source.studyId === null ? null : (handles.find(source.studyId) ?? null);
      const path = await locateSource(source, studyPath, history);
      return path === null ? null : await handles.open(path);
    },

    async fingerprint({ fileId }) {
      const path = handles.pathOf(fileId);
      return await stampOf(path).catch((error: unknown) => {
        throw fileRefusal(error, path, 'be read');
      });
    },

    async readStudy({ fileId }) {
      const path = handles.pathOf(fileId);
      const { bytes, modifiedMs } = await readWhole(path);
      const stamp = { sizeBytes: bytes.length, modifiedMs, sha256: sha256Of(bytes) };
      // Only a file that is named as studies are may be saved over: a catalogue opened by mistake may not.
      const target: SaveTarget | null = isStudyPath(path)
        ? { id: handles.grant(path, true), name: basename(path), folder: dirname(path), existing: stamp }
        : null;
      return withBytes({ stamp, target }, bytes);
    },

    async claimStudy({ name, sha256 }) {
      if (host.saveFolder === null || !isBareFileName(name) || !isStudyPath(name)) return null;
      const path = join(host.saveFolder, name);
      const existing = await stampOrNull(path).catch(() => null);
      if (existing === null || existing.sha256 !== sha256) return null;
      await remember([path]);
      return { id: handles.grant(path, true), name, folder: host.saveFolder, existing };
    },

    async openRecent({ id }) {
      return (await openGiven([await history.pathOf(id)]))[0]!;
    },
  };
}

async function readWhole(path: string): Promise<{ bytes: Uint8Array; modifiedMs: number }> {
  try {
    const { sizeBytes } = await regularFile(path);
    if (sizeBytes > LARGEST_STUDY_BYTES)
      throw new Refusal(
        `${basename(path)} has ${sizeBytes} bytes, a study has at most ${LARGEST_STUDY_BYTES}: it is another kind of file, open it as a catalogue.`,
      );
    const file = await open(path, 'r');
    try {
      const modifiedMs = Math.floor((await file.stat()).mtimeMs);
      return { bytes: await file.readFile(), modifiedMs };
    } finally {
      await file.close();
    }
  } catch (error) {
    throw fileRefusal(error, path, 'be read');
  }
}
