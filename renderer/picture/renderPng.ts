import { Refusal } from '../../shared-core/base/refusal.ts';
import { pointTiles } from './galaxies/tilePoints.ts';
import type { Scene, SceneMetadata } from './scene.ts';
import { loadFaces } from './text/faces.ts';
import { bands } from './write/bands.ts';
import { paintTile } from './write/canvasScene.ts';
import { PngWriter } from './write/png.ts';
import type { ByteSink, WriteOptions } from './write/sink.ts';

/**
 * Writes a scene as PNG, band by band: memory does not grow with the picture's height. Needs OffscreenCanvas for
 * text and lines (a page or a worker); galaxies are drawn without it.
 *
 * @throws Cancelled once the signal is up; Refusal where memory for a band, or the typeface, cannot be had
 */
export async function renderPng(scene: Scene, sink: ByteSink, options: WriteOptions = {}): Promise<void> {
  const { widthPx, heightPx, dpi, background } = scene;
  const writer = await PngWriter.open(sink, {
    widthPx,
    heightPx,
    alpha: background === null,
    dpi,
    texts: pngTexts(scene.metadata),
  });
  await eachBand(scene, options, (pixels) => writer.rows(pixels));
  await writer.end();
}

/**
 * Rows drawn above and below a band and thrown away: where a line meets the border of what is drawn, the browser
 * smooths it otherwise than in one piece.
 */
const MARGIN_ROWS = 16;

/** The finished pixels of each band, from the top. @param bandPixels how many at once; for tests */
export async function eachBand(
  scene: Scene,
  options: WriteOptions,
  take: (rgba: Uint8ClampedArray) => Promise<void>,
  bandPixels?: number,
): Promise<void> {
  await loadFaces();
  const tiles = pointTiles(scene.points, scene.pxPerUnit);
  let canvas: OffscreenCanvas | null = null;
  let layer: OffscreenCanvas | null = null;
  for (const tile of bands(scene, options, bandPixels)) {
    const wide = { ...tile, top: tile.top - MARGIN_ROWS, height: tile.height + 2 * MARGIN_ROWS };
    canvas ??= new OffscreenCanvas(wide.width, wide.height);
    layer ??= new OffscreenCanvas(tile.width, tile.height);
    // Drawn by the CPU: the same pixels on every machine of one browser.
    const context = canvas.getContext('2d', { willReadFrequently: true });
    const points = layer.getContext('2d', { willReadFrequently: true });
    if (!context || !points)
      throw new Refusal(
        `Memory ran short for a band of ${tile.width} x ${tile.height} pixels: close other programs, or choose a smaller size.`,
      );
    const galaxies = tiles.render(tile);
    const source = layer;
    paintTile(context, scene, wide, (onto) => {
      points.putImageData(new ImageData(galaxies, tile.width, tile.height), 0, 0);
      onto.globalAlpha = 1;
      onto.drawImage(source, 0, 0, tile.width, tile.height, 0, MARGIN_ROWS, tile.width, tile.height);
    });
    await take(context.getImageData(0, MARGIN_ROWS, tile.width, tile.height).data);
  }
}

/** Keywords registered for PNG (ISO/IEC 15948, 11.3.4.2), and the study's fingerprint under Source. */
export function pngTexts(metadata: SceneMetadata): (readonly [string, string])[] {
  const { title, description, credit, software, fingerprint } = metadata;
  const texts: (readonly [string, string])[] = [
    ['Title', title],
    ['Description', description],
    ['Software', software],
    ['Source', `study sha256:${fingerprint}`],
  ];
  if (credit !== '') texts.push(['Copyright', credit]);
  return texts;
}
