import { utf8Bytes } from '../../../shared-core/base/textCoding.ts';
import { crc32 } from '../../../shared-core/catalogue/formats/delimited/crc32.ts';
import { Deflater } from './deflater.ts';
import { RowFilter } from './filterRows.ts';
import type { ByteSink } from './sink.ts';

export interface PngHead {
  readonly widthPx: number;
  readonly heightPx: number;
  /** Whether pixels have an opacity. */
  readonly alpha: boolean;
  readonly dpi: number;
  /** Keyword (Latin-1, up to 79 characters) and text. */
  readonly texts: readonly (readonly [keyword: string, text: string])[];
}

const SIGNATURE = [0x89, 0x50, 0x4e, 0x47, 0x0d, 0x0a, 0x1a, 0x0a];
const METRES_PER_INCH = 0.0254;
const PIECE_BYTES = 1 << 16;

/** Writes a PNG of 8 bits a channel row by row (ISO/IEC 15948:2004); memory is bounded by the rows given at once. */
export class PngWriter {
  private readonly sink: ByteSink;
  private readonly filter: RowFilter;
  private readonly deflater: Deflater;
  private pending: Uint8Array<ArrayBuffer>[] = [];
  private pendingBytes = 0;

  private constructor(sink: ByteSink, head: PngHead) {
    this.sink = sink;
    this.filter = new RowFilter(head.widthPx, head.alpha ? [0, 1, 2, 3] : [0, 1, 2]);
    this.deflater = new Deflater(async (piece) => {
      this.pending.push(piece);
      this.pendingBytes += piece.length;
      if (this.pendingBytes >= PIECE_BYTES) await this.flush();
    });
  }

  /** Writes what stands before the pixels. */
  static async open(sink: ByteSink, head: PngHead): Promise<PngWriter> {
    const { widthPx, heightPx, alpha, dpi, texts } = head;
    await sink.write(Uint8Array.from(SIGNATURE));
    await sink.write(chunk('IHDR', [...word(widthPx), ...word(heightPx), 8, alpha ? 6 : 2, 0, 0, 0]));
    // 0: colours were meant for looking at (perceptual intent).
    await sink.write(chunk('sRGB', [0]));
    const perMetre = Math.round(dpi / METRES_PER_INCH);
    await sink.write(chunk('pHYs', [...word(perMetre), ...word(perMetre), 1]));
    for (const [keyword, text] of texts)
      await sink.write(chunk('iTXt', [...utf8Bytes(keyword), 0, 0, 0, 0, 0, ...utf8Bytes(text)]));
    return new PngWriter(sink, head);
  }

  /** @param rgba whole rows, four bytes a pixel, not premultiplied */
  async rows(rgba: Uint8ClampedArray): Promise<void> {
    await this.deflater.write(this.filter.filter(rgba));
  }

  async end(): Promise<void> {
    await this.deflater.end();
    await this.flush();
    await this.sink.write(chunk('IEND', []));
  }

  private async flush(): Promise<void> {
    const { pending } = this;
    if (pending.length === 0) return;
    this.pending = [];
    this.pendingBytes = 0;
    const data = new Uint8Array(pending.reduce((sum, part) => sum + part.length, 0));
    let at = 0;
    for (const part of pending) {
      data.set(part, at);
      at += part.length;
    }
    await this.sink.write(chunk('IDAT', data));
  }
}

const word = (value: number): number[] => [
  (value >>> 24) & 255,
  (value >>> 16) & 255,
  (value >>> 8) & 255,
  value & 255,
];

function chunk(type: string, data: ArrayLike<number>): Uint8Array<ArrayBuffer> {
  const out = new Uint8Array(12 + data.length);
  out.set(word(data.length), 0);
  for (let i = 0; i < 4; i++) out[4 + i] = type.charCodeAt(i);
  out.set(data, 8);
  out.set(word(crc32(out.subarray(4, 8 + data.length))), 8 + data.length);
  return out;
}
