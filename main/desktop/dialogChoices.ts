import type { FileFilter, OpenDialogOptions, SaveDialogOptions } from 'electron';
import { harmlessFileName, STUDY_ENDING } from '../../shared-core/bridge/fileNames.ts';
import type { Purpose } from '../../shared-core/bridge/messages.ts';

const ANY: FileFilter = { name: 'All files', extensions: ['*'] };

/** The dialog for opening. The names shown first are a help; any file can be chosen, and is judged by its contents. */
export function openDialog(purpose: Purpose): OpenDialogOptions {
  switch (purpose) {
    case 'catalogue':
      return {
        title: 'Open a catalogue',
        properties: ['openFile', 'multiSelections'],
        filters: [
          {
            name: 'Catalogues',
            extensions: ['csv', 'tsv', 'txt', 'dat', 'ecsv', 'fits', 'fit', 'vot', 'xml', 'parquet', 'gz'],
          },
          ANY,
        ],
      };
    case 'study':
      return {
        title: 'Open a study',
        properties: ['openFile'],
        filters: [{ name: 'Studies', extensions: ['json'] }, ANY],
      };
    case 'region':
      return {
        title: 'Open a region',
        properties: ['openFile'],
        filters: [{ name: 'Regions', extensions: ['txt', 'csv', 'json', 'moc', 'fits', 'reg'] }, ANY],
      };
  }
}

/** The dialog for saving a study. Names are made harmless: a suggestion can come out of a study from anywhere. */
export function saveStudyDialog(suggestedName: string): SaveDialogOptions {
  const bare = suggestedName.replace(/(\.study)?\.json$/i, '');
  return {
    title: 'Save the study',
    defaultPath: harmlessFileName(bare, 'study') + STUDY_ENDING,
    filters: [{ name: 'Studies', extensions: ['json'] }],
    properties: ['createDirectory', 'showOverwriteConfirmation'],
  };
}

export function saveExportDialog(suggestedName: string): SaveDialogOptions {
  const defaultPath = harmlessFileName(suggestedName, 'export');
  const ending = /\.([A-Za-z0-9]{1,8})$/.exec(defaultPath)?.[1];
  return {
    title: 'Export',
    defaultPath,
    filters: ending === undefined ? [ANY] : [{ name: ending.toUpperCase(), extensions: [ending] }, ANY],
    properties: ['createDirectory', 'showOverwriteConfirmation'],
  };
}

export function replaceDialog(name: string) {
  return {
    type: 'question' as const,
    message: `${name} is there already. Replace it?`,
    buttons: ['Keep it', 'Replace it'],
    defaultId: 0,
    cancelId: 0,
  };
}
