import type {
  FileStamp,
  LaunchInfo,
  MenuCommand,
  OpenedFile,
  Purpose,
  RecentStudy,
  SaveOutcome,
  SaveTarget,
  SourceReference,
  UnsavedWork,
  WindowState,
} from './messages.ts';

/** The part of a page's File that the contract needs; a real File is one. */
export interface PickedFile {
  readonly name: string;
  readonly size: number;
  readonly lastModified: number;
}

/** A study as it was read: its bytes, what they were like, and where saving goes (null: a name must be chosen). */
export interface ReadStudy {
  readonly bytes: Uint8Array;
  readonly stamp: FileStamp;
  readonly target: SaveTarget | null;
}

/** Where an exported file went: `folder` is null when the browser chose it (its downloads). Null: given up. */
export type ExportOutcome = { readonly name: string; readonly folder: string | null } | null;

/**
 * Questions that a host without dialogs of its own leaves to the window. Both are asked inside chooseSaveTarget, in
 * the local host only.
 */
export interface HostQuestions {
  /** Asks for a study's name; null gives up. `problem` is what was wrong with the name given before. */
  askSaveName(question: {
    readonly suggestedName: string;
    readonly folder: string;
    readonly problem: string | null;
  }): Promise<string | null>;
  /** Asks whether the file of this name may be replaced. */
  askOverwrite(question: { readonly name: string; readonly folder: string }): Promise<boolean>;
}

/** Stops the listening that it was answered for. */
export type StopListening = () => void;

/**
 * What the window can ask of the machine, the same in both hosts. Every method that returns a promise rejects with a
 * Refusal, whose message is one sentence for the user. Byte arrays given are not kept or changed.
 */
export interface Bridge {
  readonly hostKind: 'desktop' | 'local';
  /** The folder that studies are saved into, where the host has one (local); null where a dialog asks. */
  readonly saveFolder: string | null;
  /** The files named on the command line (this window's), and a sentence for each that could not be opened. */
  readonly launch: Pick<LaunchInfo, 'files' | 'troubles'>;

  /** Lets the user choose files. Several only for 'catalogue'. Empty when the user gives up. */
  chooseFiles(purpose: Purpose): Promise<OpenedFile[]>;
  /** Takes files that the user dropped on the window or picked in it. */
  adoptDropped(files: readonly PickedFile[]): Promise<OpenedFile[]>;
  /** Gives back what an opened file holds in the page; afterwards its url does not answer. */
  releaseFile(file: OpenedFile): void;
  /**
   * Finds the source that a study names, without asking: only where the user gave that very file before, or where
   * it lies beside the study. Null otherwise: ask the user to point at it. The answer may differ in size or contents
   * from what the study remembers; compare with its stamp.
   */
  locateSource(source: SourceReference): Promise<OpenedFile | null>;
  /** Size, time and SHA-256 of a file, read as a stream. */
  fingerprint(file: OpenedFile): Promise<FileStamp>;
  /** Reads a whole study. Refuses above LARGEST_STUDY_BYTES. */
  readStudy(file: OpenedFile): Promise<ReadStudy>;

  /**
   * Where to save: a dialog, or the window's own question. Null when the user gives up. When something stands there
   * the user has agreed to replace it: pass its `existing` stamp on to saveStudy. `openedSha256` is of the study as
   * it was opened: replacing that is not asked for.
   */
  chooseSaveTarget(suggestedName: string, openedSha256: string | null): Promise<SaveTarget | null>;
  /**
   * Saves atomically: a kill at any moment leaves the old file or the new one. `expected` is what must stand there
   * (null: nothing); anything else is answered as a conflict. To save over a conflict, pass the stamp that was found.
   */
  saveStudy(targetId: string, bytes: Uint8Array, expected: FileStamp | null): Promise<SaveOutcome>;
  /**
   * Writes an exported file, whole or in pieces. Where the host writes it, no half file ever stands under its name;
   * a rejection of the pieces (cancelling) leaves nothing behind.
   */
  exportFile(
    suggestedName: string,
    mimeType: string,
    content: Uint8Array | AsyncIterable<Uint8Array>,
  ): Promise<ExportOutcome>;

  /** Newest first. */
  recentStudies(): Promise<RecentStudy[]>;
  openRecent(id: string): Promise<OpenedFile>;
  forgetRecent(id: string): Promise<void>;

  /** Keeps unsaved work outside its study, atomically, for after a crash. `workId` is random and the window's own. */
  keepUnsaved(workId: string, title: string, bytes: Uint8Array): Promise<void>;
  /** Kept work that no living window holds, newest first. */
  listUnsaved(): Promise<UnsavedWork[]>;
  /** What kept work holds, for choosing: it stays where it is. */
  lookAtUnsaved(workId: string): Promise<Uint8Array>;
  /** Takes kept work over into this window: from now on it is this window's. */
  takeUnsaved(workId: string): Promise<Uint8Array>;
  /** Forgets kept work: it was saved, or the user does not want it. */
  dropUnsaved(workId: string): Promise<void>;

  /** Shows the title (with a mark when unsaved) and lets closing ask. */
  setWindowState(state: WindowState): Promise<void>;
  /** The desktop asks before it closes a window with unsaved work. In a browser the browser itself asks. */
  onCloseRequest(handler: () => Promise<'close' | 'stay'>): StopListening;
  onMenuCommand(handler: (command: MenuCommand) => void): StopListening;
  /** The program behind the window has ended: nothing can be saved from here any more. */
  onHostLost(handler: () => void): StopListening;
}
