import type { CancelSignal } from '../../../base/cancelled.ts';
import { throwIfCancelled } from '../../../base/cancelled.ts';

/** What may look on while bytes are read. */
export interface ReadWatch {
  /** Every chunk as it came, before any unpacking: for a checksum of the file. */
  readonly onBytes?: ((chunk: Uint8Array) => void) | undefined;
  /** Bytes read of the file so far. */
  readonly onProgress?: ((bytesRead: number) => void) | undefined;
  readonly signal?: CancelSignal | undefined;
}

/** The same bytes, with the watchers told and cancelling asked at every chunk. */
export async function* watched(
  bytes: AsyncIterable<Uint8Array>,
  watch: ReadWatch,
): AsyncGenerator<Uint8Array> {
  let bytesRead = 0;
  throwIfCancelled(watch.signal);
  for await (const chunk of bytes) {
    throwIfCancelled(watch.signal);
    watch.onBytes?.(chunk);
    bytesRead += chunk.length;
    yield chunk;
    watch.onProgress?.(bytesRead);
  }
}

/**
 * The same bytes in blocks of exactly `size` (the last one shorter, none empty). What follows then does not depend
 * on how the source happened to cut them, and a host that gives a byte at a time costs nothing. A block is valid
 * until the next one is asked for.
 */
export async function* inBlocks(bytes: AsyncIterable<Uint8Array>, size: number): AsyncGenerator<Uint8Array> {
  const held = new Uint8Array(size);
  let filled = 0;
  for await (const chunk of bytes) {
    let at = 0;
    while (at < chunk.length) {
      if (filled === 0 && chunk.length - at >= size) {
        yield chunk.subarray(at, at + size);
        at += size;
        continue;
      }
      const taken = Math.min(size - filled, chunk.length - at);
      held.set(chunk.subarray(at, at + taken), filled);
      filled += taken;
      at += taken;
      if (filled === size) {
        yield held;
        filled = 0;
      }
    }
  }
  if (filled > 0) yield held.subarray(0, filled);
}
