import { inBlocks, type ReadWatch, watched } from './byteStream.ts';
import { gunzip, isGzip } from './gunzip.ts';

// Short pieces stay in the processor's cache: PapaParse is fastest on them (measured from 64 kB to 1 MB).
const BLOCK_BYTES = 65_536;

/** A file's contents in blocks of a fixed size, unpacked when its first bytes are those of gzip. */
export async function* unpacked(
  bytes: AsyncIterable<Uint8Array>,
  watch: ReadWatch,
): AsyncGenerator<Uint8Array> {
  const blocks = inBlocks(watched(bytes, watch), BLOCK_BYTES);
  try {
    const first = await blocks.next();
    if (first.done) return;
    const all = resumed(first.value, blocks);
    yield* isGzip(first.value) ? inBlocks(gunzip(all), BLOCK_BYTES) : all;
  } finally {
    await blocks.return(undefined);
  }
}

/** What was taken off a stream to look at it, and the rest of the stream. */
export async function* resumed(
  first: Uint8Array,
  rest: AsyncIterable<Uint8Array>,
): AsyncGenerator<Uint8Array> {
  if (first.length > 0) yield first;
  yield* rest;
}
