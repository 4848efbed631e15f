const FIRST_CHUNK = 1024;
const LARGEST_CHUNK = 65_536;

/**
 * A growing column of doubles. It grows by chunks (a small catalogue costs little, a large one no more than a chunk
 * too much) and is joined once, so that no more than one column is in memory twice at any time.
 */
export class NumberColumn {
  readonly #full: Float64Array[] = [];
  #open = new Float64Array(FIRST_CHUNK);
  #filled = 0;

  push(value: number): void {
    if (this.#filled === this.#open.length) {
      this.#full.push(this.#open);
      this.#open = new Float64Array(Math.min(2 * this.#filled, LARGEST_CHUNK));
      this.#filled = 0;
    }
    this.#open[this.#filled++] = value;
  }

  /** All values in one array. The column is spent afterwards. */
  join(): Float64Array {
    this.#full.push(this.#open.subarray(0, this.#filled));
    const joined = new Float64Array(this.#full.reduce((length, chunk) => length + chunk.length, 0));
    let at = 0;
    for (const chunk of this.#full) {
      joined.set(chunk, at);
      at += chunk.length;
    }
    this.#full.length = 0;
    this.#open = new Float64Array(FIRST_CHUNK);
    this.#filled = 0;
    return joined;
  }
}
