/** zlib data (RFC 1950) of what is put in, handed on while it grows, so that memory does not grow with the picture. */
export class Deflater {
  private readonly writer: WritableStreamDefaultWriter<BufferSource>;
  private readonly pumping: Promise<void>;
  private failure: unknown = null;

  /** @param take is given the pieces in order and awaited before the next */
  constructor(take: (piece: Uint8Array<ArrayBuffer>) => Promise<void>) {
    const stream = new CompressionStream('deflate');
    this.writer = stream.writable.getWriter();
    this.pumping = this.pump(stream.readable.getReader(), take).catch((error: unknown) => {
      this.failure = error;
      // Lets a writer that waits for room go on to see the failure.
      void this.writer.abort(error).catch(() => undefined);
    });
  }

  async write(bytes: Uint8Array<ArrayBuffer>): Promise<void> {
    await this.writer.ready.catch(() => undefined);
    if (this.failure !== null) throw this.failure;
    await this.writer.write(bytes).catch((error: unknown) => {
      throw this.failure ?? error;
    });
  }

  async end(): Promise<void> {
    await this.writer.close().catch(() => undefined);
    await this.pumping;
    if (this.failure !== null) throw this.failure;
  }

  private async pump(
    reader: ReadableStreamDefaultReader<Uint8Array>,
    take: (piece: Uint8Array<ArrayBuffer>) => Promise<void>,
  ): Promise<void> {
    for (;;) {
      const { done, value } = await reader.read();
      if (done) return;
      await take(value as Uint8Array<ArrayBuffer>);
    }
  }
}
