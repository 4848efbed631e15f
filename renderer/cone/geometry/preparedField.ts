import type { FieldInput, FootprintInput } from '../types.ts';
import { fieldFrame, type LateralExtent, lateralExtent } from './fieldFrame.ts';
import { ringDirections, simplerRing } from './rings.ts';
import { type ShellMesh, shellMesh } from './shellMesh.ts';
import { triangulateRings } from './triangulate.ts';
import { dot, type Frame, intoFrame, outOfFrame, type Vec3 } from './vector.ts';

/** A field made ready for drawing. */
export interface PreparedField {
  readonly name: string;
  readonly centre: Vec3;
  readonly frame: Frame;
  readonly rings: readonly Float64Array[];
  readonly extent: LateralExtent;
  readonly mesh: ShellMesh;
  /** Directions in which an edge of the solid runs from the observer outward. */
  readonly corners: readonly Vec3[];
  /** Upper and lower edge of the cone seen side-on, in the plane of the long axis. */
  readonly upper: Vec3;
  readonly lower: Vec3;
  /** North on the sky, in the display space of the field's frame. */
  readonly north: Vec3;
  /** True when the field lies on all sides of the observer, so that rulers are rings. */
  readonly surrounds: boolean;
  /** True when its caps bulge so little that flat faces show them well. */
  readonly flat: boolean;
}

/** Turns sharper than this are corners. */
const CORNER_COSINE = Math.cos((20 * Math.PI) / 180);
const MOST_CORNERS = 16;

/** Outlines are drawn with so few points that nobody sees one missing: tolerance and longest step in degrees. */
const TOLERANCE_DEG = 0.03;
const LONGEST_DEG = 2.5;
/** Longest edges of the solids' caps, degrees: finer where a field fills the stage. */
const FINE_DEG = 3;
const COARSE_DEG = 6;

/** A cap of this radius rises by a seventh of its width. */
const FLAT_RADIUS_DEG = 32;

/** No outline: the field is everything. */
const WHOLE_SKY: FieldInput = {
  centreRaDeg: 0,
  centreDecDeg: 0,
  radiusDeg: 180,
  positionAngleDeg: 90,
  rings: [],
};

/** The fields of a footprint, made ready; the whole sky is one. */
export function prepareFields({ fields }: FootprintInput): PreparedField[] {
  return (fields.length > 0 ? fields : [WHOLE_SKY]).map(prepareField);
}

/** Frame, outline, solid and edges of a field. */
export function prepareField(field: FieldInput): PreparedField {
  const outline = field.rings.map(ringDirections).filter((ring) => ring.length >= 9);
  const tolerance = field.toleranceDeg ?? TOLERANCE_DEG;
  const longest = Math.max(LONGEST_DEG, 6 * tolerance);
  const rings = outline.map((ring) => simplerRing(ring, tolerance, longest));
  const all = rings.flatMap((ring) => Array.from(ring));
  const look = lookAt(field, all);
  const frame = fieldFrame(look.raDeg, look.decDeg, look.positionAngleDeg);
  const [low, high] = angles(frame, all);
  const inPlane = (angle: number): Vec3 => outOfFrame(frame, [Math.cos(angle), Math.sin(angle), 0]);
  // Before points are left out: a small circle of few points would have a corner at each. The corners of an estimate
  // are those of its cells, which the smoothed outline cuts off.
  const corners = field.toleranceDeg === undefined ? outline.flatMap(cornersOf) : [];
  const surrounds =
    rings.length === 0 || all.some((_, i) => i % 3 === 0 && facing(frame, all, i) < SIDEWAYS_COSINE);
  const cap = triangulateRings(rings, field.radiusDeg < 40 ? FINE_DEG : COARSE_DEG);
  return {
    name: field.name ?? '',
    centre: frame[0],
    frame,
    rings,
    extent: lateralExtent(frame, all),
    mesh: shellMesh(cap, rings),
    corners: edgesOf(corners, surrounds, () => extremes(frame, all)),
    upper: inPlane(high),
    lower: inPlane(low),
    north: northIn(look.positionAngleDeg),
    surrounds,
    flat: !surrounds && field.radiusDeg <= FLAT_RADIUS_DEG,
  };
}

