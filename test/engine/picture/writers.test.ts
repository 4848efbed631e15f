import { crc32 } from 'node:zlib';
import { unzlibSync } from 'fflate';
import { beforeAll, describe, expect, it } from 'vitest';
import { composePicture } from '../../../renderer/picture/composePicture.ts';
import { pointTiles } from '../../../renderer/picture/galaxies/tilePoints.ts';
import type { PictureFacts } from '../../../renderer/picture/numbers.ts';
import { pngTexts } from '../../../renderer/picture/renderPng.ts';
import { sceneToPdf } from '../../../renderer/picture/sceneToPdf.ts';
import { sceneToSvg } from '../../../renderer/picture/sceneToSvg.ts';
import { PngWriter } from '../../../renderer/picture/write/png.ts';
import { MemorySink } from '../../../renderer/picture/write/sink.ts';
import { Cancelled } from '../../../shared-core/base/cancelled.ts';
import { factsOf, small } from './facts.ts';

let facts: PictureFacts;
beforeAll(async () => {
  facts = await factsOf();
});

interface Chunk {
  readonly type: string;
  readonly data: Buffer;
}

/** Chunks of a PNG, their checksums held against Node's own CRC-32. */
function chunksOf(png: Buffer): Chunk[] {
  expect([...png.subarray(0, 8)]).toEqual([137, 80, 78, 71, 13, 10, 26, 10]);
  const out: Chunk[] = [];
  for (let at = 8; at < png.length; ) {
    const length = png.readUInt32BE(at);
    const type = png.toString('latin1', at + 4, at + 8);
    expect(png.readUInt32BE(at + 8 + length)).toBe(crc32(png.subarray(at + 4, at + 8 + length)));
    out.push({ type, data: png.subarray(at + 8, at + 8 + length) });
    at += 12 + length;
  }
  return out;
}

/** Rows without their filters, by the definition of ISO/IEC 15948, 9.2 (None, Sub, Up). */
function unfiltered(data: Uint8Array, rowBytes: number, pixelBytes: number): Uint8Array {
  const rows = data.length / (rowBytes + 1);
  const out = new Uint8Array(rows * rowBytes);
  for (let r = 0; r < rows; r++) {
    const filter = data[r * (rowBytes + 1)]!;
    expect(filter).toBeLessThanOrEqual(2);
    for (let i = 0; i < rowBytes; i++) {
      const a = i >= pixelBytes ? out[r * rowBytes + i - pixelBytes]! : 0;
      const b = r > 0 ? out[(r - 1) * rowBytes + i]! : 0;
      out[r * rowBytes + i] = data[r * (rowBytes + 1) + 1 + i]! + (filter === 1 ? a : filter === 2 ? b : 0);
    }
  }
  return out;
}

const pixelsOf = (chunks: readonly Chunk[], rowBytes: number, pixelBytes: number): Uint8Array =>
  unfiltered(
    unzlibSync(Buffer.concat(chunks.filter((c) => c.type === 'IDAT').map((c) => c.data))),
    rowBytes,
    pixelBytes,
  );

describe('PNG', () => {
  it.each([true, false])(
    'gives back the pixels that were put in, in bands, with opacity %s',
    async (alpha) => {
      const scene = composePicture(small(), facts);
      const tiles = pointTiles(scene.points, scene.pxPerUnit);
      const sink = new MemorySink();
      const head = { widthPx: 480, heightPx: 300, alpha, dpi: 254, texts: pngTexts(scene.metadata) };
      const writer = await PngWriter.open(sink, head);
      const whole = tiles.render({ left: 0, top: 0, width: 480, height: 300 });
      for (let top = 0; top < 300; top += 70)
        await writer.rows(whole.subarray(top * 1920, Math.min(300, top + 70) * 1920));
      await writer.end();
      const chunks = chunksOf(Buffer.from(sink.bytes()));
      expect(chunks[0]!.data.readUInt32BE(0)).toBe(480);
      expect(chunks[0]!.data.readUInt32BE(4)).toBe(300);
      const channels = alpha ? 4 : 3;
      const found = pixelsOf(chunks, 480 * channels, channels);
      const wanted = whole.filter((_, i) => alpha || i % 4 !== 3);
      expect(Buffer.from(found).equals(Buffer.from(wanted))).toBe(true);
      // 254 pixels an inch are 10 000 a metre.
      expect(chunks.find((c) => c.type === 'pHYs')!.data.readUInt32BE(0)).toBe(10_000);
      const texts = chunks.filter((c) => c.type === 'iTXt').map((c) => c.data.toString('utf8'));
      expect(texts.some((text) => text.startsWith('Title\0') && text.endsWith('Three fields'))).toBe(true);
      expect(texts.some((text) => text.endsWith(`study sha256:${'ab'.repeat(32)}`))).toBe(true);
    },
  );
});

