import type { Vec3 } from '../../cone/geometry/vector.ts';

/** A function that gives the number of the field whose centre is nearest to a direction; 0 where there is none. */
export function fieldOfAll(centres: readonly Vec3[]): (x: number, y: number, z: number) => number {
  if (centres.length < 2) return () => 0;
  const flat = Float64Array.from(centres.flat());
  return (x, y, z) => {
    let field = 0;
    let best = -2;
    for (let f = 0; 3 * f < flat.length; f++) {
      const cosine = x * flat[3 * f]! + y * flat[3 * f + 1]! + z * flat[3 * f + 2]!;
      if (cosine > best) {
        best = cosine;
        field = f;
      }
    }
    return field;
  };
}
