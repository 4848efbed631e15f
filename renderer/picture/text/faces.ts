import cyrillic from '@fontsource/arimo/files/arimo-cyrillic-400-normal.woff2?url';
import cyrillicBold from '@fontsource/arimo/files/arimo-cyrillic-700-normal.woff2?url';
import greek from '@fontsource/arimo/files/arimo-greek-400-normal.woff2?url';
import greekBold from '@fontsource/arimo/files/arimo-greek-700-normal.woff2?url';
import hebrew from '@fontsource/arimo/files/arimo-hebrew-400-normal.woff2?url';
import hebrewBold from '@fontsource/arimo/files/arimo-hebrew-700-normal.woff2?url';
import latin from '@fontsource/arimo/files/arimo-latin-400-normal.woff2?url';
import latinBold from '@fontsource/arimo/files/arimo-latin-700-normal.woff2?url';
import latinExtended from '@fontsource/arimo/files/arimo-latin-ext-400-normal.woff2?url';
import latinExtendedBold from '@fontsource/arimo/files/arimo-latin-ext-700-normal.woff2?url';
import ranges from '@fontsource/arimo/unicode.json';
import { Refusal } from '../../../shared-core/base/refusal.ts';
import { FACE_NAME } from './measure.ts';

const FILES = [
  ['latin', latin, latinBold],
  ['latin-ext', latinExtended, latinExtendedBold],
  ['greek', greek, greekBold],
  ['cyrillic', cyrillic, cyrillicBold],
  ['hebrew', hebrew, hebrewBold],
] as const;

let loading: Promise<unknown> | null = null;

/**
 * Loads the program's own typeface for pictures, once for a page or worker, so that a picture's letters are the same
 * on every machine; writing systems that it lacks are drawn with what the machine has.
 *
 * @throws Refusal where a file of the typeface cannot be read
 */
export async function loadFaces(): Promise<void> {
  loading ??= Promise.all(
    FILES.flatMap(([range, regular, bold]) => [load(range, regular, '400'), load(range, bold, '700')]),
  );
  try {
    await loading;
  } catch {
    loading = null;
    throw new Refusal(
      "A file of the pictures' typeface came as something else or not at all: start the program again; if it stays so, build it anew.",
    );
  }
}

async function load(range: keyof typeof ranges, url: string, weight: string): Promise<void> {
  const face = new FontFace(FACE_NAME, `url(${url})`, { weight, unicodeRange: ranges[range] });
  await face.load();
  (globalThis.document?.fonts ?? (globalThis as unknown as { fonts: FontFaceSet }).fonts).add(face);
}
