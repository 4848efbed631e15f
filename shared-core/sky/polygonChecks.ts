import { Refusal } from '../base/refusal.ts';
import { type Arc, arcExtent, greatCircleArc } from './arc.ts';
import { checkDec, checkRa } from './shapeChecks.ts';
import { cross, dot, normaliseRaDeg, raDecToUnit, subtract, type Vec3 } from './vectors.ts';

type Vertices = readonly (readonly [raDeg: number, decDeg: number])[];

/** Vertices nearer than this are one and the same, and edges nearer than this touch: 2e-5 arcseconds. */
const SAME_VERTEX_RAD = 1e-10;

export interface PolygonEdges {
  readonly vertices: readonly Vec3[];
  /** Edge i runs from vertex i to vertex i + 1; the last one closes the ring. */
  readonly edges: readonly Arc[];
}

function near(a: Vec3, b: Vec3): boolean {
  const d = subtract(a, b);
  return dot(d, d) < SAME_VERTEX_RAD * SAME_VERTEX_RAD;
}

/** Triple product a.(b x c), positive when counter-clockwise; sine-sized for unit vectors. */
function turn(a: Vec3, b: Vec3, c: Vec3): number {
  return dot(a, cross(subtract(b, a), subtract(c, a)));
}

function onEdge(edge: Arc, a: Vec3, b: Vec3, p: Vec3): boolean {
  const n = edge.circle.n;
  if (Math.abs(dot(n, p)) > SAME_VERTEX_RAD) return false;
  return dot(cross(n, a), p) >= 0 && dot(cross(b, n), p) >= 0;
}

function spell(vertices: Vertices, i: number): string {
  const v = vertices[i % vertices.length]!;
  return `(${v[0]}, ${v[1]})`;
}

/** Edge numbers by ascending least z: a sweep that compares only edges whose spans in Dec overlap. */
function forEachOverlap(edges: readonly Arc[], visit: (i: number, j: number) => void): void {
  const spans = edges.map((edge) => arcExtent(edge, [0, 0, 1]));
  const order = spans.map((_, i) => i).sort((i, j) => spans[i]!.min - spans[j]!.min);
  for (let k = 0; k < order.length; k++) {
    const top = spans[order[k]!]!.max + SAME_VERTEX_RAD;
    for (let m = k + 1; m < order.length && spans[order[m]!]!.min <= top; m++) visit(order[k]!, order[m]!);
  }
}

function refuseTouch(vertices: Vertices, i: number, j: number): never {
  const [a, b] = i < j ? [i, j] : [j, i];
  throw new Refusal(
    `The polygon's edge from ${spell(vertices, a)} to ${spell(vertices, a + 1)} crosses or touches its edge from ${spell(vertices, b)} to ${spell(vertices, b + 1)}, but an outline must not meet itself: give the vertices in order around it.`,
    'use',
  );
}

/**
 * Great-circle edges of a polygon whose vertices are RA and Dec in degrees.
 * @throws Refusal for fewer than 3 vertices, a coordinate outside its range, vertices that repeat, neighbours
 * opposite on the sky, and edges that cross, touch or fold back.
 */
export function checkedEdges(vertices: Vertices): PolygonEdges {
  const count = vertices.length;
  if (count < 3) {
    throw new Refusal(
      `The polygon has ${count} ${count === 1 ? 'vertex' : 'vertices'} but needs at least 3: add vertices.`,
      'use',
    );
  }
  const points = vertices.map(([raDeg, decDeg], i) => {
    checkRa('polygon', `RA of vertex ${i + 1}`, raDeg);
    checkDec('polygon', `Dec of vertex ${i + 1}`, decDeg);
    return raDecToUnit(normaliseRaDeg(raDeg), decDeg);
  });
  const edges = points.map((a, i) => {
    const b = points[(i + 1) % count]!;
    if (near(a, b)) {
      throw new Refusal(
        `The polygon's vertices ${i + 1} and ${((i + 1) % count) + 1} are both at ${spell(vertices, i)}, but vertices must not repeat: remove one.`,
        'use',
      );
    }
    if (near(a, [-b[0], -b[1], -b[2]])) {
      throw new Refusal(
        `The polygon's neighbouring vertices ${spell(vertices, i)} and ${spell(vertices, i + 1)} lie opposite on the sky, so no one great circle joins them: add a vertex between them.`,
        'use',
      );
    }
    return greatCircleArc(a, b);
  });

  forEachOverlap(edges, (i, j) => {
    const [a, b] = [points[i]!, points[(i + 1) % count]!];
    const [c, d] = [points[j]!, points[(j + 1) % count]!];
    const follows = (i + 1) % count === j;
    if (follows || (j + 1) % count === i) {
      // Neighbours share a vertex by right; they must not also run back over each other.
      const [first, second, from, to] = follows ? [i, j, a, d] : [j, i, c, b];
      const folds =
        onEdge(edges[first]!, points[first]!, points[(first + 1) % count]!, to) ||
        onEdge(edges[second]!, points[second]!, points[(second + 1) % count]!, from);
      if (folds) {
        throw new Refusal(
          `The polygon's outline folds back on itself at ${spell(vertices, second)}: remove that vertex.`,
          'use',
        );
      }
      return;
    }
    if (near(a, c)) {
      throw new Refusal(
        `The polygon's vertices ${i + 1} and ${j + 1} are both at ${spell(vertices, i)}, but vertices must not repeat: split the outline into two polygons.`,
        'use',
      );
    }
    const crossing = turn(a, c, b);
    const meets =
      (Math.sign(crossing) !== 0 &&
        Math.sign(turn(c, b, d)) === Math.sign(crossing) &&
        Math.sign(turn(b, d, a)) === Math.sign(crossing) &&
        Math.sign(turn(d, a, c)) === Math.sign(crossing)) ||
      onEdge(edges[i]!, a, b, c) ||
      onEdge(edges[i]!, a, b, d) ||
      onEdge(edges[j]!, c, d, a) ||
      onEdge(edges[j]!, c, d, b);
    if (meets) refuseTouch(vertices, i, j);
  });
  return { vertices: points, edges };
}
