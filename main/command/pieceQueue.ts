const JOIN_CHARACTERS = 1 << 16;

/** Text that one side adds and the other takes piece by piece; what is taken is let go of. */
export class PieceQueue implements AsyncIterable<string> {
  #ready: string[] = [];
  #growing = '';
  #ended = false;
  #failure: unknown;
  #wake: (() => void) | null = null;

  add(text: string): void {
    this.#growing += text;
    if (this.#growing.length < JOIN_CHARACTERS) return;
    this.#ready.push(this.#growing);
    this.#growing = '';
    this.#wake?.();
  }

  end(): void {
    if (this.#growing !== '') this.#ready.push(this.#growing);
    this.#growing = '';
    this.#ended = true;
    this.#wake?.();
  }

  /** Ends the taking side with an error, so that it keeps nothing of a half-made text. */
  fail(error: unknown): void {
    this.#failure = error;
    this.#ended = true;
    this.#wake?.();
  }

  async *[Symbol.asyncIterator](): AsyncIterator<string> {
    for (;;) {
      if (this.#failure !== undefined) throw this.#failure;
      const piece = this.#ready.shift();
      if (piece !== undefined) yield piece;
      else if (this.#ended) return;
      else await new Promise<void>((resume) => (this.#wake = resume));
    }
  }
}
