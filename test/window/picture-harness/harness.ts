import { composePicture } from '../../../renderer/picture/composePicture.ts';
import { eachBand } from '../../../renderer/picture/renderPng.ts';
import { textWidth } from '../../../renderer/picture/text/measure.ts';
import { demoStudy } from '../../../renderer/state/demoStudy.ts';
import { type PictureView, pictureOptions } from '../../../shared-core/picture/options.ts';

/** The finished pixels of a plan's picture, drawn in bands of so many pixels. */
async function drawn(view: PictureView, bandPixels: number): Promise<{ pixels: Uint8Array; bands: number }> {
  const options = pictureOptions({
    view,
    widthPx: 700,
    heightPx: 450,
    labels: [{ text: 'צביר גדול', raDeg: 212, decDeg: 12, redshift: 1 }],
  });
  const facts = { study: demoStudy(), fingerprint: '', selected: null, background: null, density: null };
  const parts: Uint8ClampedArray[] = [];
  const take = (pixels: Uint8ClampedArray): Promise<void> => {
    parts.push(pixels.slice());
    return Promise.resolve();
  };
  await eachBand(composePicture(options, facts), {}, take, bandPixels);
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
function widthRatio(text: string, weight: number): number {
  const context = new OffscreenCanvas(10, 10).getContext('2d')!;
  context.font = `${weight} 200px Helvetica, Arial, 'Liberation Sans'`;
  return context.measureText(text).width / textWidth(text, 200, weight);
}

Object.assign(window, { picture: { compared, widthRatio } });
declare global {
  interface Window {
    picture: { compared: typeof compared; widthRatio: typeof widthRatio };
  }
}
