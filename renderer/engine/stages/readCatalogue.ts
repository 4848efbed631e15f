import type { Catalogue } from '../../../shared-core/catalogue/catalogue.ts';
import { loadCatalogue } from '../../../shared-core/catalogue/loadCatalogue.ts';
import { cutColumns, loadKey } from '../loadKey.ts';
import type { EngineSource, Loaded, Wanted } from '../protocol.ts';
import { startSha256 } from '../sourceBytes.ts';

interface Reading {
  readonly open: (source: EngineSource) => Promise<AsyncIterable<Uint8Array>>;
  readonly signal: AbortSignal;
  /** The part read, 0..1; null while the size is not known. */
  readonly onFraction: (fraction: number | null) => void;
}

const TELL_AFTER_BYTES = 2_000_000;

/**
 * Reads the wish's file whole, before region and cuts, and makes its fingerprint on the way.
 * @throws Refusal for a file that cannot be read; Cancelled
 */
export async function readCatalogue(
  wish: Wanted,
  source: EngineSource,
  { open, signal, onFraction }: Reading,
): Promise<{ readonly catalogue: Catalogue; readonly loaded: Loaded }> {
  const total = source.kind === 'url' ? source.sizeBytes : null;
  const hash = startSha256();
  let sizeBytes = 0;
  let told = 0;
  onFraction(0);
  const { catalogue, header, mapping } = await loadCatalogue(await open(source), {
    ...(wish.mapping === null ? {} : { mapping: wish.mapping }),
    extras: cutColumns(wish.cuts),
    contains: null,
    cuts: [],
    signal,
    onBytes: (chunk) => {
      hash.update(chunk);
      sizeBytes += chunk.length;
      if (sizeBytes - told <= TELL_AFTER_BYTES) return;
      told = sizeBytes;
      onFraction(total === null ? null : Math.min(1, sizeBytes / total));
    },
  });
  const { account } = catalogue;
  const loaded = { source, readFor: loadKey(wish), header, mapping, account };
  return { catalogue, loaded: { ...loaded, sha256: hash.digestHex(), sizeBytes } };
}
