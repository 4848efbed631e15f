import { once } from 'node:events';
import { readFileSync, statSync } from 'node:fs';
import { request } from 'node:http';
import { basename } from 'node:path';
import type { Duplex } from 'node:stream';
import { startLocalServer } from '../../main/local/server.ts';
import { randomId } from '../../renderer/host/checks.ts';
import { createBridge } from '../../renderer/host/createBridge.ts';
import { downloadExporter } from '../../renderer/host/exporting.ts';
import { connectLocalWire } from '../../renderer/host/localWire.ts';
import { pickedFiles } from '../../renderer/host/pickedFiles.ts';
import type { Bridge } from '../../shared-core/bridge/contract.ts';
import { playedUser, type TestHost, type TestHostOptions } from './testHost.ts';

/** The local host through its real HTTP server, with the page's real client; only the browser's dialogs are played. */
export async function openLocalHost(options: TestHostOptions): Promise<TestHost> {
  const { folder, userFolder, windowFolder, launchPaths } = options;
  const server = await startLocalServer({
    windowFolder,
    userFolder,
    saveFolder: folder,
    launchPaths,
    port: 0,
    warn: (sentence) => {
      throw new Error(`the host warned: ${sentence}`);
    },
  });
  const origin = new URL(server.address).origin;
  const user = playedUser();
  const lines = new Map<Bridge, Duplex>();
  const downloads = new Map<string, Blob>();

  /** Node's fetch sends no Origin of its own, as a browser does with what changes something. */
  const pageFetch: typeof fetch = (input, init) =>
    fetch(input, { ...init, headers: { ...Object.fromEntries(new Headers(init?.headers)), origin } });

  return {
    kind: 'local',
    folder,
    userFolder,
    user,
    async openWindow() {
      let line: Duplex | null = null;
      const wire = await connectLocalWire({
        base: server.address,
        windowId: randomId(),
        fetch: pageFetch,
        openLine: async (url, onEnd) => {
          line = await openLine(url.replace(/^ws/, 'http'), origin);
          line.once('close', onEnd);
        },
      });
      const bridge = await createBridge({
        wire,
        files: pickedFiles({
          base: server.address,
          fetch: pageFetch,
          objectUrl: (file) => URL.createObjectURL(file),
          revokeUrl: (url) => URL.revokeObjectURL(url),
        }),
        exportFile: downloadExporter((name, content) => void downloads.set(name, content)),
        questions: {
          askSaveName: async ({ problem }) => {
            user.asked.push(problem ?? 'name');
            return problem === null ? user.saveName : null;
          },
          askOverwrite: async ({ name }) => {
            user.asked.push(`replace ${name}`);
            if (!user.mayReplace) user.saveName = null;
            return user.mayReplace;
          },
        },
        pickFiles: async () => user.picks.map(fileFrom),
        showState: () => undefined,
      });
      lines.set(bridge, line!);
      return bridge;
    },
    async closeWindow(bridge) {
      const before = server.livingWindows();
      lines.get(bridge)?.destroy();
      while (server.livingWindows() === before) await new Promise((resolve) => setTimeout(resolve, 5));
    },
    load: (url, init) => fetch(url, init),
    windowUrl: (path) => server.address + path,
    exported: async (name) => {
      const blob = downloads.get(name);
      return blob === undefined ? null : new Uint8Array(await blob.arrayBuffer());
    },
    close: () => server.close(),
  };
}

/** A file as a browser hands it to a page: without its path. */
function fileFrom(path: string): File {
  const lastModified = Math.floor(statSync(path).mtimeMs);
  return new File([readFileSync(path)], basename(path), { lastModified });
}

async function openLine(url: string, origin: string): Promise<Duplex> {
  const asking = request(url, {
    headers: {
      connection: 'Upgrade',
      upgrade: 'websocket',
      origin,
      'sec-websocket-version': '13',
      'sec-websocket-key': 'dGhlIHNhbXBsZSBub25jZQ==',
    },
  });
  asking.end();
  const [response, socket] = await once(asking, 'upgrade');
  // RFC 6455, section 1.3: the answer to this very sample key.
  if (response.headers['sec-websocket-accept'] !== 's3pPLMBiTxaQ9kYGzzhZRbK+xOo=')
    throw new Error('the handshake was answered wrongly');
  socket.resume();
  return socket;
}
