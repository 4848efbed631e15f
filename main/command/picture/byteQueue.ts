/** Bytes that one side adds and the other takes; `add` waits until they were taken, so that few are held. */
export class ByteQueue implements AsyncIterable<Uint8Array> {
  private readonly waiting: { readonly bytes: Uint8Array; readonly taken: () => void }[] = [];
  private ended = false;
  private failure: Error | null = null;
  private wake: () => void = () => undefined;

  /** @throws what `fail` was given, once it was */
  async add(bytes: Uint8Array): Promise<void> {
    if (this.failure !== null) throw this.failure;
    await new Promise<void>((taken) => {
      this.waiting.push({ bytes, taken });
      this.wake();
    });
  }

  end(): void {
    this.ended = true;
    this.wake();
  }

  /** Ends both sides with an error. */
  fail(error: Error): void {
    this.failure ??= error;
    for (const { taken } of this.waiting.splice(0)) taken();
    this.wake();
  }

  async *[Symbol.asyncIterator](): AsyncIterator<Uint8Array> {
    for (;;) {
      if (this.failure !== null) throw this.failure;
      const next = this.waiting.shift();
      if (next) {
        yield next.bytes;
        next.taken();
      } else if (this.ended) return;
      else
        await new Promise<void>((resolve) => {
          this.wake = resolve;
        });
    }
  }
}
