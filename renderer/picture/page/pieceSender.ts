import type { ByteSink } from '../write/sink.ts';

const PIECE_BYTES = 1 << 20;

/** Gathers small pieces into larger ones and sends them in order, each after the one before has arrived. */
export class PieceSender implements ByteSink {
  sentBytes = 0;
  private readonly send: (bytes: Uint8Array<ArrayBuffer>) => Promise<unknown>;
  private readonly held = new Uint8Array(PIECE_BYTES);
  private heldBytes = 0;

  constructor(send: (bytes: Uint8Array<ArrayBuffer>) => Promise<unknown>) {
    this.send = send;
  }

  async write(bytes: Uint8Array<ArrayBuffer>): Promise<void> {
    for (let from = 0; from < bytes.length; ) {
      const part = bytes.subarray(from, from + PIECE_BYTES - this.heldBytes);
      this.held.set(part, this.heldBytes);
      this.heldBytes += part.length;
      from += part.length;
      if (this.heldBytes === PIECE_BYTES) await this.flush();
    }
  }

  async end(): Promise<void> {
    await this.flush();
  }

  private async flush(): Promise<void> {
    if (this.heldBytes === 0) return;
    const piece = this.held.slice(0, this.heldBytes);
    this.heldBytes = 0;
    await this.send(piece);
    this.sentBytes += piece.length;
  }
}
