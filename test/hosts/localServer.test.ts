import { mkdirSync, readFileSync, writeFileSync } from 'node:fs';
import { request } from 'node:http';
import { connect } from 'node:net';
import { join } from 'node:path';
import { afterAll, beforeAll, describe, expect, it } from 'vitest';
import { passage, sameText } from '../../main/local/gate.ts';
import { type LocalServer, startLocalServer } from '../../main/local/server.ts';
import { joinFrame, splitFrame } from '../../shared-core/bridge/frame.ts';
import { pageHeaderNames, temporaryFolder } from './testHost.ts';

interface Answer {
  status: number;
  headers: Record<string, string | string[] | undefined>;
  body: Buffer;
}

describe('the local server', () => {
  const root = temporaryFolder();
  const warnings: string[] = [];
  let server: LocalServer;
  let port: number;
  let token: string;
  let origin: string;

  beforeAll(async () => {
    const windowFolder = join(root.folder, 'window');
    mkdirSync(join(windowFolder, 'assets'), { recursive: true });
    writeFileSync(join(windowFolder, 'index.html'), '<!doctype html>');
    writeFileSync(join(root.folder, 'secret.txt'), 'not for windows');
    server = await startLocalServer({
      windowFolder,
      userFolder: join(root.folder, 'own'),
      saveFolder: root.folder,
      launchPaths: [],
      port: 0,
      warn: (line) => warnings.push(line),
    });
    port = server.port;
    origin = `http://127.0.0.1:${port}`;
    token = new URL(server.address).pathname.slice(1, -1);
  });
  afterAll(async () => {
    await server.close();
    root.remove();
  });

  /** A request with exactly these headers, as any program could send it. */
  const ask = (
    path: string,
    headers: Record<string, string> = {},
    method = 'GET',
    body?: Uint8Array | string,
  ) =>
    new Promise<Answer>((resolve, reject) => {
      const asking = request({ host: '127.0.0.1', port, path, method, headers }, (response) => {
        const pieces: Buffer[] = [];
        response.on('data', (piece: Buffer) => pieces.push(piece));
        response.on('end', () =>
          resolve({
            status: response.statusCode ?? 0,
            headers: response.headers,
            body: Buffer.concat(pieces),
          }),
        );
        response.on('error', reject);
      });
      asking.on('error', reject);
      asking.end(body);
    });

  const call = (argument: unknown, headers: Record<string, string> = { origin }) =>
    ask(`/${token}/call`, headers, 'POST', frameOf(argument));
  const frameOf = (head: unknown) => joinFrame(new TextEncoder().encode(JSON.stringify(head)), null);
  const headOf = ({ body }: Answer) => JSON.parse(new TextDecoder().decode(splitFrame(body).head));

  it('has a token that cannot be guessed, other each time', async () => {
    expect(token).toMatch(/^[A-Za-z0-9_-]{32}$/);
    const other = await startLocalServer({
      windowFolder: join(root.folder, 'window'),
      userFolder: join(root.folder, 'own'),
      saveFolder: root.folder,
      launchPaths: [],
      port,
      warn: () => undefined,
    });
    expect(other.port).not.toBe(port);
    expect(other.address).not.toContain(token);
    await other.close();
  });

  it('listens on the loopback address alone', async () => {
    const reached = await new Promise((resolve) => {
      const socket = connect({ host: '127.0.0.2', port, timeout: 2000 }, () => resolve(true));
      socket.on('error', () => resolve(false));
      socket.on('timeout', () => resolve(false));
    });
    expect(reached).toBe(false);
  });

  it('answers nothing without the token, and does not tell a wrong one from any other path', async () => {
    const wrong = `${token.slice(0, -1)}${token.endsWith('A') ? 'B' : 'A'}`;
    const answers = await Promise.all(
      [
        '/',
        '/index.html',
        `/${wrong}/`,
        `/${wrong}/index.html`,
        `/${token}`,
        '/favicon.ico',
        `//${token}/`,
      ].map((path) => ask(path)),
    );
    for (const answer of answers) {
      expect(answer.status).toBe(404);
      expect(answer.body.toString()).toBe('Nothing is found here.\n');
      for (const name of pageHeaderNames) expect(answer.headers).toHaveProperty(name);
    }
    expect((await ask(`/${token}/`)).status).toBe(200);
  });

  it('refuses a foreign Host, as DNS rebinding brings it', async () => {
    for (const host of [
      'evil.example',
      `evil.example:${port}`,
      `localhost:${port}`,
      '127.0.0.1',
      `127.0.0.1:${port}.evil.example`,
    ])
      expect([host, (await ask(`/${token}/`, { host })).status]).toEqual([host, 421]);
  });

  it('refuses a foreign Origin, and one that is missing where something changes', async () => {
    for (const foreign of [
      'http://evil.example',
      'null',
      `http://localhost:${port}`,
      `https://127.0.0.1:${port}`,
      `${origin}.evil.example`,
    ]) {
      expect((await ask(`/${token}/`, { origin: foreign })).status).toBe(403);
      expect((await call({}, { origin: foreign })).status).toBe(403);
    }
    expect((await call({}, {})).status).toBe(403);
    expect((await ask(`/${token}/fingerprint`, {}, 'POST', 'abc')).status).toBe(403);
  });

  it('refuses what another site asks for', async () => {
    for (const site of ['cross-site', 'same-site'])
      expect((await ask(`/${token}/`, { 'sec-fetch-site': site })).status).toBe(403);
    for (const site of ['same-origin', 'none'])
      expect((await ask(`/${token}/`, { 'sec-fetch-site': site })).status).toBe(200);
  });

  it('knows GET, HEAD and POST only', async () => {
    for (const method of ['PUT', 'DELETE', 'OPTIONS', 'PATCH', 'TRACE'])
      expect((await ask(`/${token}/`, { origin }, method)).status).toBe(405);
    expect((await ask(`/${token}/index.html`, { origin }, 'POST')).status).toBe(404);
  });

  it.each([
    '/../secret.txt',
    '/%2e%2e/secret.txt',
    '/..%2fsecret.txt',
    '/assets/../../secret.txt',
    '/./index.html',
    '//index.html',
  ])('does not lead out of the window by %s', async (path) => {
    const answer = await ask(`/${token}${path}`);
    expect(answer.status).toBe(404);
    expect(answer.body.toString()).not.toContain('not for windows');
  });

  it('opens its window once by an address for one use', async () => {
    const { pathname } = new URL(server.addressForOneUse());
    expect(pathname).not.toContain(token);
    expect((await ask(pathname, {}, 'HEAD')).status).toBe(404);
    const first = await ask(pathname);
    expect([first.status, first.headers.location]).toEqual([303, `/${token}/`]);
    const second = await ask(pathname);
    expect([second.status, second.headers.location]).toEqual([410, undefined]);
    expect(second.body.toString()).toMatch(/used already/);
    expect((await ask('/open/guess')).status).toBe(410);
  });

  it('refuses calls that do not fit, in sentences, and goes on', async () => {
    const windowId = '0123456789abcdef';
    const messages: [unknown, RegExp][] = [
      [{ windowId, call: 'nothingKnown', argument: {} }, /no host does/],
      [{ windowId, call: 'toString', argument: {} }, /no host does/],
      [{ windowId, call: '__proto__', argument: {} }, /no host does/],
      [{ windowId, call: 'openDropped', argument: { paths: ['/etc/passwd'] } }, /no host does/],
      [{ windowId, call: 'launch', argument: { more: 1 } }, /does not fit/],
      [{ windowId, call: 'openRecent', argument: { id: '../../x' } }, /does not fit at id/],
      [{ windowId, call: 'openByDialog', argument: { purpose: 'study' } }, /has no dialogs/],
      [{ windowId, call: 'targetByDialog', argument: { suggestedName: 'x' } }, /has no dialogs/],
      [{ windowId: '', call: 'launch', argument: {} }, /does not understand/],
      [{ call: 'launch' }, /does not understand/],
      [['launch'], /does not understand/],
      ['launch', /does not understand/],
    ];
    for (const [message, words] of messages) {
      const answer = await call(message);
      expect(answer.status).toBe(200);
      expect(headOf(answer).refused).toMatch(words);
      expect(headOf(answer).refused).toMatch(/^[^\n]*:[^\n]*\.$/);
    }
    const broken = [
      new Uint8Array(0),
      new Uint8Array([0, 0, 1]),
      new Uint8Array([255, 255, 255, 255, 1]),
      joinFrame(new Uint8Array([0xff]), null),
    ];
    for (const body of broken) {
      const answer = await ask(`/${token}/call`, { origin }, 'POST', body);
      expect(headOf(answer).refused).toMatch(/cut off|does not understand/);
    }
    expect(headOf(await call({ windowId, call: 'launch', argument: {} })).answer.hostKind).toBe('local');
  });

  it('refuses a name for saving that could leave the folder', async () => {
    const windowId = '0123456789abcdef';
    for (const name of ['../x', '/etc/x', 'a/b', 'a\\b', '.hidden', 'con', 'x'.repeat(300), '', 'a\u0000b']) {
      const { refused, answer } = headOf(await call({ windowId, call: 'targetByName', argument: { name } }));
      expect([name, answer]).toEqual([name, undefined]);
      expect(refused).toMatch(/^[^\n]*\.$/);
    }
  });

  it('does not read more than the largest study', async () => {
    const limit = 65 * 1024 * 1024;
    const asking = request({
      host: '127.0.0.1',
      port,
      path: `/${token}/call`,
      method: 'POST',
      headers: { origin, 'content-length': limit + 1 },
    });
    const answer = await new Promise<string>((resolve, reject) => {
      asking.on('response', (response) => {
        let text = '';
        response.setEncoding('latin1').on('data', (piece: string) => {
          text += piece;
        });
        response.on('end', () => resolve(text));
      });
      asking.on('error', reject);
      asking.flushHeaders();
    });
    asking.destroy();
    expect(answer).toContain('more than');
  });

  it('hashes what a page sends, and stores nothing of it', async () => {
    // FIPS 180-4, example of SHA-256 for the empty message.
    const empty = 'e3b0c44298fc1c149afbf4c8996fb92427ae41e4649b934ca495991b7852b855';
    const answer = await ask(`/${token}/fingerprint`, { origin }, 'POST');
    expect(JSON.parse(answer.body.toString())).toEqual({ sizeBytes: 0, sha256: empty });
  });

  it('takes a line only with the token, the Origin and a handshake', async () => {
    const shake = (path: string, headers: Record<string, string>) =>
      new Promise<string>((resolve) => {
        const socket = connect({ host: '127.0.0.1', port }, () => {
          const all = { host: `127.0.0.1:${port}`, connection: 'Upgrade', upgrade: 'websocket', ...headers };
          const lines = Object.entries(all).map(([name, value]) => `${name}: ${value}\r\n`);
          socket.write(`GET ${path} HTTP/1.1\r\n${lines.join('')}\r\n`);
        });
        socket.once('data', (data) => {
          resolve(data.toString().split('\r\n')[0]!);
          socket.destroy();
        });
      });
    const good = { origin, 'sec-websocket-version': '13', 'sec-websocket-key': 'dGhlIHNhbXBsZSBub25jZQ==' };
    const line = `/${token}/line/0123456789abcdef`;
    expect(await shake(line, good)).toBe('HTTP/1.1 101 Switching Protocols');
    for (const [path, headers] of [
      ['/x/line/0123456789abcdef', good],
      [`/${token}/line/x`, good],
      [`/${token}/`, good],
      [line, { ...good, origin: 'http://evil.example' }],
      [line, { ...good, host: 'evil.example' }],
      [line, { ...good, 'sec-websocket-version': '8' }],
      [line, { ...good, upgrade: 'other' }],
    ] as [string, Record<string, string>][])
      expect(await shake(path, headers)).toBe('HTTP/1.1 403 Forbidden');
    expect((await ask(line, { origin })).status).toBe(426);
  });

  it('survives nonsense on the wire', async () => {
    for (const text of ['\r\n\r\n', 'GET\r\n\r\n', `GET /${token}/ HTTP/9.9\r\n\r\n`, '\u0016\u0003\u0001'])
      await new Promise<void>((resolve) => {
        const socket = connect({ host: '127.0.0.1', port }, () => socket.end(text));
        socket.on('close', () => resolve());
        socket.on('error', () => resolve());
        socket.resume();
      });
    expect((await ask(`/${token}/`)).status).toBe(200);
    expect(warnings).toEqual([]);
    expect(readFileSync(join(root.folder, 'secret.txt'), 'utf8')).toBe('not for windows');
  });
});

describe('the gate of the local server', () => {
  it('takes the path before a query or a fragment', () => {
    const keys = { port: 80, token: 'secret' };
    const at = (target: string) =>
      passage({ method: 'GET', target, headers: { host: '127.0.0.1:80' } }, keys);
    expect(at('/secret/index.html?x=/../y')).toEqual({ kind: 'page', path: 'index.html' });
    expect(at('/secret/#x')).toEqual({ kind: 'page', path: '' });
    expect(at('http://127.0.0.1:80/secret/')).toMatchObject({ kind: 'refused', status: 404 });
  });

  it('compares whole texts', () => {
    expect(sameText('abc', 'abc')).toBe(true);
    for (const other of ['abd', 'ab', 'abcd', '', 'ABC']) expect(sameText('abc', other)).toBe(false);
  });
});
