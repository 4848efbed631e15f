/**
 * Numbers points of a space of a few dimensions so that points equal within a tolerance (in every coordinate) share
 * one number: what makes edges that two shapes share, and corners where several arcs meet, one and the same.
 */
export class NearPool {
  private readonly points: (readonly number[])[] = [];
  private readonly cells = new Map<string, number[]>();
  private readonly tolerance: number;

  constructor(tolerance: number) {
    this.tolerance = tolerance;
  }

  /** The number of the first point added that is near this one, or -1. */
  find(point: readonly number[]): number {
    for (const key of this.keys(point)) {
      for (const number of this.cells.get(key) ?? []) {
        const other = this.points[number]!;
        if (point.every((value, i) => Math.abs(value - other[i]!) <= this.tolerance)) return number;
      }
    }
    return -1;
  }

  add(point: readonly number[]): number {
    const number = this.points.length;
    this.points.push(point);
    for (const key of this.keys(point)) {
      const list = this.cells.get(key);
      if (list) list.push(number);
      else this.cells.set(key, [number]);
    }
    return number;
  }

  findOrAdd(point: readonly number[]): number {
    const found = this.find(point);
    return found >= 0 ? found : this.add(point);
  }

  /** Cells of a coarse grid that hold the point or lie within the tolerance of it: nearly always just one. */
  private keys(point: readonly number[]): string[] {
    const step = 1000 * this.tolerance;
    let keys = [''];
    for (const value of point) {
      const low = Math.round((value - this.tolerance) / step);
      const high = Math.round((value + this.tolerance) / step);
      const longer = keys.map((key) => `${key},${low}`);
      keys = low === high ? longer : [...longer, ...keys.map((key) => `${key},${high}`)];
    }
    return keys;
  }
}
