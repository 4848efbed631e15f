import { throwIfCancelled } from '../../../shared-core/base/cancelled.ts';
import type { Tile } from '../galaxies/tilePoints.ts';
import type { WriteOptions } from './sink.ts';

/** Pixels held at once: some 60 MB with the sums of light. */
const BAND_PIXELS = 1_200_000;

/** The picture in bands of whole rows from the top, with progress told after each and cancelling asked for before. */
export function* bands(
  { widthPx, heightPx }: { readonly widthPx: number; readonly heightPx: number },
  { signal, onProgress }: WriteOptions,
  bandPixels = BAND_PIXELS,
): Generator<Tile> {
  const rows = Math.max(8, Math.floor(bandPixels / widthPx));
  for (let top = 0; top < heightPx; top += rows) {
    throwIfCancelled(signal);
    yield { left: 0, top, width: widthPx, height: Math.min(rows, heightPx - top) };
    onProgress?.(Math.min(1, (top + rows) / heightPx));
  }
}
