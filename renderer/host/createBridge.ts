import { Refusal } from '../../shared-core/base/refusal.ts';
import type { Bridge, HostQuestions, StopListening } from '../../shared-core/bridge/contract.ts';
import type { MenuCommand, Purpose, SaveTarget, WindowState } from '../../shared-core/bridge/messages.ts';
import type { Exporter } from './exporting.ts';
import type { PageFiles, Wire } from './wire.ts';

export interface BridgeParts {
  wire: Wire;
  files: PageFiles;
  exportFile: Exporter;
  questions: HostQuestions;
  /** Lets the user pick files in the page; used where the host has no dialogs. */
  pickFiles(purpose: Purpose): Promise<File[]>;
  /** Shows title and unsaved state in the page. */
  showState(state: WindowState): void;
}

/** The contract over a wire; the only place where the two hosts differ is what is passed in, and saving by name. */
export async function createBridge(parts: BridgeParts): Promise<Bridge> {
  const { wire, files, exportFile, questions, pickFiles, showState } = parts;
  const { hostKind, saveFolder, ...launch } = (await wire.call('launch', {})).answer;
  const menu = new Listeners<MenuCommand>();
  const lost = new Listeners<void>();
  const closing: (() => Promise<'close' | 'stay'>)[] = [];

  wire.onLost(() => lost.tell());
  wire.onEvent((event) => {
    if (event.kind === 'command') menu.tell(event.command);
    else void answerClose();
  });

  /** The window closes when every handler agrees, also when there is none; a handler that fails lets it stay. */
  async function answerClose(): Promise<void> {
    const answers = await Promise.all(closing.map((ask) => ask().catch(() => 'stay' as const)));
    await wire.call('answerClose', { close: answers.every((answer) => answer === 'close') });
  }

  return {
    hostKind,
    saveFolder,
    launch,

    async chooseFiles(purpose) {
      if (hostKind === 'desktop') return (await wire.call('openByDialog', { purpose })).answer;
      return await files.adopt(await pickFiles(purpose));
    },
    adoptDropped: (dropped) => files.adopt(dropped.filter((file): file is File => file instanceof File)),
    releaseFile: (file) => files.release(file),
    locateSource: async (source) => (await wire.call('locateSource', source)).answer,
    fingerprint: async (file) =>
      (await files.fingerprint(file)) ?? (await wire.call('fingerprint', { fileId: file.id })).answer,

    async readStudy(file) {
      const held = await files.read(file);
      if (held === null) {
        const { answer, bytes } = await wire.call('readStudy', { fileId: file.id });
        return { ...answer, bytes: bytes ?? new Uint8Array(0) };
      }
      const sha256 = await sha256Of(held);
      const stamp = { sizeBytes: held.length, modifiedMs: file.modifiedMs ?? 0, sha256 };
      const { answer: target } = await wire.call('claimStudy', { name: file.name, sha256 });
      return { bytes: held, stamp, target };
    },

    async chooseSaveTarget(suggestedName, openedSha256) {
      if (hostKind === 'desktop') return (await wire.call('targetByDialog', { suggestedName })).answer;
      return await targetByName(suggestedName, openedSha256);
    },
    saveStudy: async (targetId, bytes, expected) =>
      (await wire.call('saveStudy', { targetId, expected }, bytes)).answer,
    exportFile,

    recentStudies: async () => (await wire.call('recentStudies', {})).answer,
    openRecent: async (id) => (await wire.call('openRecent', { id })).answer,
    forgetRecent: async (id) => void (await wire.call('forgetRecent', { id })),

    keepUnsaved: async (workId, title, bytes) =>
      void (await wire.call('keepUnsaved', { workId, title }, bytes)),
    listUnsaved: async () => (await wire.call('listUnsaved', {})).answer,
    lookAtUnsaved: async (workId) =>
      (await wire.call('lookAtUnsaved', { workId })).bytes ?? new Uint8Array(0),
    takeUnsaved: async (workId) => (await wire.call('takeUnsaved', { workId })).bytes ?? new Uint8Array(0),
    dropUnsaved: async (workId) => void (await wire.call('dropUnsaved', { workId })),

    async setWindowState(state) {
      showState(state);
      await wire.call('setWindowState', state);
    },
    onCloseRequest(handler) {
      closing.push(handler);
      return () => {
        closing.splice(closing.indexOf(handler), 1);
      };
    },
    onMenuCommand: (handler) => menu.add(handler),
    onHostLost: (handler) => lost.add(handler),
  };

  /** Asks for a name until one can be used, and before a file is replaced that the user may not have in mind. */
  async function targetByName(suggested: string, openedSha256: string | null): Promise<SaveTarget | null> {
    const folder = saveFolder ?? '';
    let suggestedName = suggested;
    let problem: string | null = null;
    for (;;) {
      const name = await questions.askSaveName({ suggestedName, folder, problem });
      if (name === null) return null;
      suggestedName = name;
      try {
        const { answer } = await wire.call('targetByName', { name });
        const sameStudy = answer.existing === null || answer.existing.sha256 === openedSha256;
        if (sameStudy || (await questions.askOverwrite({ name: answer.name, folder }))) return answer;
        problem = null;
      } catch (error) {
        if (!(error instanceof Refusal)) throw error;
        problem = error.message;
      }
    }
  }
}

class Listeners<T> {
  readonly #handlers = new Set<(value: T) => void>();

  add(handler: (value: T) => void): StopListening {
    this.#handlers.add(handler);
    return () => void this.#handlers.delete(handler);
  }

  tell(value: T): void {
    for (const handler of this.#handlers) handler(value);
  }
}

async function sha256Of(bytes: Uint8Array): Promise<string> {
  const digest = new Uint8Array(await crypto.subtle.digest('SHA-256', bytes as Uint8Array<ArrayBuffer>));
  return [...digest].map((byte) => byte.toString(16).padStart(2, '0')).join('');
}
