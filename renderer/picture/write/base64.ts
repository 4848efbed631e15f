import type { ByteSink } from './sink.ts';

const LETTERS = Uint8Array.from(
  'ABCDEFGHIJKLMNOPQRSTUVWXYZabcdefghijklmnopqrstuvwxyz0123456789+/',
  (letter) => letter.charCodeAt(0),
);
const EQUALS = '='.charCodeAt(0);

/** Bytes written on as base64 text (RFC 4648, section 4). */
export class Base64 implements ByteSink {
  private readonly sink: ByteSink;
  private rest: Uint8Array = new Uint8Array(0);

  constructor(sink: ByteSink) {
    this.sink = sink;
  }

  async write(bytes: Uint8Array<ArrayBuffer>): Promise<void> {
    const all = new Uint8Array(this.rest.length + bytes.length);
    all.set(this.rest);
    all.set(bytes, this.rest.length);
    const whole = all.length - (all.length % 3);
    this.rest = all.subarray(whole);
    await this.sink.write(encode(all.subarray(0, whole)));
  }

  async end(): Promise<void> {
    if (this.rest.length === 0) return;
    const padded = new Uint8Array(3);
    padded.set(this.rest);
    const out = encode(padded);
    out.fill(EQUALS, this.rest.length + 1);
    await this.sink.write(out);
  }
}

function encode(bytes: Uint8Array): Uint8Array<ArrayBuffer> {
  const out = new Uint8Array((bytes.length / 3) * 4);
  for (let i = 0, o = 0; i < bytes.length; i += 3, o += 4) {
    const three = (bytes[i]! << 16) | (bytes[i + 1]! << 8) | bytes[i + 2]!;
    for (let k = 0; k < 4; k++) out[o + k] = LETTERS[(three >> (18 - 6 * k)) & 63]!;
  }
  return out;
}
