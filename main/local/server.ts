import { randomBytes } from 'node:crypto';
import { createServer, type IncomingMessage, type ServerResponse } from 'node:http';
import type { AddressInfo } from 'node:net';
import { type Duplex, Readable } from 'node:stream';
import { pipeline } from 'node:stream/promises';
import { createDesk } from '../files/desk.ts';
import { errorCode } from '../files/fileTrouble.ts';
import { answerPage, type PageAnswer, plainAnswer } from '../files/pageRequests.ts';
import { windowFiles } from '../files/windowFiles.ts';
import { answerCallRequest, answerFingerprint } from './callRequests.ts';
import { type Keys, type Passage, passage } from './gate.ts';
import { takeLine } from './line.ts';

export interface LocalServerOptions {
  windowFolder: string;
  userFolder: string;
  saveFolder: string;
  /** Absolute paths of the files that every window opens with. */
  launchPaths: string[];
  /** Taken when it is free; 0 for any. */
  port: number;
  warn(sentence: string): void;
}

export interface LocalServer {
  /** The window's address with its token: for printing in the user's own terminal only. */
  readonly address: string;
  readonly port: number;
  /**
   * An address that leads to the window once. For command lines, which other users of the machine can read: whoever
   * comes second finds it used up.
   */
  addressForOneUse(): string;
  /** True once a window has loaded. */
  wasVisited(): boolean;
  livingWindows(): number;
  /** Called whenever the last window has gone. */
  onLastWindowGone(handler: () => void): void;
  close(): Promise<void>;
}

/** Serves the window and its host's calls on 127.0.0.1, to whoever holds the token. Throws Refusal. */
export async function startLocalServer(options: LocalServerOptions): Promise<LocalServer> {
  const token = randomBytes(24).toString('base64url');
  const oneUseKeys = new Set<string>();
  const files = windowFiles(options.windowFolder);
  const windows = new Map<string, Duplex>();
  let visited = false;
  let lastGone = () => {};
  const keys: Keys = { port: 0, token };
  const origin = () => `http://127.0.0.1:${keys.port}`;

  const desk = createDesk({
    hostKind: 'local',
    userFolder: options.userFolder,
    saveFolder: options.saveFolder,
    urlOf: (id) => `${origin()}/${token}/files/${id}`,
    dialogs: null,
    windows: { setState: () => undefined, answerClose: () => undefined },
    launchPaths: () => options.launchPaths,
    warn: options.warn,
  });

  async function answer(request: IncomingMessage, response: ServerResponse): Promise<void> {
    const where = passage(knockOf(request), keys);
    switch (where.kind) {
      case 'enter':
        return await send(response, enterAnswer(oneUseKeys.delete(where.key), `/${token}/`));
      case 'page': {
        if (where.path === '') visited = true;
        const { range, 'if-range': ifRange } = request.headers;
        const asked = { method: request.method ?? '', path: where.path, range: range ?? null };
        const found = await answerPage({ ...asked, ifRange: one(ifRange) }, files, desk.handles);
        return await send(response, found);
      }
      case 'call':
        return await send(response, await answerCallRequest(request, desk));
      case 'fingerprint':
        return await send(response, await answerFingerprint(request));
      case 'line':
        return await send(
          response,
          plainAnswer(426, 'A WebSocket is expected here.', { upgrade: 'websocket' }),
        );
      case 'refused':
        return await send(response, refusalAnswer(where));
    }
  }

  const server = createServer((request, response) => {
    answer(request, response).catch((error: unknown) => {
      // A reader that goes away in the middle of a file is nothing to report.
      if (!['ERR_STREAM_PREMATURE_CLOSE', 'ECONNRESET', 'EPIPE'].includes(errorCode(error) ?? ''))
        options.warn(`An answer failed: ${error instanceof Error ? error.message : String(error)}`);
      if (response.headersSent) response.destroy();
      else
        void send(response, plainAnswer(500, 'Something failed inside the program.')).catch(() => undefined);
    });
  });
  server.on('upgrade', (request, socket) => {
    const where = passage(knockOf(request), keys);
    const { kind } = where;
    const gone = () => {
      if (kind !== 'line' || windows.get(where.windowId) !== socket) return;
      windows.delete(where.windowId);
      void desk.windowClosed(where.windowId).finally(() => windows.size === 0 && lastGone());
    };
    if (kind !== 'line' || !takeLine(request, socket, gone)) {
      socket.end('HTTP/1.1 403 Forbidden\r\nConnection: close\r\nContent-Length: 0\r\n\r\n');
      return;
    }
    windows.set(where.windowId, socket);
    desk.windowOpened(where.windowId);
  });
  // Hashing a picked file of many gigabytes takes as long as it takes; the gate has let its sender in.
  server.requestTimeout = 0;
  await listen(server, options.port);
  keys.port = (server.address() as AddressInfo).port;

  return {
    address: `${origin()}/${token}/`,
    port: keys.port,
    addressForOneUse() {
      const key = randomBytes(24).toString('base64url');
      oneUseKeys.add(key);
      return `${origin()}/open/${key}`;
    },
    wasVisited: () => visited,
    livingWindows: () => windows.size,
    onLastWindowGone(handler) {
      lastGone = handler;
    },
    async close() {
      desk.close();
      lastGone = () => {};
      for (const socket of windows.values()) socket.destroy();
      server.closeAllConnections();
      await new Promise<void>((resolve) => server.close(() => resolve()));
    },
  };
}

function knockOf(request: IncomingMessage) {
  return { method: request.method ?? '', target: request.url ?? '', headers: request.headers };
}

function enterAnswer(fresh: boolean, location: string): PageAnswer {
  if (fresh) return plainAnswer(303, 'The window is over there.', { location });
  return plainAnswer(
    410,
    'This address was used already: use the window it opened, or start the program again.',
  );
}

function refusalAnswer({ status, reason }: Extract<Passage, { kind: 'refused' }>): PageAnswer {
  return plainAnswer(status, status === 404 ? 'Nothing is found here.' : `Refused: ${reason}.`, {
    connection: 'close',
  });
}

async function send(response: ServerResponse, { status, headers, body }: PageAnswer): Promise<void> {
  response.writeHead(status, headers);
  if (body instanceof Readable) await pipeline(body, response);
  else response.end(body ?? undefined);
}

function one(value: string | string[] | undefined): string | null {
  return (Array.isArray(value) ? value[0] : value) ?? null;
}

/** Listens on the loopback address; when the wished port is taken, on any. */
async function listen(server: ReturnType<typeof createServer>, port: number): Promise<void> {
  const attempt = (wished: number) =>
    new Promise<void>((resolve, reject) => {
      server.once('error', reject);
      server.listen({ host: '127.0.0.1', port: wished, exclusive: true }, () => {
        server.removeListener('error', reject);
        resolve();
      });
    });
  await attempt(port).catch((error: unknown) => {
    if (port === 0 || !['EADDRINUSE', 'EACCES'].includes(errorCode(error) ?? '')) throw error;
    return attempt(0);
  });
}
