import type { Purpose, WindowState } from '../../shared-core/bridge/messages.ts';

/** The dialogs of a host that has them; the answers are paths that the user chose, empty or null when given up. */
export interface Dialogs {
  openFiles(windowId: string, purpose: Purpose): Promise<string[]>;
  saveStudy(windowId: string, suggestedName: string): Promise<string | null>;
  saveExport(windowId: string, suggestedName: string, mimeType: string): Promise<string | null>;
  /** Asks whether a file that the save dialog did not ask about may be replaced. */
  mayReplace(windowId: string, path: string): Promise<boolean>;
}

/** What a host does with its windows when they ask. */
interface Windows {
  setState(windowId: string, state: WindowState): void;
  answerClose(windowId: string, close: boolean): void;
}

export interface HostParts {
  hostKind: 'desktop' | 'local';
  userFolder: string;
  /** Where studies are saved by name alone; null in a host with dialogs. */
  saveFolder: string | null;
  /** Where a window loads the file with this id from. */
  urlOf(id: string): string;
  dialogs: Dialogs | null;
  windows: Windows;
  /** Absolute paths named on the command line for this window. */
  launchPaths(windowId: string): string[];
  /** A line for whoever looks after the program; never shown in the window. */
  warn(sentence: string): void;
}
