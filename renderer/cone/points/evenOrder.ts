/** Rows that stand together in memory after reordering. */
const CHUNK = 2048;

/** A step coprime to n, near n over the golden ratio: multiples of it modulo n spread evenly over 0..n-1. */
export function evenStep(n: number): number {
  let step = Math.max(1, Math.round(n * 0.6180339887));
  while (greatestCommonDivisor(step, n) !== 1) step++;
  return step;
}

function greatestCommonDivisor(a: number, b: number): number {
  let x = a;
  let y = b;
  while (y > 0) [x, y] = [y, x % y];
  return x;
}

/**
 * Where the i-th of n rows goes so that every run of slots from the start is an even sample of all rows: rows are
 * dealt out like cards into chunks, and the chunks are put in an order that leaves no part of the catalogue behind.
 * Inside a chunk the order of the rows is kept, so neighbours in the catalogue stay near each other in memory.
 */
export class EvenOrder {
  readonly count: number;
  private readonly chunks: number;
  private readonly starts: Uint32Array;
  private readonly firsts: Uint32Array;

  constructor(count: number) {
    this.count = count;
    this.chunks = Math.max(1, Math.ceil(count / CHUNK));
    this.starts = new Uint32Array(this.chunks + 1);
    this.firsts = new Uint32Array(this.chunks);
    const step = evenStep(this.chunks);
    for (let place = 0; place < this.chunks; place++) {
      const first = (place * step) % this.chunks;
      this.firsts[place] = first;
      this.starts[place + 1] = this.starts[place]! + Math.ceil((count - first) / this.chunks);
    }
  }

  /** Calls `put(slot, row)` for the slots from..to (end excluded), in rising order. */
  forEach(from: number, to: number, put: (slot: number, row: number) => void): void {
    let place = 0;
    while (place < this.chunks && this.starts[place + 1]! <= from) place++;
    for (let slot = from; slot < to; ) {
      const end = Math.min(to, this.starts[place + 1]!);
      let row = this.firsts[place]! + (slot - this.starts[place]!) * this.chunks;
      for (; slot < end; slot++, row += this.chunks) put(slot, row);
      place++;
    }
  }
}
