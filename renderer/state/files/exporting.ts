import type { Bridge } from '../../../shared-core/bridge/contract.ts';
import type { Notices } from '../notices.ts';
import type { Guarded } from './guard.ts';

/** Writes a file that is not the study, and tells where it went. */
export type ExportFile = (
  name: string,
  mimeType: string,
  content: Uint8Array | AsyncIterable<Uint8Array>,
) => Promise<void>;

export function createExportFile(bridge: Bridge, notices: Notices, guarded: Guarded): ExportFile {
  return (name, mimeType, content) =>
    guarded(async () => {
      const done = await bridge.exportFile(name, mimeType, content);
      if (done === null) return;
      const folder = done.folder ?? "the browser's downloads";
      notices.tell(`${done.name} was written to ${folder}.`, { tone: 'fact' });
    }, undefined);
}
