/** A set of cell numbers below 2^32 - 1: open addressing in one typed array, half full at most. */
export class CellSet {
  private readonly slots: Uint32Array;
  private readonly mask: number;

  constructor(cells: ArrayLike<number>) {
    let size = 4;
    while (size < 2 * cells.length) size *= 2;
    this.slots = new Uint32Array(size);
    this.mask = size - 1;
    for (let i = 0; i < cells.length; i++) {
      let slot = this.start(cells[i]!);
      while (this.slots[slot] !== 0) slot = (slot + 1) & this.mask;
      // Slots hold the number plus one, so that 0 can mean empty.
      this.slots[slot] = cells[i]! + 1;
    }
  }

  has(cell: number): boolean {
    let slot = this.start(cell);
    for (;;) {
      const held = this.slots[slot]!;
      if (held === 0) return false;
      if (held === cell + 1) return true;
      slot = (slot + 1) & this.mask;
    }
  }

  /** Multiplying by 2^32 over the golden ratio scatters neighbouring numbers (Knuth, TAOCP 3, 6.4). */
  private start(cell: number): number {
    return (Math.imul(cell, 0x9e3779b1) >>> 7) & this.mask;
  }
}
