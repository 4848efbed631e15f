import { Refusal } from '../../shared-core/base/refusal.ts';
import { z } from '../../shared-core/base/schema.ts';
import { LARGEST_STUDY_BYTES, type OpenedFile } from '../../shared-core/bridge/messages.ts';
import { randomId } from './checks.ts';
import type { PageFiles } from './wire.ts';

const hashedSchema = z.strictObject({
  sizeBytes: z.int().min(0),
  sha256: z.string().regex(/^[0-9a-f]{64}$/),
});

/** What the page needs of the browser; passed in for the test. */
export interface BrowserParts {
  base: string;
  fetch: typeof fetch;
  objectUrl(file: File): string;
  revokeUrl(url: string): void;
}

/**
 * Files that the user picked or dropped in a browser, which keeps their paths to itself: the page holds them, under
 * blob: addresses that its workers can fetch, whole or in ranges, without a copy in memory.
 */
export function pickedFiles({ base, fetch, objectUrl, revokeUrl }: BrowserParts): PageFiles {
  const held = new Map<string, File>();
  return {
    async adopt(files) {
      return files.map((file): OpenedFile => {
        const id = `picked-${randomId()}`;
        held.set(id, file);
        const { name, size: sizeBytes, lastModified: modifiedMs } = file;
        return { id, name, sizeBytes, modifiedMs, path: null, url: objectUrl(file) };
      });
    },

    async fingerprint({ id }) {
      const file = held.get(id);
      if (file === undefined) return null;
      // Sent to the host in a stream: the browser's own SHA-256 wants the whole file in memory.
      const response = await fetch(`${base}fingerprint`, { method: 'POST', body: file }).catch(() => null);
      if (!response?.ok) throw unreadable(file);
      const hashed = hashedSchema.parse(await response.json());
      if (hashed.sizeBytes !== file.size) throw unreadable(file);
      return { ...hashed, modifiedMs: file.lastModified };
    },

    async read({ id }) {
      const file = held.get(id);
      if (file === undefined) return null;
      if (file.size > LARGEST_STUDY_BYTES)
        throw new Refusal(
          `${file.name} has ${file.size} bytes, a study has at most ${LARGEST_STUDY_BYTES}: it is another kind of file, open it as a catalogue.`,
        );
      const buffer = await file.arrayBuffer().catch(() => {
        throw unreadable(file);
      });
      return new Uint8Array(buffer);
    },

    release({ id, url }) {
      if (held.delete(id)) revokeUrl(url);
    },
  };
}

// A browser lets a picked file be read only while it is unchanged.
function unreadable(file: File): Refusal {
  return new Refusal(
    `${file.name} cannot be read any more, it was changed or moved since it was picked: pick it again.`,
  );
}