/** Edges that run outward: at the corners where there are a few, else at the extremes, none around the observer. */
function edgesOf(corners: readonly Vec3[], surrounds: boolean, extreme: () => Vec3[]): readonly Vec3[] {
  if (corners.length >= 3 && corners.length <= MOST_CORNERS) return corners;
  return surrounds ? [] : extreme();
}

/** Directions farther from the line of sight than this have no place beside the edges of a cone. */
const SIDEWAYS_COSINE = Math.cos((82 * Math.PI) / 180);

const facing = (frame: Frame, all: readonly number[], i: number): number =>
  frame[0][0] * all[i]! + frame[0][1] * all[i + 1]! + frame[0][2] * all[i + 2]!;

/** Where to look: at the field's centre; for one that has none of its own, at the middle of its outline if it has one. */
function lookAt(field: FieldInput, all: readonly number[]) {
  const given = {
    raDeg: field.centreRaDeg,
    decDeg: field.centreDecDeg,
    positionAngleDeg: field.positionAngleDeg,
  };
  if (field.radiusDeg < 90 || all.length === 0) return given;
  let [x, y, z] = [0, 0, 0];
  for (let i = 0; i < all.length; i += 3) {
    x += all[i]!;
    y += all[i + 1]!;
    z += all[i + 2]!;
  }
  const length = Math.hypot(x, y, z);
  // An outline on all sides has no middle.
  if (length < 0.25 * (all.length / 3)) return given;
  const raDeg = (Math.atan2(y, x) * 180) / Math.PI;
  return { raDeg, decDeg: (Math.asin(z / length) * 180) / Math.PI, positionAngleDeg: 90 };
}

/** The long axis stands at the position angle from north, so north stands at minus that angle from it. */
function northIn(positionAngleDeg: number): Vec3 {
  const angle = (positionAngleDeg * Math.PI) / 180;
  return [0, Math.cos(angle), Math.sin(angle)];
}

/** Least and greatest angle from the line of sight along the long axis. */
function angles(frame: Frame, directions: readonly number[]): [number, number] {
  let low = 0;
  let high = 0;
  for (let i = 0; i + 2 < directions.length; i += 3) {
    const [x, y] = intoFrame(frame, [directions[i]!, directions[i + 1]!, directions[i + 2]!]);
    const angle = Math.atan2(y, x);
    low = Math.min(low, angle);
    high = Math.max(high, angle);
  }
  return [low, high];
}

function cornersOf(ring: Float64Array): Vec3[] {
  const n = ring.length / 3;
  const at = (i: number): Vec3 => {
    const k = 3 * (((i % n) + n) % n);
    return [ring[k]!, ring[k + 1]!, ring[k + 2]!];
  };
  const out: Vec3[] = [];
  for (let i = 0; i < n; i++) {
    const [a, b, c] = [at(i - 1), at(i), at(i + 1)];
    const before: Vec3 = [b[0] - a[0], b[1] - a[1], b[2] - a[2]];
    const after: Vec3 = [c[0] - b[0], c[1] - b[1], c[2] - b[2]];
    const cosine = dot(before, after) / (Math.hypot(...before) * Math.hypot(...after));
    if (cosine < CORNER_COSINE) out.push(b);
  }
  return out;
}

/** The outline's points farthest along the two axes across the sky, both ways. */
function extremes(frame: Frame, directions: readonly number[]): Vec3[] {
  if (directions.length === 0) return [];
  const best = [0, 0, 0, 0];
  const found: (Vec3 | null)[] = [null, null, null, null];
  for (let i = 0; i + 2 < directions.length; i += 3) {
    const d: Vec3 = [directions[i]!, directions[i + 1]!, directions[i + 2]!];
    const [, along, across] = intoFrame(frame, d);
    for (const [k, value] of [along, -along, across, -across].entries()) {
      if (value > best[k]!) {
        best[k] = value;
        found[k] = d;
      }
    }
  }
  return found.filter((d) => d !== null);
}
