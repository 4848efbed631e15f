import { basename, dirname, join } from 'node:path';
import { Refusal } from '../../shared-core/base/refusal.ts';
import { STUDY_ENDING, studyFileName } from '../../shared-core/bridge/fileNames.ts';
import type { SaveTarget } from '../../shared-core/bridge/messages.ts';
import { saveAtomically } from './atomicSave.ts';
import type { Calls } from './callHandlers.ts';
import type { ExportFiles } from './exportFiles.ts';
import type { FileHandles } from './fileHandles.ts';
import { stampOrNull } from './fileStamp.ts';
import { fileRefusal } from './fileTrouble.ts';
import type { FileHistory } from './history.ts';
import type { Dialogs, HostParts } from './hostParts.ts';
import { isStudyPath } from './launchPaths.ts';

interface Parts {
  host: HostParts;
  handles: FileHandles;
  history: FileHistory;
  exports: ExportFiles;
  lockFolder: string;
}

type SaveCalls = Pick<
  Calls,
  'targetByDialog' | 'targetByName' | 'saveStudy' | 'startExport' | 'addToExport' | 'finishExport'
>;

export function saveCalls({ host, handles, history, exports, lockFolder }: Parts): SaveCalls {
  async function target(path: string): Promise<SaveTarget> {
    const existing = await stampOrNull(path).catch((error: unknown) => {
      throw fileRefusal(error, path, 'be saved');
    });
    return { id: handles.grant(path, true), name: basename(path), folder: dirname(path), existing };
  }

  return {
    async targetByDialog({ suggestedName }, { windowId }) {
      const dialogs = dialogsOf(host);
      const chosen = await dialogs.saveStudy(windowId, suggestedName);
      if (chosen === null) return null;
      const answer = await target(isStudyPath(chosen) ? chosen : chosen + STUDY_ENDING);
      // The dialog asked about the name as it was typed, not about the one with the ending.
      const unasked = answer.existing !== null && !isStudyPath(chosen);
      if (unasked && !(await dialogs.mayReplace(windowId, chosen + STUDY_ENDING))) return null;
      return answer;
    },

    async targetByName({ name }) {
      if (host.saveFolder === null) throw new Refusal('This host asks for the place by dialog.', 'use');
      return await target(join(host.saveFolder, studyFileName(name)));
    },

    async saveStudy({ targetId, expected }, { bytes }) {
      const path = handles.writablePathOf(targetId);
      const outcome = await saveAtomically(path, bytes, { lockFolder, expected });
      if (outcome.kind === 'saved')
        await history.add([path]).catch((error: unknown) => host.warn(String(error)));
      return outcome;
    },

    async startExport({ suggestedName, mimeType }, { windowId }) {
      const path = await dialogsOf(host).saveExport(windowId, suggestedName, mimeType);
      if (path === null) return null;
      const exportId = await exports.start(path, windowId);
      return { exportId, name: basename(path), folder: dirname(path) };
    },

    async addToExport({ exportId }, { windowId, bytes }) {
      await exports.add(exportId, windowId, bytes);
      return {};
    },

    async finishExport({ exportId, keep }, { windowId }) {
      await exports.finish(exportId, windowId, keep);
      return {};
    },
  };
}

function dialogsOf(host: HostParts): Dialogs {
  if (host.dialogs === null) throw new Refusal('This host has no dialogs: the page does this itself.', 'use');
  return host.dialogs;
}
