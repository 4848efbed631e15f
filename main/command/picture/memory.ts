import { Refusal } from '../../../shared-core/base/refusal.ts';
import { drawingBytes, memoryText } from '../../../shared-core/picture/memory.ts';

/** Bytes that reading a catalogue and drawing its picture take, and for each byte of it (measured generously). */
const BASE_BYTES = 500e6;
const BYTES_A_BYTE = 4;
/** A galaxy takes so many bytes of a catalogue, or more. */
const LEAST_ROW_BYTES = 40;

/**
 * Memory that the work may count on. macOS fills memory with what it can give back at once and does not count that
 * as free; there it is a share of the whole (our choice), elsewhere what the system calls available.
 */
export function obtainableBytes(platform: NodeJS.Platform, freeBytes: number, totalBytes: number): number {
  return platform === 'darwin' ? 0.75 * totalBytes : freeBytes;
}

/**
 * Memory that reading and drawing take together.
 * @param film the size of its frames; null for a picture
 */
export function neededBytes(
  catalogueBytes: number,
  film: { readonly widthPx: number; readonly heightPx: number } | null,
): number {
  const galaxies = catalogueBytes / LEAST_ROW_BYTES;
  const beyondPicture = drawingBytes(galaxies, film) - drawingBytes(galaxies, null);
  return BASE_BYTES + BYTES_A_BYTE * catalogueBytes + beyondPicture;
}

/** Says so before starting where memory will not be enough. @throws Refusal */
export function checkMemory(what: 'picture' | 'film', needed: number, obtainable: number): void {
  if (needed <= obtainable) return;
  const cure = what === 'film' ? 'choose a smaller size' : 'close other programs';
  throw new Refusal(
    `The ${what} needs about ${memoryText(needed)} of memory and ${memoryText(obtainable)} can be had: ${cure}, or cut the catalogue to the columns and rows you need.`,
  );
}
