import { composePicture } from '../../../renderer/picture/composePicture.ts';
import { eachBand } from '../../../renderer/picture/renderPng.ts';
import type { TextItem } from '../../../renderer/picture/scene.ts';
import { loadFaces } from '../../../renderer/picture/text/faces.ts';
import { FONT_FAMILY, textWidth } from '../../../renderer/picture/text/measure.ts';
import { demoStudy } from '../../../renderer/state/demoStudy.ts';
import { type PictureView, pictureOptions } from '../../../shared-core/picture/options.ts';

/** Long texts at every slant across the borders of bands. */
const SLANTED: readonly TextItem[] = Array.from({ length: 24 }, (_, i) => ({
  kind: 'text',
  text: 'Comoving distance 1234 Mpc, lookback time 5.67 Gyr, ägyptisch Ωσμ',
  x: 120 + 110 * (i % 6),
  y: 100 + 130 * Math.floor(i / 6),
  anchor: (['start', 'middle', 'end'] as const)[i % 3]!,
  size: 9 + (i % 5) * 6,
  bold: i % 2 === 1,
  angle: (i * Math.PI) / 12,
  paint: { colour: [255, 255, 255], alpha: 1 },
  halo: i % 4 === 0 ? { colour: [10, 10, 10], alpha: 1, width: 4, dash: [] } : null,
}));

/** The finished pixels of a plan's picture, drawn in bands of so many pixels. */
async function drawn(view: PictureView, bandPixels: number): Promise<{ pixels: Uint8Array; bands: number }> {
  const options = pictureOptions({
    view,
    widthPx: 700,
    heightPx: 450,
    labels: [{ text: 'צביר גדול', raDeg: 212, decDeg: 12, redshift: 1 }],
  });
  const facts = {
    study: demoStudy(),
    fingerprint: '',
    selected: null,
    background: null,
    density: null,
    columns: [],
  };
  const parts: Uint8ClampedArray[] = [];
  const take = (pixels: Uint8ClampedArray): Promise<void> => {
    parts.push(pixels.slice());
    return Promise.resolve();
  };
  const scene = composePicture(options, facts);
  await eachBand({ ...scene, items: [...scene.items, ...SLANTED] }, {}, take, bandPixels);
  return { pixels: new Uint8Array(await new Blob(parts as BlobPart[]).arrayBuffer()), bands: parts.length };
}

/** How a picture in one band differs from the same in bands of so many pixels; the most of any byte. */
async function compared(view: PictureView, bandPixels: number) {
  const [whole, cut] = [await drawn(view, 1e9), await drawn(view, bandPixels)];
  let most = 0;
  for (const [i, byte] of whole.pixels.entries()) most = Math.max(most, Math.abs(byte - cut.pixels[i]!));
  return { bands: [whole.bands, cut.bands], bytes: [whole.pixels.length, cut.pixels.length], most };
}

/** Width of a text as this browser draws it over the width that layouts count with. */
async function widthRatio(text: string, weight: number): Promise<number> {
  await loadFaces();
  const context = new OffscreenCanvas(10, 10).getContext('2d')!;
  context.font = `${weight} 200px ${FONT_FAMILY}`;
  return context.measureText(text).width / textWidth(text, 200, weight);
}

Object.assign(window, { picture: { compared, widthRatio } });
declare global {
  interface Window {
    picture: { compared: typeof compared; widthRatio: typeof widthRatio };
  }
}
