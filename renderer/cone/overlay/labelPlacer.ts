/** A box on the stage, CSS pixels. */
export interface Box {
  readonly x: number;
  readonly y: number;
  readonly width: number;
  readonly height: number;
}

/** Keeps texts apart: the first to ask for a place has it. */
export class LabelPlacer {
  private readonly taken: Box[] = [];
  private readonly bounds: Box;

  constructor(bounds: Box) {
    this.bounds = bounds;
  }

  /** True, and the place is taken, when the box lies on the stage and touches no earlier one by less than `gap`. */
  place(box: Box, gap = 4): boolean {
    if (!this.isFree(box, gap)) return false;
    this.taken.push(box);
    return true;
  }

  /** Whether the box would be given a place. */
  isFree(box: Box, gap = 4): boolean {
    const { bounds } = this;
    if (box.x < bounds.x || box.y < bounds.y) return false;
    if (box.x + box.width > bounds.x + bounds.width) return false;
    if (box.y + box.height > bounds.y + bounds.height) return false;
    return !this.taken.some(
      (other) =>
        box.x < other.x + other.width + gap &&
        other.x < box.x + box.width + gap &&
        box.y < other.y + other.height + gap &&
        other.y < box.y + box.height + gap,
    );
  }

  /** Takes a place without asking: for what must stand where it stands. */
  reserve(box: Box): void {
    this.taken.push(box);
  }
}
