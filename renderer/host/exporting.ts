import type { ExportOutcome } from '../../shared-core/bridge/contract.ts';
import { harmlessFileName } from '../../shared-core/bridge/fileNames.ts';
import { LARGEST_PIECE_BYTES } from '../../shared-core/bridge/messages.ts';
import type { Wire } from './wire.ts';

export type Exporter = (
  suggestedName: string,
  mimeType: string,
  content: Uint8Array | AsyncIterable<Uint8Array>,
) => Promise<ExportOutcome>;

/** Exports through the host, which asks where and writes piece by piece. */
export function hostExporter(wire: Wire): Exporter {
  return async (suggestedName, mimeType, content) => {
    const { answer: begun } = await wire.call('startExport', { suggestedName, mimeType });
    if (begun === null) return null;
    const { exportId, name, folder } = begun;
    try {
      for await (const piece of pieces(content))
        for (let start = 0; start < piece.length; start += LARGEST_PIECE_BYTES)
          await wire.call('addToExport', { exportId }, piece.subarray(start, start + LARGEST_PIECE_BYTES));
    } catch (error) {
      // What failed is the news; that the host gave the export up already is none.
      await wire.call('finishExport', { exportId, keep: false }).catch(() => undefined);
      throw error;
    }
    await wire.call('finishExport', { exportId, keep: true });
    return { name, folder };
  };
}

/** Exports as a download of the browser, which never overwrites a file. Pieces are collected outside the memory. */
export function downloadExporter(download: (name: string, content: Blob) => void): Exporter {
  return async (suggestedName, mimeType, content) => {
    const blobs: Blob[] = [];
    for await (const piece of pieces(content)) blobs.push(new Blob([piece as Uint8Array<ArrayBuffer>]));
    const name = harmlessFileName(suggestedName, 'export');
    download(name, new Blob(blobs, { type: mimeType }));
    return { name, folder: null };
  };
}

async function* pieces(content: Uint8Array | AsyncIterable<Uint8Array>): AsyncIterable<Uint8Array> {
  if (content instanceof Uint8Array) yield content;
  else yield* content;
}
