import { Refusal } from '../../shared-core/base/refusal.ts';
import { utf8Bytes } from '../../shared-core/base/textCoding.ts';
import type { Scene } from './scene.ts';
import { pdfRuns } from './text/pdfText.ts';
import { bands } from './write/bands.ts';
import { Deflater } from './write/deflater.ts';
import { RowFilter } from './write/filterRows.ts';
import { pdfContent } from './write/pdfContent.ts';
import { PdfFile, pdfNumber, pdfString } from './write/pdfFile.ts';
import { pointImage } from './write/pointImage.ts';
import type { ByteSink, WriteOptions } from './write/sink.ts';
import { xmpPacket } from './write/xml.ts';

const POINTS_PER_INCH = 72;
/** The largest page that readers must accept (ISO 32000-1, annex C.2). */
const MOST_POINTS = 14_400;
const FONTS = [
  ['F1', 'Helvetica', ' /Encoding /WinAnsiEncoding'],
  ['F2', 'Helvetica-Bold', ' /Encoding /WinAnsiEncoding'],
  ['F3', 'Symbol', ''],
] as const;

/**
 * Writes a scene as one page of PDF: text, lines and shells as vectors, the galaxies as an image with opacity.
 *
 * @throws Refusal ('use'), before anything is written, for text that the fonts of every PDF reader do not have, and for a page
 * that is too large for the format; Cancelled once the signal is up
 */
export async function sceneToPdf(scene: Scene, sink: ByteSink, options: WriteOptions = {}): Promise<void> {
  checkText(scene);
  const widthPt = (scene.widthPx / scene.dpi) * POINTS_PER_INCH;
  const heightPt = (scene.heightPx / scene.dpi) * POINTS_PER_INCH;
  if (Math.max(widthPt, heightPt) > MOST_POINTS)
    throw new Refusal(
      `A page of ${scene.widthPx} x ${scene.heightPx} pixels at ${scene.dpi} dpi is larger than PDF allows (5.08 m): give a higher dpi.`,
      'use',
    );
  const file = new PdfFile(sink);
  await file.begin();
  const [catalog, pages, page, content, metadata, info] = Array.from({ length: 6 }, () => file.reserve()) as [
    number,
    number,
    number,
    number,
    number,
    number,
  ];
  const { operators, opacities } = pdfContent(scene, widthPt / scene.width);
  await compressed(file, content, '', utf8Bytes(operators) as Uint8Array<ArrayBuffer>);
  const image = scene.points.count > 0 ? await writePoints(file, scene, options) : null;
  const packet = `<?xpacket begin="\ufeff" id="W5M0MpCehiHzreSzNTczkc9d"?><x:xmpmeta xmlns:x="adobe:ns:meta/">${xmpPacket(scene.metadata)}</x:xmpmeta><?xpacket end="r"?>`;
  await file.stream(metadata, '/Type /Metadata /Subtype /XML', (put) =>
    put(utf8Bytes(packet) as Uint8Array<ArrayBuffer>),
  );
  const { title, description, credit, software, fingerprint } = scene.metadata;
  await file.object(
    info,
    `<< /Title ${pdfString(title)} /Subject ${pdfString(description)} /Author ${pdfString(credit)} /Creator ${pdfString(software)} /Keywords ${pdfString(`study sha256:${fingerprint}`)} >>`,
  );
  const fonts = FONTS.map(
    ([name, base, encoding]) => `/${name} << /Type /Font /Subtype /Type1 /BaseFont /${base}${encoding} >>`,
  );
  const states = [...opacities].map(([alpha, name]) => `/${name} << /ca ${alpha} /CA ${alpha} >>`);
  await file.object(
    page,
    `<< /Type /Page /Parent ${pages} 0 R /MediaBox [0 0 ${pdfNumber(widthPt)} ${pdfNumber(heightPt)}] /Contents ${content} 0 R ` +
      `/Group << /S /Transparency /CS /DeviceRGB >> /Resources << /Font << ${fonts.join(' ')} >> /ExtGState << ${states.join(' ')} >> ` +
      `${image === null ? '' : `/XObject << /Points ${image} 0 R >> `}>> >>`,
  );
  await file.object(pages, `<< /Type /Pages /Kids [${page} 0 R] /Count 1 >>`);
  await file.object(
    catalog,
    `<< /Type /Catalog /Pages ${pages} 0 R /Metadata ${metadata} 0 R /Lang (en) /ViewerPreferences << /DisplayDocTitle true >> >>`,
  );
  // Files with equal identifiers are taken for one: the study's fingerprint is the picture's origin.
  const id = fingerprint.slice(0, 32).padEnd(32, '0');
  await file.end(`/Root ${catalog} 0 R /Info ${info} 0 R /ID [<${id}> <${id}>]`);
}

function checkText(scene: Scene): void {
  for (const item of scene.items) {
    if (item.kind !== 'text' || pdfRuns(item.text) !== null) continue;
    const text = item.text.length > 60 ? `${item.text.slice(0, 60)}...` : item.text;
    throw new Refusal(
      `PDF pictures are written with the fonts that every reader has, for Latin and Greek letters, and "${text}" has others: choose PNG or SVG.`,
      'use',
    );
  }
}

async function compressed(
  file: PdfFile,
  number: number,
  dictionary: string,
  bytes: Uint8Array<ArrayBuffer>,
): Promise<void> {
  await file.stream(number, `${dictionary}/Filter /FlateDecode`, async (put) => {
    const deflater = new Deflater(put);
    await deflater.write(bytes);
    await deflater.end();
  });
}

/** The galaxies' colours as one image and their opacity as its mask; answers the image's number. */
async function writePoints(file: PdfFile, scene: Scene, options: WriteOptions): Promise<number> {
  const { widthPx, heightPx, tiles } = pointImage(scene);
  const [image, mask] = [file.reserve(), file.reserve()];
  const about = (space: string, colours: number): string =>
    `/Type /XObject /Subtype /Image /Width ${widthPx} /Height ${heightPx} /ColorSpace /${space} /BitsPerComponent 8 ` +
    `/Filter /FlateDecode /DecodeParms << /Predictor 15 /Colors ${colours} /Columns ${widthPx} >>`;
  // The mask is short when it is compressed, and kept until the colours are written.
  const kept: Uint8Array<ArrayBuffer>[] = [];
  const opacity = new Deflater(async (piece) => void kept.push(piece));
  const opacityRows = new RowFilter(widthPx, [3]);
  await file.stream(image, `${about('DeviceRGB', 3)} /SMask ${mask} 0 R`, async (put) => {
    const colours = new Deflater(put);
    const rows = new RowFilter(widthPx, [0, 1, 2]);
    for (const tile of bands({ widthPx, heightPx }, options)) {
      const pixels = tiles.render(tile);
      await colours.write(rows.filter(pixels));
      await opacity.write(opacityRows.filter(pixels));
    }
    await colours.end();
    await opacity.end();
  });
  await file.stream(mask, about('DeviceGray', 1), async (put) => {
    for (const piece of kept) await put(piece);
  });
  return image;
}
