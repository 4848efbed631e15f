import { open } from 'node:fs/promises';
import type { Readable } from 'node:stream';
import { byteRange } from './byteRange.ts';
import type { FileHandles } from './fileHandles.ts';
import { PAGE_HEADERS } from './pageHeaders.ts';
import type { WindowFile } from './windowFiles.ts';

export interface PageRequest {
  method: string;
  /** Below the window's own place, without a leading slash and as it came, still percent-encoded. */
  path: string;
  range: string | null;
  ifRange: string | null;
}

export interface PageAnswer {
  status: number;
  headers: Record<string, string>;
  body: Readable | Uint8Array | string | null;
}

/**
 * Answers what a window loads, the same in both hosts: the window's own files by name, and the files that the user
 * gave by id ("files/ID"), streamed, with ranges. Anything else is not found; nothing is listed.
 */
export async function answerPage(
  { method, path, range, ifRange }: PageRequest,
  windowFiles: ReadonlyMap<string, WindowFile>,
  handles: Pick<FileHandles, 'find'>,
): Promise<PageAnswer> {
  if (method !== 'GET' && method !== 'HEAD')
    return plainAnswer(405, 'Only GET and HEAD are answered here.', { allow: 'GET, HEAD' });
  const id = /^files\/([A-Za-z0-9_-]+)$/.exec(path)?.[1];
  const granted = id === undefined ? undefined : handles.find(id);
  if (granted !== undefined)
    return await answerFile(granted, 'application/octet-stream', method, range, ifRange);
  const own = windowFiles.get(path === '' ? 'index.html' : path);
  if (own !== undefined) return await answerFile(own.path, own.type, method, null, null);
  return plainAnswer(404, 'Nothing is found here.');
}

export function plainAnswer(
  status: number,
  sentence: string,
  headers: Record<string, string> = {},
): PageAnswer {
  const type = { 'content-type': 'text/plain; charset=utf-8' };
  return { status, headers: { ...PAGE_HEADERS, ...type, ...headers }, body: `${sentence}\n` };
}

async function answerFile(
  path: string,
  type: string,
  method: string,
  rangeHeader: string | null,
  ifRange: string | null,
): Promise<PageAnswer> {
  const file = await open(path, 'r').catch(() => null);
  if (file === null) return plainAnswer(410, 'The file is not there any more, or may not be read.');
  try {
    const info = await file.stat();
    if (!info.isFile()) {
      await file.close();
      return plainAnswer(410, 'The file is not a regular file any more.');
    }
    const etag = `"${info.size.toString(16)}-${Math.floor(info.mtimeMs * 1000).toString(16)}"`;
    const headers = { ...PAGE_HEADERS, 'content-type': type, 'accept-ranges': 'bytes', etag };
    // A part is only of use to a reader whose other parts are of the same contents (RFC 9110, section 13.1.5).
    const range = byteRange(ifRange !== null && ifRange !== etag ? null : rangeHeader, info.size);
    if (range.kind === 'outside') {
      await file.close();
      return { status: 416, headers: { ...headers, 'content-range': `bytes */${info.size}` }, body: null };
    }
    const { start, end } = range.kind === 'part' ? range : { start: 0, end: info.size - 1 };
    const length = { 'content-length': String(end - start + 1) };
    const part = range.kind === 'part' ? { 'content-range': `bytes ${start}-${end}/${info.size}` } : {};
    const status = range.kind === 'part' ? 206 : 200;
    const empty = method === 'HEAD' || end < start;
    if (empty) await file.close();
    // A large step keeps the number of calls small while one gigabyte streams.
    const body = empty ? null : file.createReadStream({ start, end, highWaterMark: 1024 * 1024 });
    return { status, headers: { ...headers, ...length, ...part }, body };
  } catch (error) {
    await file.close().catch(() => undefined);
    throw error;
  }
}
