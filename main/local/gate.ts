import { timingSafeEqual } from 'node:crypto';

/** What the gate looks at in a request; header names in lower case, as Node gives them. */
export interface Knock {
  method: string;
  /** The request target as it came: path and perhaps a query. */
  target: string;
  headers: Readonly<Record<string, string | string[] | undefined>>;
}

export interface Keys {
  port: number;
  /** Stands first in every path of the window. */
  token: string;
}

/** What a request that may pass asks for; `path` is below the token, without a leading slash. */
export type Passage =
  | { kind: 'enter'; key: string }
  | { kind: 'page'; path: string }
  | { kind: 'call' }
  | { kind: 'fingerprint' }
  | { kind: 'line'; windowId: string }
  | { kind: 'refused'; status: number; reason: string };

/**
 * Decides on a request to the local host before anything else is read of it.
 *
 * - Host must be this very address: a foreign name that resolves here (DNS rebinding) is refused.
 * - Origin, where it comes, must be this origin; what changes something (POST, the line) must come with it.
 * - Sec-Fetch-Site, where it comes, must be same-origin, or none for a page that the user opened themselves.
 * - The path must begin with the token; a wrong one is answered like anything that does not exist.
 */
export function passage({ method, target, headers }: Knock, { port, token }: Keys): Passage {
  const address = `127.0.0.1:${port}`;
  if (headers.host !== address) return refused(421, `Host is not ${address}`);
  const origin = headers.origin;
  if (origin !== undefined && origin !== `http://${address}`) return refused(403, 'foreign Origin');
  const site = headers['sec-fetch-site'];
  if (site !== undefined && site !== 'same-origin' && site !== 'none')
    return refused(403, 'asked for by another site');
  if (!['GET', 'HEAD', 'POST'].includes(method)) return refused(405, 'unknown method');

  const path = target.split(/[?#]/)[0]!;
  const enter = /^\/open\/([A-Za-z0-9_-]+)$/.exec(path)?.[1];
  if (enter !== undefined && method === 'GET') return { kind: 'enter', key: enter };
  const slash = path.indexOf('/', 1);
  if (slash < 0 || !sameText(path.slice(1, slash), token)) return refused(404, 'not found');
  const below = path.slice(slash + 1);

  const line = /^line\/([A-Za-z0-9_-]{8,64})$/.exec(below)?.[1];
  const changes = method === 'POST' || line !== undefined;
  if (changes && origin === undefined) return refused(403, 'no Origin');
  if (line !== undefined && method === 'GET') return { kind: 'line', windowId: line };
  if (method === 'POST') {
    if (below === 'call') return { kind: 'call' };
    if (below === 'fingerprint') return { kind: 'fingerprint' };
    return refused(404, 'not found');
  }
  return { kind: 'page', path: below };
}

/** Compares without telling by its time how much of a guess was right. */
export function sameText(a: string, b: string): boolean {
  const one = Buffer.from(a);
  const other = Buffer.from(b);
  return one.length === other.length && timingSafeEqual(one, other);
}

function refused(status: number, reason: string): Passage {
  return { kind: 'refused', status, reason };
}
