import type { ShellMesh } from '../geometry/shellMesh.ts';

/** A part of a cap whose triangles face the viewer nearly alike, all from one side. */
export interface CapPart {
  /** 0 edge on, 1 face on. */
  readonly facing: number;
  /** Closed outlines: points of the mesh in order. */
  readonly loops: readonly (readonly number[])[];
}

/** Steps of (1 - facing) squared, which is what the strength of glass goes by. */
const STEPS = 10;

/**
 * A curved cap cut where its facing changes, front and back apart: filled part by part it looks like curved glass, and
 * no part lies over itself.
 *
 * @param seen direction to right, up and back, three rows of four
 */
export function capParts(mesh: ShellMesh, seen: ArrayLike<number>): CapPart[] {
  const { triangles, neighbours } = capOf(mesh);
  const kinds = kindsOf(mesh.directions, triangles, seen);
  // The edges of each kind that no triangle of the same kind shares: where one ends the next begins.
  const edges = new Map<number, Map<number, number[]>>();
  for (let e = 0; e < triangles.length; e++) {
    const kind = kinds[Math.floor(e / 3)]!;
    const other = neighbours[e]!;
    if (other >= 0 && kinds[other] === kind) continue;
    let ends = edges.get(kind);
    if (!ends) edges.set(kind, (ends = new Map()));
    const from = triangles[e]!;
    const to = triangles[e % 3 === 2 ? e - 2 : e + 1]!;
    const known = ends.get(from);
    if (known) known.push(to);
    else ends.set(from, [to]);
  }
  return [...edges].map(([kind, ends]) => ({
    facing: 1 - Math.sqrt(((kind % STEPS) + 0.5) / STEPS),
    loops: loopsOf(ends),
  }));
}

/** The step of each triangle's facing; those seen from behind count on from STEPS. */
function kindsOf(directions: Float32Array, triangles: Uint32Array, m: ArrayLike<number>): Uint8Array {
  const points = directions.length / 3;
  const seen = new Float32Array(3 * points);
  for (let i = 0; i < 3 * points; i += 3) {
    for (let row = 0; row < 3; row++) {
      seen[i + row] =
        m[4 * row]! * directions[i]! +
        m[4 * row + 1]! * directions[i + 1]! +
        m[4 * row + 2]! * directions[i + 2]!;
    }
  }
  const kinds = new Uint8Array(triangles.length / 3);
  for (let t = 0; t < kinds.length; t++) {
    const [a, b, c] = [3 * triangles[3 * t]!, 3 * triangles[3 * t + 1]!, 3 * triangles[3 * t + 2]!];
    const [ux, uy, uz] = [seen[b]! - seen[a]!, seen[b + 1]! - seen[a + 1]!, seen[b + 2]! - seen[a + 2]!];
    const [vx, vy, vz] = [seen[c]! - seen[a]!, seen[c + 1]! - seen[a + 1]!, seen[c + 2]! - seen[a + 2]!];
    const [x, y, z] = [uy * vz - uz * vy, uz * vx - ux * vz, ux * vy - uy * vx];
    const length = Math.sqrt(x * x + y * y + z * z);
    const turned = length > 0 ? 1 - Math.abs(z) / length : 1;
    kinds[t] = Math.min(STEPS - 1, Math.floor(STEPS * turned * turned)) + (z < 0 ? STEPS : 0);
  }
  return kinds;
}

/** Closed walks over directed edges; every edge is walked once. */
function loopsOf(ends: Map<number, number[]>): number[][] {
  const loops: number[][] = [];
  for (const start of ends.keys()) {
    while (ends.get(start)!.length > 0) {
      const loop = [start];
      for (let at = ends.get(start)!.pop()!; at !== start; at = ends.get(at)!.pop()!) loop.push(at);
      loops.push(loop);
    }
  }
  return loops;
}

interface Cap {
  readonly triangles: Uint32Array;
  /** For each edge (triangle by triangle) the triangle on its other side; -1 where there is none. */
  readonly neighbours: Int32Array;
}

const caps = new WeakMap<ShellMesh, Cap>();

/** The outer cap of a mesh, and what lies beside each of its edges. */
function capOf(mesh: ShellMesh): Cap {
  const known = caps.get(mesh);
  if (known) return known;
  const triangles = mesh.triangles.subarray(0, mesh.wallStart / 2);
  const neighbours = new Int32Array(triangles.length).fill(-1);
  const points = mesh.directions.length / 3;
  const edges = new Map<number, number>();
  for (let e = 0; e < triangles.length; e++) {
    const from = triangles[e]!;
    const to = triangles[e % 3 === 2 ? e - 2 : e + 1]!;
    const other = edges.get(to * points + from);
    if (other === undefined) edges.set(from * points + to, e);
    else {
      neighbours[e] = Math.floor(other / 3);
      neighbours[other] = Math.floor(e / 3);
    }
  }
  const cap = { triangles, neighbours };
  caps.set(mesh, cap);
  return cap;
}
