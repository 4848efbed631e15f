/**
 * Rows of pixels made ready for deflate: a byte that names the filter, then the row as differences to its left
 * neighbours or to the row above, whichever is smaller. The same in PNG (ISO/IEC 15948, 9) and in PDF (predictor 15).
 */
export class RowFilter {
  private readonly above: Uint8Array;
  private readonly row: Uint8Array;
  private readonly channels: readonly number[];
  private readonly rowBytes: number;

  /** @param channels which of red (0), green (1), blue (2) and opacity (3) a pixel has, in order */
  constructor(widthPx: number, channels: readonly number[]) {
    this.channels = channels;
    this.rowBytes = widthPx * channels.length;
    this.above = new Uint8Array(this.rowBytes);
    this.row = new Uint8Array(this.rowBytes);
  }

  /** @param rgba whole rows of four bytes a pixel */
  filter(rgba: Uint8ClampedArray): Uint8Array<ArrayBuffer> {
    const { rowBytes, row, above, channels } = this;
    const bytesAPixel = channels.length;
    const rows = rgba.length / 4 / (rowBytes / bytesAPixel);
    const out = new Uint8Array(rows * (rowBytes + 1));
    for (let r = 0, from = 0, to = 0; r < rows; r++, to += rowBytes + 1) {
      for (let i = 0; i < rowBytes; i += bytesAPixel, from += 4)
        for (let c = 0; c < bytesAPixel; c++) row[i + c] = rgba[from + channels[c]!]!;
      const across = this.roughness(bytesAPixel);
      const down = this.roughness(0);
      out[to] = down <= across ? 2 : 1;
      for (let i = 0; i < rowBytes; i++) {
        const before = down <= across ? above[i]! : i >= bytesAPixel ? row[i - bytesAPixel]! : 0;
        out[to + 1 + i] = row[i]! - before;
      }
      above.set(row);
    }
    return out;
  }

  /** Sum of the differences to the pixel before, or (0) to the row above, as signed bytes. */
  private roughness(step: number): number {
    const { row, above, rowBytes } = this;
    let sum = 0;
    for (let i = step; i < rowBytes; i++) {
      const difference = (row[i]! - (step === 0 ? above[i]! : row[i - step]!)) & 255;
      sum += difference < 128 ? difference : 256 - difference;
    }
    return sum;
  }
}
