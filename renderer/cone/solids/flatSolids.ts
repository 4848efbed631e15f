import { cssColour } from '../../colour/shellColours.ts';
import { NEAREST_W } from '../geometry/projection.ts';
import type { ShellMesh } from '../geometry/shellMesh.ts';
import { cross, dot, norm, type Vec3 } from '../geometry/vector.ts';
import { type CapPart, capParts } from './capParts.ts';
import { RIM, type SolidLook } from './solidLook.ts';

/** What is drawn of a field: its rings, and its matrices of this frame. */
export interface FlatPlace {
  readonly rings: readonly Float64Array[];
  readonly centre: Vec3;
  /** Of a field whose caps are too round for one flat face each. */
  readonly curved: ShellMesh | null;
  /** Sky direction times radius to CSS pixels, three rows of four. */
  readonly pixels: Float64Array;
  /** The same to right, up and back in units of the display. */
  readonly seen: Float64Array;
}

/** Walls whose facing differs by less than this are one strip: one fill, without a seam. */
const SAME_FACING = 0.12;

/**
 * Shells as translucent fills on a 2D canvas, face by face: the same glass as the solids of WebGL, for machines on which
 * a layer of WebGL costs more than it shows, and for those without it.
 */
export function paintFlatSolids(
  context: CanvasRenderingContext2D,
  places: readonly FlatPlace[],
  looks: readonly SolidLook[],
): void {
  for (const place of places) {
    const capFacing = facing(place.seen, place.centre);
    const parts = place.curved && capParts(place.curved, place.seen);
    const strips = place.rings.map((ring) => wallStrips(ring, place.seen));
    for (const look of looks) {
      if (look.alpha <= 0) continue;
      for (const radius of [look.inner, look.outer]) {
        if (parts) fillParts(context, place, parts, radius, look);
        else fillCap(context, place, radius, look, capFacing);
      }
      for (const [i, ring] of place.rings.entries()) {
        for (const strip of strips[i]!) fillStrip(context, place.pixels, ring, strip, look);
      }
    }
  }
}

/** Consecutive edges of a ring (first point, number of edges) with nearly the same facing, 0 edge on to 1 face on. */
export interface WallStrip {
  readonly first: number;
  readonly edges: number;
  readonly facing: number;
}

/** The walls over a ring as strips; every edge belongs to one. */
export function wallStrips(ring: Float64Array, seen: ArrayLike<number>): WallStrip[] {
  const n = ring.length / 3;
  const out: WallStrip[] = [];
  let first = 0;
  let start = wallFacing(ring, 0, seen);
  for (let i = 1; i <= n; i++) {
    const next = i < n ? wallFacing(ring, i, seen) : Number.POSITIVE_INFINITY;
    // A wall seen from outside and one seen from inside lie over each other: never in one fill.
    if (Math.abs(next - start) < SAME_FACING && next > 0 === start > 0) continue;
    out.push({ first, edges: i - first, facing: Math.abs(start + wallFacing(ring, i - 1, seen)) / 2 });
    first = i;
    start = next;
  }
  return out;
}

/** Back component of the unit normal of the wall over an edge: below 0 it is seen from outside. */
function wallFacing(ring: Float64Array, i: number, seen: ArrayLike<number>): number {
  const n = ring.length / 3;
  const normal = cross(inView(seen, pointOf(ring, i)), inView(seen, pointOf(ring, (i + 1) % n)));
  const length = norm(normal);
  return length > 0 ? normal[2] / length : 0;
}

/** |back component| of a direction in the view: a cap stands across the line of sight to its middle. */
function facing(seen: ArrayLike<number>, direction: Vec3): number {
  const v = inView(seen, direction);
  return Math.abs(v[2]) / norm(v);
}

const pointOf = (ring: Float64Array, i: number): Vec3 => [ring[3 * i]!, ring[3 * i + 1]!, ring[3 * i + 2]!];

const inView = (m: ArrayLike<number>, v: Vec3): Vec3 => [
  dot([m[0]!, m[1]!, m[2]!], v),
  dot([m[4]!, m[5]!, m[6]!], v),
  dot([m[8]!, m[9]!, m[10]!], v),
];

const glass = (look: SolidLook, faced: number): string =>
  cssColour(look.colour, Math.min(1, look.alpha * (1 + RIM * (1 - faced) ** 2)));

function fillCap(
  context: CanvasRenderingContext2D,
  { rings, pixels }: FlatPlace,
  radius: number,
  look: SolidLook,
  faced: number,
): void {
  context.beginPath();
  for (const ring of rings) {
    for (let i = 0; i < ring.length / 3; i++) {
      if (!lineTo(context, pixels, ring, i, radius, i === 0)) return;
    }
    context.closePath();
  }
  context.fillStyle = glass(look, faced);
  context.fill('evenodd');
}

/** The parts of a curved cap; one that reaches behind the eye is left out. */
function fillParts(
  context: CanvasRenderingContext2D,
  { curved, pixels }: FlatPlace,
  parts: readonly CapPart[],
  radius: number,
  look: SolidLook,
): void {
  for (const { facing: faced, loops } of parts) {
    context.beginPath();
    const whole = loops.every((loop) => {
      const inFront = loop.every((point, i) =>
        lineTo(context, pixels, curved!.directions, point, radius, i === 0),
      );
      context.closePath();
      return inFront;
    });
    if (!whole) continue;
    context.fillStyle = glass(look, faced);
    context.fill();
  }
}

function fillStrip(
  context: CanvasRenderingContext2D,
  pixels: Float64Array,
  ring: Float64Array,
  { first, edges, facing: faced }: WallStrip,
  look: SolidLook,
): void {
  const n = ring.length / 3;
  context.beginPath();
  for (let i = 0; i <= edges; i++) {
    if (!lineTo(context, pixels, ring, (first + i) % n, look.outer, i === 0)) return;
  }
  for (let i = edges; i >= 0; i--) {
    if (!lineTo(context, pixels, ring, (first + i) % n, look.inner, false)) return;
  }
  context.closePath();
  context.fillStyle = glass(look, faced);
  context.fill();
}

/** Goes on to a point of the ring at a radius; false when it lies behind the eye: such a face is not drawn. */
function lineTo(
  context: CanvasRenderingContext2D,
  m: Float64Array,
  ring: ArrayLike<number>,
  i: number,
  radius: number,
  start: boolean,
): boolean {
  const x = radius * ring[3 * i]!;
  const y = radius * ring[3 * i + 1]!;
  const z = radius * ring[3 * i + 2]!;
  const w = m[8]! * x + m[9]! * y + m[10]! * z + m[11]!;
  if (!(w > NEAREST_W)) return false;
  const px = (m[0]! * x + m[1]! * y + m[2]! * z + m[3]!) / w;
  const py = (m[4]! * x + m[5]! * y + m[6]! * z + m[7]!) / w;
  if (start) context.moveTo(px, py);
  else context.lineTo(px, py);
  return true;
}
