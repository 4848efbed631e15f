import { readFile } from 'node:fs/promises';
import { basename, join } from 'node:path';
import { type CallEvent, receiveCalls } from '../../main/desktop/desktopCalls.ts';
import { DesktopWindows } from '../../main/desktop/desktopWindows.ts';
import { WINDOW_ORIGIN, WINDOW_URL } from '../../main/desktop/place.ts';
import { createPreloadApi } from '../../main/desktop/preloadApi.ts';
import { answerScheme } from '../../main/desktop/scheme.ts';
import { createDesk } from '../../main/files/desk.ts';
import { windowFiles } from '../../main/files/windowFiles.ts';
import { createBridge } from '../../renderer/host/createBridge.ts';
import { connectDesktopWire, desktopFiles } from '../../renderer/host/desktopWire.ts';
import { hostExporter } from '../../renderer/host/exporting.ts';
import type { Bridge } from '../../shared-core/bridge/contract.ts';
import type { HostEvent } from '../../shared-core/bridge/messages.ts';
import { playedUser, type TestHost, type TestHostOptions } from './testHost.ts';

export interface DesktopTestHost extends TestHost {
  readonly windows: DesktopWindows;
  /** Sends a message as any frame could. */
  invoke(channel: string, event: CallEvent, message: unknown): Promise<unknown>;
  contentsIdOf(bridge: Bridge): number;
  /** Sends an event to a window, as the main process does. */
  send(bridge: Bridge, event: unknown): void;
  readonly destroyed: number[];
}

/**
 * The desktop host with everything of its own and the preload script's functions; only Electron is played: messages
 * are cloned as between processes, dialogs answer what the played user chose.
 */
export async function openDesktopHost(options: TestHostOptions): Promise<DesktopTestHost> {
  const { folder, userFolder, windowFolder, launchPaths } = options;
  const user = playedUser();
  const windows = new DesktopWindows();
  const desk = createDesk({
    hostKind: 'desktop',
    userFolder,
    saveFolder: null,
    urlOf: (id) => `${WINDOW_ORIGIN}/files/${id}`,
    dialogs: {
      openFiles: async () => user.picks,
      saveStudy: async () => {
        user.asked.push('name');
        return user.saveName === null ? null : join(folder, user.saveName);
      },
      saveExport: async (_windowId, suggestedName) => join(folder, suggestedName),
      mayReplace: async (_windowId, path) => {
        user.asked.push(`replace ${basename(path)}`);
        return user.mayReplace;
      },
    },
    windows: {
      setState: (windowId, state) => windows.setState(windowId, state),
      answerClose: (windowId, close) => windows.answerClose(windows.contentsIdOf(windowId), close),
    },
    launchPaths: (windowId) => windows.launchPaths(windowId),
    warn: (sentence) => {
      throw new Error(`the host warned: ${sentence}`);
    },
  });
  windows.attach(desk);
  const channels = new Map<string, (event: CallEvent, message: unknown) => Promise<unknown>>();
  receiveCalls({ handle: (channel, listener) => void channels.set(channel, listener) }, desk, windows);
  const invoke = async (channel: string, event: CallEvent, message: unknown) =>
    structuredClone(await channels.get(channel)!(event, structuredClone(message)));
  const contents = new Map<Bridge, number>();
  const listening = new Map<Bridge, ((event: unknown) => void)[]>();
  const destroyed: number[] = [];
  const files = windowFiles(windowFolder);
  let nextContents = 1;

  return {
    kind: 'desktop',
    folder,
    userFolder,
    user,
    windows,
    invoke,
    destroyed,
    contentsIdOf: (bridge) => contents.get(bridge)!,
    send: (bridge, event) => {
      for (const listener of listening.get(bridge) ?? []) listener(structuredClone(event));
    },
    async openWindow() {
      const id = nextContents++;
      const listeners: ((event: unknown) => void)[] = [];
      const screen = {
        setTitle: () => undefined,
        send: (event: HostEvent) => {
          for (const listener of listeners) listener(structuredClone(event));
        },
        destroy: () => void destroyed.push(id),
      };
      windows.add(id, screen, launchPaths);
      const event: CallEvent = { sender: { id }, senderFrame: { url: WINDOW_URL, parent: null } };
      const api = createPreloadApi({
        invoke: (channel, message) => invoke(channel, event, message),
        listen: (_channel, listener) => void listeners.push(listener),
        pathOf: (file) => (file as DroppedFile).droppedFrom ?? '',
      });
      const wire = connectDesktopWire(api);
      const bridge = await createBridge({
        wire,
        files: desktopFiles(api, wire.windowId),
        exportFile: hostExporter(wire),
        questions: {
          askSaveName: () => Promise.reject(new Error('the desktop asks by dialog')),
          askOverwrite: () => Promise.reject(new Error('the desktop asks by dialog')),
        },
        pickFiles: () => Promise.reject(new Error('the desktop asks by dialog')),
        showState: () => undefined,
      });
      contents.set(bridge, id);
      listening.set(bridge, listeners);
      return bridge;
    },
    closeWindow: (bridge) => windows.remove(contents.get(bridge)!),
    load: (url, init) =>
      answerScheme(
        {
          method: init?.method ?? 'GET',
          url,
          headers: new Headers(init?.headers),
          initiatorOrigin: WINDOW_ORIGIN,
        },
        files,
        desk.handles,
      ),
    windowUrl: (path) => `${WINDOW_ORIGIN}/${path}`,
    exported: (name) => readFile(join(folder, name)).catch(() => null),
    close: async () => desk.close(),
  };
}

/** A file that Electron knows the path of. */
export class DroppedFile extends File {
  readonly droppedFrom: string;

  constructor(path: string, content: Uint8Array<ArrayBuffer>) {
    super([content], basename(path));
    this.droppedFrom = path;
  }
}
