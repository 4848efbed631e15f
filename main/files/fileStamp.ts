import { createHash, type Hash } from 'node:crypto';
import { open, stat } from 'node:fs/promises';
import { basename } from 'node:path';
import { Refusal } from '../../shared-core/base/refusal.ts';
import type { FileStamp } from '../../shared-core/bridge/messages.ts';
import { errorCode } from './fileTrouble.ts';

/** SHA-256 in hexadecimal digits. */
export function sha256Of(bytes: Uint8Array): string {
  return createHash('sha256').update(bytes).digest('hex');
}

/** Throws Refusal for anything but a regular file: a folder has no contents, a pipe or device may never end. */
export async function regularFile(path: string): Promise<{ sizeBytes: number; modifiedMs: number }> {
  const info = await stat(path);
  if (info.isDirectory())
    throw new Refusal(`${basename(path)} is a folder, a file was expected: choose a file in it.`);
  if (!info.isFile())
    throw new Refusal(
      `${basename(path)} is a device or a pipe, a file was expected: save its contents to a file first.`,
    );
  return { sizeBytes: info.size, modifiedMs: Math.floor(info.mtimeMs) };
}

/** Size, time and SHA-256 of a regular file, read as a stream. Throws Refusal or the system's error. */
export async function stampOf(path: string): Promise<FileStamp> {
  await regularFile(path);
  const file = await open(path, 'r');
  try {
    const hash = createHash('sha256');
    const sizeBytes = await hashInto(hash, file);
    const { mtimeMs } = await file.stat();
    return { sizeBytes, modifiedMs: Math.floor(mtimeMs), sha256: hash.digest('hex') };
  } finally {
    await file.close();
  }
}

/** As stampOf, and null where nothing stands. */
export async function stampOrNull(path: string): Promise<FileStamp | null> {
  try {
    return await stampOf(path);
  } catch (error) {
    if (errorCode(error) === 'ENOENT') return null;
    throw error;
  }
}

async function hashInto(hash: Hash, file: Awaited<ReturnType<typeof open>>): Promise<number> {
  const piece = Buffer.allocUnsafe(1024 * 1024);
  let total = 0;
  for (;;) {
    const { bytesRead } = await file.read(piece, 0, piece.length, null);
    if (bytesRead === 0) return total;
    hash.update(piece.subarray(0, bytesRead));
    total += bytesRead;
  }
}
