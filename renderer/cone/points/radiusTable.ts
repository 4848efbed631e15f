/**
 * Comoving distance to displayed radius (0 at the observer, 1 at the far end), on an even grid, for fast work a point.
 * The scale is in grid steps for one Mpc.
 */
export interface RadiusTable {
  readonly values: Float32Array;
  readonly stepsPerMpc: number;
}

const SIZE = 4096;

/**
 * An even grid over a rising table; the radius is divided by its last value.
 *
 * @param comovingMpc rising, starts at 0
 * @param radius rising, of the same length
 */
export function radiusTable(comovingMpc: ArrayLike<number>, radius: ArrayLike<number>): RadiusTable {
  const n = comovingMpc.length;
  const farMpc = comovingMpc[n - 1]!;
  const far = radius[n - 1]!;
  const values = new Float32Array(SIZE + 1);
  for (let i = 0, j = 0; i <= SIZE; i++) {
    const at = (farMpc * i) / SIZE;
    while (j < n - 2 && comovingMpc[j + 1]! < at) j++;
    const t = (at - comovingMpc[j]!) / (comovingMpc[j + 1]! - comovingMpc[j]!);
    values[i] = (radius[j]! + t * (radius[j + 1]! - radius[j]!)) / far;
  }
  return { values, stepsPerMpc: SIZE / farMpc };
}

/** Displayed radius at a comoving distance; beyond the table the last step is carried on in a straight line. */
export function radiusAt({ values, stepsPerMpc }: RadiusTable, comovingMpc: number): number {
  const at = comovingMpc * stepsPerMpc;
  const i = Math.min(values.length - 2, Math.max(0, Math.floor(at)));
  return values[i]! + (at - i) * (values[i + 1]! - values[i]!);
}

/** The same for many points, slots from..to (end excluded). NaN stays NaN. */
export function fillRadius(
  { values, stepsPerMpc }: RadiusTable,
  comoving: Float32Array,
  radius: Float32Array,
  from: number,
  to: number,
): void {
  const last = values.length - 2;
  for (let s = from; s < to; s++) {
    const at = comoving[s]! * stepsPerMpc;
    let i = at | 0;
    if (i > last) i = last;
    radius[s] = values[i]! + (at - i) * (values[i + 1]! - values[i]!);
  }
}

/** Between two tables: 0 is the first, 1 the second. Both may end at different distances. */
export function mixTables(a: RadiusTable, b: RadiusTable, t: number): RadiusTable {
  if (t <= 0) return a;
  if (t >= 1) return b;
  const stepsPerMpc = Math.min(a.stepsPerMpc, b.stepsPerMpc);
  const values = new Float32Array(SIZE + 1);
  for (let i = 0; i <= SIZE; i++) {
    const mpc = i / stepsPerMpc;
    values[i] = (1 - t) * radiusAt(a, mpc) + t * radiusAt(b, mpc);
  }
  return { values, stepsPerMpc };
}

/** Whether two tables say the same. */
export function sameTable(a: RadiusTable, b: RadiusTable): boolean {
  return a.stepsPerMpc === b.stepsPerMpc && a.values.every((v, i) => v === b.values[i]);
}
