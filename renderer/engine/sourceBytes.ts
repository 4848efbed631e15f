import { sha256 } from '@noble/hashes/sha2.js';
import { bytesToHex } from '@noble/hashes/utils.js';
import { makeDemoSurvey } from '../../shared-core/demo/demoSurvey.ts';
import type { EngineSource } from './protocol.ts';
import type { Surroundings } from './surroundings.ts';

/** The bytes of a source, in chunks; `signal` ends a url's, also while nothing comes. */
export async function sourceBytes(
  source: EngineSource,
  openUrl: Surroundings['openUrl'],
  signal?: AbortSignal,
): Promise<AsyncIterable<Uint8Array>> {
  return source.kind === 'url' ? openUrl(source.url, signal) : inChunks(demoBytes(source.seed));
}

let made: { readonly seed: number; readonly bytes: Uint8Array } | null = null;

// Making the survey takes seconds, and its preview, its rows and its set-aside list all ask for it.
function demoBytes(seed: number): Uint8Array {
  made = made?.seed === seed ? made : { seed, bytes: new TextEncoder().encode(makeDemoSurvey(seed).csv) };
  return made.bytes;
}

async function* inChunks(bytes: Uint8Array): AsyncIterable<Uint8Array> {
  const step = 1 << 18;
  for (let from = 0; from < bytes.length; from += step) yield bytes.subarray(from, from + step);
}

/** SHA-256 of a stream of chunks: what tells a changed file from the one a study was made with. */
export function startSha256(): { update(chunk: Uint8Array): void; digestHex(): string } {
  const hash = sha256.create();
  return { update: (chunk) => void hash.update(chunk), digestHex: () => bytesToHex(hash.digest()) };
}