describe('SVG', () => {
  it('holds text as text, a title and a description, the fingerprint, and the galaxies as a PNG', async () => {
    const sink = new MemorySink();
    const scene = composePicture(small({ title: 'Fields <A> & "B"', credit: 'Ostrewick' }), facts);
    await sceneToSvg(scene, sink);
    const svg = Buffer.from(sink.bytes()).toString('utf8');
    expect(svg).toContain('<title id="title">Fields &lt;A&gt; &amp; &quot;B&quot;</title>');
    expect(svg).toContain('<desc id="desc">Cone diagram');
    expect(svg).toContain(`study sha256:${'ab'.repeat(32)}`);
    expect(svg).toMatch(/<text [^>]*>comoving distance, Mpc<\/text>/);
    // 480 pixels at 100 an inch are 121.92 mm.
    expect(svg).toContain('width="121.92mm" height="76.2mm"');
    const base64 = /base64,([A-Za-z0-9+/=]+)"/.exec(svg)![1]!;
    const pixels = pixelsOf(chunksOf(Buffer.from(base64, 'base64')), 480 * 4, 4);
    const wanted = pointTiles(scene.points, scene.pxPerUnit).render({
      left: 0,
      top: 0,
      width: 480,
      height: 300,
    });
    expect(Buffer.from(pixels).equals(Buffer.from(wanted))).toBe(true);
  });

  it('turns the anchor of text that runs from right to left', async () => {
    const sink = new MemorySink();
    await sceneToSvg(composePicture(small({ title: 'סקר שדות' }), facts), sink);
    expect(Buffer.from(sink.bytes()).toString('utf8')).toMatch(
      /text-anchor="end" direction="rtl"[^>]*>סקר שדות/,
    );
  });
});

describe('PDF', () => {
  const pdfOf = async (more: object = {}): Promise<Buffer> => {
    const sink = new MemorySink();
    await sceneToPdf(composePicture(small(more), facts), sink);
    return Buffer.from(sink.bytes());
  };

  it('has a table that finds every object, streams of the length they say, and a page of the right size', async () => {
    const pdf = await pdfOf();
    const text = pdf.toString('latin1');
    const start = Number(/startxref\n(\d+)\n%%EOF\n$/.exec(text)![1]);
    const rows = text.slice(start).match(/^\d{10} \d{5} [nf] $/gm)!;
    for (const [number, row] of rows.entries())
      if (number > 0) expect(text.startsWith(`${number} 0 obj\n`, Number(row.slice(0, 10)))).toBe(true);
    for (const [, length, body] of text.matchAll(/\/Length (\d+) 0 R >>\nstream\n([\s\S]*?)\nendstream/g))
      expect(text).toContain(`\n${length} 0 obj\n${body!.length}\nendobj`);
    // 480 x 300 pixels at 100 an inch, 72 points an inch.
    expect(text).toContain('/MediaBox [0 0 345.6 216]');
  });

  it('writes the text as text, in its own encoding, and the galaxies with their opacity', async () => {
    const pdf = await pdfOf({ caption: 'Ωm – 0.3' });
    const text = pdf.toString('latin1');
    const [, stream] = /\/Filter \/FlateDecode \/Length \d+ 0 R >>\nstream\n([\s\S]*?)\nendstream/.exec(
      text,
    )!;
    const operators = Buffer.from(unzlibSync(Buffer.from(stream!, 'latin1'))).toString('latin1');
    const hex = (words: string) => Buffer.from(words, 'latin1').toString('hex');
    expect(operators).toContain(`<${hex('comoving distance, Mpc')}> Tj`);
    // Omega is W in the font Symbol, the dash 0x96 in WinAnsiEncoding (ISO 32000-1, annex D).
    expect(operators).toMatch(/\/F3 10\.5 Tf <57> Tj \/F1 10\.5 Tf <6d209620302e33> Tj/);
    const mask = /\/ColorSpace \/DeviceGray[\s\S]*?stream\n([\s\S]*?)\nendstream/.exec(text)![1]!;
    const alpha = unfiltered(unzlibSync(Buffer.from(mask, 'latin1')), 480, 1);
    const scene = composePicture(small({ caption: 'Ωm – 0.3' }), facts);
    const wanted = pointTiles(scene.points, scene.pxPerUnit).render({
      left: 0,
      top: 0,
      width: 480,
      height: 300,
    });
    expect(Buffer.from(alpha).equals(Buffer.from(wanted.filter((_, i) => i % 4 === 3)))).toBe(true);
  });

  it('refuses text that its fonts do not have, and pages beyond five metres, before it writes', async () => {
    await expect(pdfOf({ title: 'סקר' })).rejects.toThrow(/choose PNG or SVG/);
    await expect(pdfOf({ dpi: 1, widthPx: 16_384, heightPx: 16_384 })).rejects.toThrow(/higher dpi/);
  });
});

it('stops when it is cancelled, and passes on what the sink says', async () => {
  const scene = composePicture(small(), facts);
  const signal = { aborted: true };
  await expect(sceneToSvg(scene, new MemorySink(), { signal })).rejects.toThrow(Cancelled);
  await expect(sceneToPdf(scene, new MemorySink(), { signal })).rejects.toThrow(Cancelled);
  const full = { write: () => Promise.reject(new Error('no room')) };
  await expect(sceneToPdf(scene, full)).rejects.toThrow('no room');
});
