import { utf8Bytes } from '../../shared-core/base/textCoding.ts';
import type { PathItem, Scene, SceneItem, Stroke, TextItem } from './scene.ts';
import { FONT_FAMILY } from './text/measure.ts';
import { isRightToLeft } from './text/writing.ts';
import { bands } from './write/bands.ts';
import { Base64 } from './write/base64.ts';
import { PngWriter } from './write/png.ts';
import { pointImage } from './write/pointImage.ts';
import type { ByteSink, WriteOptions } from './write/sink.ts';
import { xmlText, xmpPacket } from './write/xml.ts';

const MM_PER_INCH = 25.4;

/**
 * Writes a scene as SVG 1.1: text stays text, lines and shells are vectors, the galaxies one embedded PNG.
 * @throws Cancelled once the signal is up
 */
export async function sceneToSvg(scene: Scene, sink: ByteSink, options: WriteOptions = {}): Promise<void> {
  const { width, height, metadata, background } = scene;
  const say = (text: string): Promise<void> => sink.write(utf8Bytes(text) as Uint8Array<ArrayBuffer>);
  const mm = (px: number): string => number((px / scene.dpi) * MM_PER_INCH);
  await say(
    `<?xml version="1.0" encoding="UTF-8"?>\n<svg xmlns="http://www.w3.org/2000/svg" xmlns:xlink="http://www.w3.org/1999/xlink" ` +
      `width="${mm(scene.widthPx)}mm" height="${mm(scene.heightPx)}mm" viewBox="0 0 ${number(width)} ${number(height)}" ` +
      `role="img" aria-labelledby="title desc" font-family="${xmlText(FONT_FAMILY)}" stroke-linejoin="round">\n` +
      `<title id="title">${xmlText(metadata.title)}</title>\n<desc id="desc">${xmlText(metadata.description)}</desc>\n` +
      `<metadata>${xmpPacket(metadata)}</metadata>\n`,
  );
  if (background)
    await say(`<rect width="${number(width)}" height="${number(height)}" fill="${hex(background)}"/>\n`);
  for (const item of scene.items) {
    if (item.kind === 'points') await writePoints(scene, sink, say, options);
    else await say(`${itemText(item)}\n`);
  }
  await say('</svg>\n');
}

async function writePoints(
  scene: Scene,
  sink: ByteSink,
  say: (text: string) => Promise<void>,
  options: WriteOptions,
): Promise<void> {
  if (scene.points.count === 0) return;
  const { widthPx, heightPx, tiles } = pointImage(scene);
  const size = `width="${number(scene.width)}" height="${number(scene.height)}"`;
  await say(`<image ${size} preserveAspectRatio="none" xlink:href="data:image/png;base64,`);
  const base64 = new Base64(sink);
  const writer = await PngWriter.open(base64, { widthPx, heightPx, alpha: true, dpi: scene.dpi, texts: [] });
  for (const tile of bands({ widthPx, heightPx }, options)) await writer.rows(tiles.render(tile));
  await writer.end();
  await base64.end();
  await say('"/>\n');
}

function itemText(item: Exclude<SceneItem, { kind: 'points' }>): string {
  if (item.kind === 'text') return textElement(item);
  const look = `${fillText(item)}${item.stroke ? strokeText(item.stroke) : ''}`;
  if (item.kind === 'circle')
    return `<circle cx="${number(item.x)}" cy="${number(item.y)}" r="${number(item.radius)}"${look}/>`;
  return `<path d="${pathText(item)}"${look}/>`;
}

function pathText({ runs, closed }: PathItem): string {
  let out = '';
  for (const run of runs) {
    out += `M${number(run[0]!)} ${number(run[1]!)}`;
    for (let i = 2; i < run.length; i += 2) out += `L${number(run[i]!)} ${number(run[i + 1]!)}`;
    if (closed) out += 'Z';
  }
  return out;
}

function fillText(item: Exclude<SceneItem, { kind: 'points' | 'text' }>): string {
  const { fill } = item;
  if (!fill) return ' fill="none"';
  const rule = item.kind === 'path' && item.evenOdd ? ' fill-rule="evenodd"' : '';
  return ` fill="${hex(fill.colour)}"${opacity('fill', fill.alpha)}${rule}`;
}

function strokeText({ colour, alpha, width, dash }: Stroke): string {
  const dashes = dash.length > 0 ? ` stroke-dasharray="${dash.map(number).join(' ')}"` : '';
  return ` stroke="${hex(colour)}"${opacity('stroke', alpha)} stroke-width="${number(width)}"${dashes}`;
}

function textElement(item: TextItem): string {
  const { x, y, angle, halo, paint } = item;
  const turn =
    angle === 0 ? '' : ` transform="rotate(${number((angle * 180) / Math.PI)} ${number(x)} ${number(y)})"`;
  // In text that runs to the left, "start" is its right end.
  const rtl = isRightToLeft(item.text);
  const turned = { start: 'end', middle: 'middle', end: 'start' } as const;
  const anchor = rtl ? turned[item.anchor] : item.anchor;
  const place =
    `x="${number(x)}" y="${number(y)}" font-size="${number(item.size)}"${item.bold ? ' font-weight="700"' : ''}` +
    `${anchor === 'start' ? '' : ` text-anchor="${anchor}"`}${rtl ? ' direction="rtl"' : ''}${turn}`;
  const text = xmlText(item.text);
  const under = halo ? `<text ${place} fill="none" aria-hidden="true"${strokeText(halo)}>${text}</text>` : '';
  return `${under}<text ${place} fill="${hex(paint.colour)}"${opacity('fill', paint.alpha)}>${text}</text>`;
}

const opacity = (what: 'fill' | 'stroke', alpha: number): string =>
  alpha === 1 ? '' : ` ${what}-opacity="${number(alpha)}"`;

const hex = (colour: readonly number[]): string =>
  `#${colour.map((byte) => byte.toString(16).padStart(2, '0')).join('')}`;

/** A hundredth of a unit is a hundred-thousandth of the picture. */
const number = (value: number): string => String(Number(value.toFixed(value < 1 ? 4 : 2)));
