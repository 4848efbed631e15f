import type { PreparedField } from '../geometry/preparedField.ts';
import { project } from '../geometry/projection.ts';
import type { Vec3 } from '../geometry/vector.ts';
import type { Pen, Point } from './pen.ts';

/** The outline of a field at one displayed radius. */
export function outlineAt(
  field: PreparedField,
  matrix: ArrayLike<number>,
  radius: number,
): (Point | null)[][] {
  return field.rings.map((ring) => {
    const out: (Point | null)[] = [];
    for (let i = 0; i < ring.length; i += 3) {
      out.push(project(matrix, ring[i]!, ring[i + 1]!, ring[i + 2]!, radius));
    }
    if (out.length > 0) out.push(out[0]!);
    return out;
  });
}

/** A full circle of a radius about the observer in the plane of two axes of display space. */
export function circleAt(
  displayMatrix: ArrayLike<number>,
  radius: number,
  u: Vec3 = [1, 0, 0],
  v: Vec3 = [0, 1, 0],
): (Point | null)[] {
  const steps = 180;
  const out: (Point | null)[] = [];
  for (let i = 0; i <= steps; i++) {
    const c = Math.cos((2 * Math.PI * i) / steps);
    const s = Math.sin((2 * Math.PI * i) / steps);
    out.push(project(displayMatrix, c * u[0] + s * v[0], c * u[1] + s * v[1], c * u[2] + s * v[2], radius));
  }
  return out;
}

/** Straight edges of the solid between two radii, where its outline has corners. */
export function drawCorners(
  pen: Pen,
  field: PreparedField,
  matrix: ArrayLike<number>,
  inner: number,
  outer: number,
  colour: string,
  widthPx: number,
): void {
  for (const [x, y, z] of field.corners) {
    pen.line([project(matrix, x, y, z, inner), project(matrix, x, y, z, outer)], colour, widthPx);
  }
}
