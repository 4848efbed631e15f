import type { SphereMesh } from './triangulate.ts';

/**
 * The solid between two radii over a piece of sky. Every point is a direction and which of the two radii it stands
 * on (0 inner, 1 outer), so that one mesh serves all shells of a field and dragging an edge changes two numbers.
 */
export interface ShellMesh {
  readonly directions: Float32Array;
  /** 0 or 1 for each point. */
  readonly ends: Float32Array;
  readonly triangles: Uint32Array;
  /** Of the triangles (in indices), where the side walls begin: before it the outer, then the inner cap. */
  readonly wallStart: number;
}

/** Caps from the sphere mesh (inner one turned round), walls along the rings. */
export function shellMesh(cap: SphereMesh, rings: readonly ArrayLike<number>[]): ShellMesh {
  const capPoints = cap.directions.length / 3;
  const ringPoints = rings.reduce((sum, ring) => sum + ring.length / 3, 0);
  const total = 2 * capPoints + 2 * ringPoints;
  const directions = new Float32Array(total * 3);
  const ends = new Float32Array(total);
  directions.set(cap.directions, 0);
  directions.set(cap.directions, capPoints * 3);
  ends.fill(1, 0, capPoints);
  const capIndices = cap.triangles.length;
  const triangles = new Uint32Array(2 * capIndices + 6 * ringPoints);
  triangles.set(cap.triangles, 0);
  for (let i = 0; i < capIndices; i += 3) {
    triangles[capIndices + i] = capPoints + cap.triangles[i]!;
    triangles[capIndices + i + 1] = capPoints + cap.triangles[i + 2]!;
    triangles[capIndices + i + 2] = capPoints + cap.triangles[i + 1]!;
  }
  let point = 2 * capPoints;
  let index = 2 * capIndices;
  for (const ring of rings) {
    const n = ring.length / 3;
    const first = point;
    for (let i = 0; i < n; i++) {
      for (let end = 0; end < 2; end++) {
        directions[point * 3] = ring[3 * i]!;
        directions[point * 3 + 1] = ring[3 * i + 1]!;
        directions[point * 3 + 2] = ring[3 * i + 2]!;
        ends[point++] = end;
      }
    }
    for (let i = 0; i < n; i++) {
      const a = first + 2 * i;
      const b = first + 2 * ((i + 1) % n);
      // Interior to the left of a-b: outward is to the right, seen from outside the sphere.
      triangles.set([a, b, b + 1, a, b + 1, a + 1], index);
      index += 6;
    }
  }
  return { directions, ends, triangles, wallStart: 2 * capIndices };
}
