/** Bytes of a page of WebAssembly memory. */
export const PAGE_BYTES = 65536;
/** Addresses are 32 bits wide. */
const MOST_PAGES = 65536;

/**
 * Shared memory of so many bytes that can grow; a smaller promise where the machine does not give the whole address
 * space.
 *
 * @throws RangeError where there is none
 */
export function sharedMemory(bytes: number): WebAssembly.Memory {
  const initial = Math.ceil(bytes / PAGE_BYTES);
  for (const maximum of [MOST_PAGES, MOST_PAGES / 2, MOST_PAGES / 4, initial + 8192]) {
    if (maximum < initial) continue;
    try {
      return new WebAssembly.Memory({ initial, maximum, shared: true });
    } catch (error) {
      if (!(error instanceof RangeError)) throw error;
    }
  }
  throw new RangeError('no memory for the points');
}
