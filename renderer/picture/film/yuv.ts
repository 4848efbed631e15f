/**
 * Colours of a film's frame: brightness a pixel, and two colour differences for every two by two pixels (4:2:0), by
 * ITU-R BT.709, sections 3.2 to 3.5, in the range of broadcasts (16..235, 16..240). Done here and not by the encoder,
 * so that it is the same in every browser.
 */
export class YuvFrame {
  readonly bytes: Uint8Array<ArrayBuffer>;
  private readonly widthPx: number;
  private readonly heightPx: number;

  /** @param widthPx,heightPx even */
  constructor(widthPx: number, heightPx: number) {
    this.widthPx = widthPx;
    this.heightPx = heightPx;
    this.bytes = new Uint8Array((widthPx * heightPx * 3) / 2);
  }

  /** Takes whole rows, an even number of them, that begin at an even row. @param rgba opaque, sRGB bytes */
  put(rgba: Uint8ClampedArray, top: number): void {
    const { bytes, widthPx: width } = this;
    const rows = rgba.length / (4 * width);
    const u = width * this.heightPx;
    const v = u + u / 4;
    for (let row = 0; row < rows; row += 2) {
      let y = (top + row) * width;
      let c = ((top + row) / 2) * (width / 2);
      let i = 4 * row * width;
      for (let column = 0; column < width; column += 2, i += 8, y += 2, c++) {
        const below = i + 4 * width;
        bytes[y] = lumaOf(rgba, i);
        bytes[y + 1] = lumaOf(rgba, i + 4);
        bytes[y + width] = lumaOf(rgba, below);
        bytes[y + width + 1] = lumaOf(rgba, below + 4);
        const r = (rgba[i]! + rgba[i + 4]! + rgba[below]! + rgba[below + 4]!) / 4;
        const g = (rgba[i + 1]! + rgba[i + 5]! + rgba[below + 1]! + rgba[below + 5]!) / 4;
        const b = (rgba[i + 2]! + rgba[i + 6]! + rgba[below + 2]! + rgba[below + 6]!) / 4;
        const luma = KR * r + KG * g + KB * b;
        bytes[u + c] = Math.round(128 + ((224 / 255) * (b - luma)) / 1.8556);
        bytes[v + c] = Math.round(128 + ((224 / 255) * (r - luma)) / 1.5748);
      }
    }
  }
}

const KR = 0.2126;
const KG = 0.7152;
const KB = 0.0722;

const lumaOf = (rgba: Uint8ClampedArray, i: number): number =>
  Math.round(16 + (219 / 255) * (KR * rgba[i]! + KG * rgba[i + 1]! + KB * rgba[i + 2]!));
