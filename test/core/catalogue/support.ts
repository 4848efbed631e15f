import { Refusal } from '../../../shared-core/base/refusal.ts';
import type { SetAsideRow } from '../../../shared-core/catalogue/catalogue.ts';
import { type LoadOptions, loadCatalogue } from '../../../shared-core/catalogue/loadCatalogue.ts';

/** Bytes in pieces of the given sizes, over and over; sizes of 0 give empty pieces. */
export async function* inPieces(
  bytes: Uint8Array,
  sizes: readonly number[] = [65_536],
): AsyncGenerator<Uint8Array> {
  let at = 0;
  for (let i = 0; at < bytes.length; i++) {
    const size = sizes[i % sizes.length]!;
    yield bytes.slice(at, at + size);
    at += size;
  }
}

export function utf8(text: string): Uint8Array {
  return new TextEncoder().encode(text);
}

export function utf16(text: string, order: 'le' | 'be', mark = true): Uint8Array {
  const bytes = Buffer.from(mark ? `\ufeff${text}` : text, 'utf16le');
  return new Uint8Array(order === 'le' ? bytes : bytes.swap16());
}

export async function* bytesOf(text: string): AsyncGenerator<Uint8Array> {
  yield utf8(text);
}

/** Loads text or bytes and hands back the rows set aside as well. */
export async function load(input: string | Uint8Array, options: LoadOptions = {}, sizes?: readonly number[]) {
  const setAside: SetAsideRow[] = [];
  const bytes = typeof input === 'string' ? utf8(input) : input;
  const loaded = await loadCatalogue(inPieces(bytes, sizes), {
    ...options,
    onSetAside: (row) => setAside.push(row),
  });
  return { ...loaded, setAside };
}

/** The sentence with which the work was refused; a test fails where it was not, or by another error. */
export async function refusalOf(work: () => unknown): Promise<Refusal> {
  try {
    await work();
  } catch (fault) {
    if (fault instanceof Refusal) return fault;
    throw fault;
  }
  throw new Error('expected a Refusal, but the work succeeded');
}
