import type { CancelSignal } from '../../../shared-core/base/cancelled.ts';

/** Takes the bytes of a picture in order; the next piece is made when the promise is kept. */
export interface ByteSink {
  write(bytes: Uint8Array<ArrayBuffer>): Promise<void>;
}

export interface WriteOptions {
  readonly signal?: CancelSignal;
  /** 0..1 */
  readonly onProgress?: (fraction: number) => void;
}

/** A sink that keeps everything, for pictures that are small. */
export class MemorySink implements ByteSink {
  private readonly parts: Uint8Array<ArrayBuffer>[] = [];

  write(bytes: Uint8Array<ArrayBuffer>): Promise<void> {
    this.parts.push(bytes);
    return Promise.resolve();
  }

  bytes(): Uint8Array<ArrayBuffer> {
    const out = new Uint8Array(this.parts.reduce((sum, part) => sum + part.length, 0));
    let at = 0;
    for (const part of this.parts) {
      out.set(part, at);
      at += part.length;
    }
    return out;
  }
}
