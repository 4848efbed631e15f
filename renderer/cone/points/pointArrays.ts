/** Where each array of the points stands in one block of memory, in bytes. */
export interface PointLayout {
  readonly slots: number;
  readonly x: number;
  readonly y: number;
  readonly z: number;
  readonly comoving: number;
  readonly radius: number;
  readonly value: number;
  readonly end: number;
}

/**
 * The points as a structure of arrays. A galaxy stands in a slot; slots that hold none have radius NaN, which every
 * kernel skips. The direction is a unit vector in sky coordinates; the radius is the displayed one, 1 at the far end
 * of the radial scale; the value picks the colour.
 */
export interface PointArrays {
  readonly x: Float32Array;
  readonly y: Float32Array;
  readonly z: Float32Array;
  readonly comoving: Float32Array;
  readonly radius: Float32Array;
  readonly value: Uint8Array;
}

/** Slots are taken in groups of this many: one step of a four-wide kernel. */
export const GROUP = 4;

/** The layout of so many slots from a byte offset on; every array starts on a cache line. */
export function pointLayout(slots: number, base: number): PointLayout {
  const line = (offset: number): number => Math.ceil(offset / 64) * 64;
  const x = line(base);
  const y = line(x + 4 * slots);
  const z = line(y + 4 * slots);
  const comoving = line(z + 4 * slots);
  const radius = line(comoving + 4 * slots);
  const value = line(radius + 4 * slots);
  return { slots, x, y, z, comoving, radius, value, end: line(value + slots) };
}

/** Views on the arrays of a layout. */
export function pointViews(buffer: ArrayBufferLike, layout: PointLayout): PointArrays {
  const floats = (offset: number) => new Float32Array(buffer, offset, layout.slots);
  return {
    x: floats(layout.x),
    y: floats(layout.y),
    z: floats(layout.z),
    comoving: floats(layout.comoving),
    radius: floats(layout.radius),
    value: new Uint8Array(buffer, layout.value, layout.slots),
  };
}
