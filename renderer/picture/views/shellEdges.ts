import { project } from '../../cone/geometry/projection.ts';
import type { Pen } from '../../cone/overlay/pen.ts';
import type { PaintedLane } from '../../cone/overlay/scene.ts';

/** Outline of a field at the shell's two radii, and the edges of its walls between them. */
export function paintShellEdges(
  pen: Pen,
  { shape, matrix }: PaintedLane,
  [inner, outer]: readonly [number, number],
  css: string,
): void {
  for (const ring of shape.rings) {
    for (const radius of [inner, outer]) {
      const line = [];
      for (let i = 0; i <= ring.length; i += 3) {
        const k = i % ring.length;
        line.push(project(matrix, ring[k]!, ring[k + 1]!, ring[k + 2]!, radius));
      }
      pen.line(line, css, 0.8);
    }
  }
  for (const [x, y, z] of shape.corners)
    pen.line([project(matrix, x, y, z, inner), project(matrix, x, y, z, outer)], css, 0.8);
}
