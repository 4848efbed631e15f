/**
 * Numbers points so that points equal within a tolerance (in every coordinate) share one number: what makes the corner
 * where several arcs meet one and the same for all of them.
 */
export class NearPool {
  private readonly points: (readonly number[])[] = [];
  private readonly cells = new Map<string, number[]>();
  private readonly tolerance: number;

  constructor(tolerance: number) {
    this.tolerance = tolerance;
  }

  /** The number of the first point added that is near this one; a new number if there is none. */
  numberOf(point: readonly number[]): number {
    const keys = this.keys(point);
    for (const key of keys) {
      for (const number of this.cells.get(key) ?? []) {
        const other = this.points[number]!;
        if (point.every((value, i) => Math.abs(value - other[i]!) <= this.tolerance)) return number;
      }
    }
    const number = this.points.length;
    this.points.push(point);
    for (const key of keys) {
      const list = this.cells.get(key);
      if (list) list.push(number);
      else this.cells.set(key, [number]);
    }
    return number;
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
