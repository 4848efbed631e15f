const CHUNK = 65_536;

/**
 * A growing column of doubles. It grows by chunks and is joined once, so that no more than one column is in memory
 * twice at any time.
 */
export class NumberColumn {
  readonly #full: Float64Array[] = [];
  #open = new Float64Array(CHUNK);
  #filled = 0;

  push(value: number): void {
    if (this.#filled === CHUNK) {
      this.#full.push(this.#open);
      this.#open = new Float64Array(CHUNK);
      this.#filled = 0;
    }
    this.#open[this.#filled++] = value;
  }

  /** All values in one array. The column is empty afterwards. */
  join(): Float64Array {
    const joined = new Float64Array(this.#full.length * CHUNK + this.#filled);
    for (let i = 0; i < this.#full.length; i++) joined.set(this.#full[i]!, i * CHUNK);
    joined.set(this.#open.subarray(0, this.#filled), this.#full.length * CHUNK);
    this.#full.length = 0;
    this.#open = new Float64Array(CHUNK);
    this.#filled = 0;
    return joined;
  }
}
