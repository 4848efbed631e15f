import type { GalaxyInput } from '../types.ts';
import { EvenOrder } from './evenOrder.ts';
import { GROUP, type PointArrays, type PointLayout, pointLayout, pointViews } from './pointArrays.ts';
import { fillRadius, type RadiusTable } from './radiusTable.ts';

/** The slots of one field; any run of them from the start is an even sample of its galaxies. */
export interface FieldRange {
  readonly start: number;
  readonly count: number;
}

/** What there is to a store beside its memory: it can be sent to and from a worker. */
export interface StoreParts {
  readonly count: number;
  readonly ranges: readonly FieldRange[];
  readonly layout: PointLayout;
  readonly rows: Uint32Array;
}

/** Where a store lives. */
export interface StoreMemory {
  /** Bytes before the points. */
  readonly base: number;
  /** A buffer that holds the layout. */
  allocate(layout: PointLayout): ArrayBufferLike;
  /** Numbers for so many slots. */
  rows(slots: number): Uint32Array;
}

/** Rows worked on before giving way. */
const SLICE = 8192;

const DEGREE = Math.PI / 180;

/** The galaxies in drawing order, field by field, in memory that workers can share. */
export class PointStore {
  readonly count: number;
  readonly ranges: readonly FieldRange[];
  readonly layout: PointLayout;
  readonly arrays: PointArrays;
  /** Catalogue row of each slot. */
  readonly rows: Uint32Array;

  /** @param buffer holds the arrays of the layout */
  constructor({ count, ranges, layout, rows }: StoreParts, buffer: ArrayBufferLike) {
    this.count = count;
    this.ranges = ranges;
    this.layout = layout;
    this.rows = rows;
    this.arrays = pointViews(buffer, layout);
  }

  /**
   * Steps that build a store; each yields after a few milliseconds of work so that the page stays quick.
   *
   * @param centres unit vectors of the fields' centres, three numbers each; a galaxy belongs to the nearest
   */
  static *build(
    galaxies: GalaxyInput,
    centres: ArrayLike<number>,
    table: RadiusTable,
    memory: StoreMemory,
  ): Generator<void, PointStore> {
    const fieldCount = Math.max(1, centres.length / 3);
    const { count } = galaxies;
    const read = directionReader(galaxies);
    const byField = fieldCount > 1 ? yield* sortByField(read, count, centres, fieldCount) : null;
    const ranges: FieldRange[] = [];
    let next = 0;
    for (let f = 0; f < fieldCount; f++) {
      const inField = byField ? byField.starts[f + 1]! - byField.starts[f]! : count;
      ranges.push({ start: next, count: inField });
      next += Math.ceil(inField / GROUP) * GROUP;
    }
    const layout = pointLayout(next, memory.base);
    const parts = { count, ranges, layout, rows: memory.rows(layout.slots) };
    const store = new PointStore(parts, memory.allocate(layout));
    const { arrays, rows } = store;
    const d = new Float64Array(3);
    for (let f = 0; f < fieldCount; f++) {
      const range = ranges[f]!;
      const order = new EvenOrder(range.count);
      const list = byField?.rows;
      const first = byField ? byField.starts[f]! : 0;
      for (let from = 0; from < range.count; from += SLICE) {
        const to = Math.min(range.count, from + SLICE);
        order.forEach(from, to, (place, nth) => {
          const slot = range.start + place;
          const row = list ? list[first + nth]! : nth;
          rows[slot] = row;
          read(row, d);
          arrays.x[slot] = d[0]!;
          arrays.y[slot] = d[1]!;
          arrays.z[slot] = d[2]!;
          arrays.comoving[slot] = galaxies.comovingMpc[row]!;
        });
        fillRadius(table, arrays.comoving, arrays.radius, range.start + from, range.start + to);
        yield;
      }
      const end = range.start + range.count;
      const groupEnd = Math.ceil(end / GROUP) * GROUP;
      arrays.comoving.fill(Number.NaN, end, groupEnd);
      arrays.radius.fill(Number.NaN, end, groupEnd);
    }
    return store;
  }

  /** Steps that set the colour index (0..255) of every slot from a function of row and comoving distance. */
  *colour(index: (row: number, comovingMpc: number) => number): Generator<void, true> {
    const { value, comoving } = this.arrays;
    for (const { start, count } of this.ranges) {
      for (let from = start; from < start + count; from += SLICE) {
        const to = Math.min(start + count, from + SLICE);
        for (let s = from; s < to; s++) value[s] = index(this.rows[s]!, comoving[s]!);
        yield;
      }
    }
    return true;
  }
}

type DirectionReader = (row: number, out: Float64Array) => void;

function directionReader({ directions }: GalaxyInput): DirectionReader {
  if ('x' in directions) {
    const { x, y, z } = directions;
    return (row, out) => {
      out[0] = x[row]!;
      out[1] = y[row]!;
      out[2] = z[row]!;
    };
  }
  const { raDeg, decDeg } = directions;
  return (row, out) => {
    const ra = raDeg[row]! * DEGREE;
    const dec = decDeg[row]! * DEGREE;
    const cosDec = Math.cos(dec);
    out[0] = cosDec * Math.cos(ra);
    out[1] = cosDec * Math.sin(ra);
    out[2] = Math.sin(dec);
  };
}

/** Rows grouped by the field whose centre is nearest, in their old order. */
function* sortByField(
  read: DirectionReader,
  count: number,
  centres: ArrayLike<number>,
  fieldCount: number,
): Generator<void, { starts: Uint32Array; rows: Uint32Array }> {
  const fieldOf = new Uint8Array(count);
  const starts = new Uint32Array(fieldCount + 1);
  const d = new Float64Array(3);
  for (let row = 0; row < count; row++) {
    read(row, d);
    let best = 0;
    let bestCosine = -2;
    for (let f = 0; f < fieldCount; f++) {
      const cosine = d[0]! * centres[3 * f]! + d[1]! * centres[3 * f + 1]! + d[2]! * centres[3 * f + 2]!;
      if (cosine > bestCosine) {
        best = f;
        bestCosine = cosine;
      }
    }
    fieldOf[row] = best;
    starts[best + 1]!++;
    if (row % SLICE === SLICE - 1) yield;
  }
  for (let f = 0; f < fieldCount; f++) starts[f + 1]! += starts[f]!;
  const next = starts.slice();
  const rows = new Uint32Array(count);
  for (let row = 0; row < count; row++) {
    rows[next[fieldOf[row]!]!++] = row;
    if (row % (8 * SLICE) === 0) yield;
  }
  return { starts, rows };
}
