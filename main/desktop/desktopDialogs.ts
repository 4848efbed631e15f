import { basename } from 'node:path';
import { type BrowserWindow, dialog } from 'electron';
import type { Dialogs } from '../files/hostParts.ts';
import { CLOSE_DIALOG } from './closing.ts';
import { openDialog, replaceDialog, saveExportDialog, saveStudyDialog } from './dialogChoices.ts';

/** The system's dialogs, each in front of the window that asked; a window that is gone gets none. */
export function createDialogs(windowOf: (windowId: string) => BrowserWindow | null): Dialogs {
  return {
    async openFiles(windowId, purpose) {
      const window = windowOf(windowId);
      if (window === null) return [];
      return (await dialog.showOpenDialog(window, openDialog(purpose))).filePaths;
    },
    async saveStudy(windowId, suggestedName) {
      const window = windowOf(windowId);
      if (window === null) return null;
      const { canceled, filePath } = await dialog.showSaveDialog(window, saveStudyDialog(suggestedName));
      return canceled || filePath === '' ? null : filePath;
    },
    async saveExport(windowId, suggestedName) {
      const window = windowOf(windowId);
      if (window === null) return null;
      const { canceled, filePath } = await dialog.showSaveDialog(window, saveExportDialog(suggestedName));
      return canceled || filePath === '' ? null : filePath;
    },
    async mayReplace(windowId, path) {
      const window = windowOf(windowId);
      if (window === null) return false;
      return (await dialog.showMessageBox(window, replaceDialog(basename(path)))).response === 1;
    },
  };
}

/** Asks by the system's dialog whether a window that does not answer may be closed. */
export async function mayCloseUnsaved(window: BrowserWindow): Promise<boolean> {
  return (await dialog.showMessageBox(window, CLOSE_DIALOG)).response === 1;
}

export function tellError(sentence: string): void {
  dialog.showErrorBox('Conewright', sentence);
}
