import { Refusal } from '../../../shared-core/base/refusal.ts';

/** Bytes that the work takes beside the catalogue, and for each byte of it (measured generously). */
const BASE_BYTES = 500e6;
const BYTES_A_BYTE = 4;

/**
 * Memory that the work may count on. macOS fills memory with what it can give back at once and does not count that
 * as free; there it is a share of the whole (our choice), elsewhere what the system calls available.
 */
export function obtainableBytes(platform: NodeJS.Platform, freeBytes: number, totalBytes: number): number {
  return platform === 'darwin' ? 0.75 * totalBytes : freeBytes;
}

/** Says so before starting where the catalogue will not fit. @throws Refusal */
export function checkMemory(catalogueBytes: number, obtainable: number): void {
  const needed = BASE_BYTES + BYTES_A_BYTE * catalogueBytes;
  if (needed <= obtainable) return;
  const gb = (bytes: number): string => (bytes / 1e9).toFixed(1);
  throw new Refusal(
    `The picture needs about ${gb(needed)} GB of memory and ${gb(obtainable)} GB can be had: close other programs, or cut the catalogue to the columns and rows you need.`,
  );
}
