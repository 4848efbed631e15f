import { createReadStream } from 'node:fs';
import { open, stat } from 'node:fs/promises';
import { resolve } from 'node:path';
import { Refusal } from '../../shared-core/base/refusal.ts';
import { fileRefusal } from '../files/fileTrouble.ts';

const LARGEST_TEXT_BYTES = 64 * 1024 * 1024;

/** A path as the person meant it: npm runs the command from the project's folder, they stood in another. */
export function fromHere(path: string): string {
  return resolve(process.env.INIT_CWD ?? process.cwd(), path);
}

/** Size of a file that can be read. @throws Refusal: no such file, a folder, no right to read */
export async function readableSize(path: string): Promise<number> {
  const found = await stat(path).catch((error: unknown) => {
    throw fileRefusal(error, path, 'be read');
  });
  if (found.isDirectory()) throw new Refusal(`${path} is a folder, a file was expected: name a file in it.`);
  const handle = await open(path, 'r').catch((error: unknown) => {
    throw fileRefusal(error, path, 'be read');
  });
  await handle.close();
  return found.size;
}

/** The bytes of a file in chunks. */
export async function* fileBytes(path: string): AsyncIterable<Uint8Array> {
  try {
    yield* createReadStream(path, { highWaterMark: 1 << 18 });
  } catch (error) {
    throw fileRefusal(error, path, 'be read');
  }
}

/** A small text file, whole. @throws Refusal */
export async function readTextFile(path: string, what: string): Promise<string> {
  const place = fromHere(path);
  const size = await readableSize(place);
  if (size > LARGEST_TEXT_BYTES)
    throw new Refusal(`${place} holds ${size} bytes, too many for ${what}: name another file.`);
  const parts: Uint8Array[] = [];
  for await (const part of fileBytes(place)) parts.push(part);
  return Buffer.concat(parts).toString('utf8');
}
