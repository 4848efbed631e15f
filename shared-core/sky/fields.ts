import { EigenvalueDecomposition, Matrix } from 'ml-matrix';
import { atan2, cos, hypot, sin } from '../numerics/elementary/elementary.ts';
import { smallestCap } from './enclosingCap.ts';
import { type Piece, pieceHolds, pieceOf, piecesNear } from './pieces.ts';
import type { Footprint, OutlineRing } from './region.ts';
import {
  angleRad,
  combine,
  DEG_PER_RAD,
  dot,
  RAD_PER_DEG,
  unit,
  unitToRaDec,
  type Vec3,
  WHOLE_SKY_DEG2,
} from './vectors.ts';

/** One field of a footprint: pieces of sky that are looked at together. */
export interface SkyField {
  /** Its outline, holes included; empty for the whole sky. */
  readonly rings: readonly OutlineRing[];
  /** Centre and radius of the smallest cap that holds the field. */
  readonly centreRaDeg: number;
  readonly centreDecDeg: number;
  readonly radiusDeg: number;
  /** Direction of the widest extent at the centre, from north through east, in [0, 180); 90 when none is widest. */
  readonly positionAngleDeg: number;
  /** Greatest distances from the centre along that direction and across it. */
  readonly halfLengthDeg: number;
  readonly halfWidthDeg: number;
  /** Too wide to be looked at from its side: shown around the observer. Such a field is the only one. */
  readonly wide: boolean;
}

/** A field that needs a cap larger than this is wide. */
export const WIDE_RADIUS_DEG = 70;
/** Pieces are one field when the gap between them is at most half the radius of the larger, and at most this. */
const CLOSE_SHARE = 0.5;
const CLOSE_DEG = 5;
/** Variances along and across within this ratio make no direction the widest: 7% in length, below what cells resolve. */
const ROUND = 1.15;

/**
 * The fields of a footprint, largest first: its connected pieces, those that lie close together as one (the gap at
 * most half the larger one's radius, and at most 5 degrees). One field flagged wide when any field would need a cap of
 * over 70 degrees, when the footprint covers more than half of the sky, or when it surrounds the observer.
 */
export function footprintFields(footprint: Pick<Footprint, 'outline' | 'areaDeg2'>): readonly SkyField[] {
  const rings = footprint.outline();
  if (rings.length === 0 || footprint.areaDeg2 > WHOLE_SKY_DEG2 / 2) return [wideField(rings)];
  const pieces: Piece[] = [];
  for (const ring of rings) {
    const piece = pieceOf(ring);
    if (piece === null) return [wideField(rings)];
    pieces.push(piece);
  }
  const outer = pieces.filter((piece) => piece.areaSr >= 0).sort((a, b) => b.areaSr - a.areaSr);
  const groups = groupClose(outer);
  for (const hole of pieces.filter((piece) => piece.areaSr < 0)) {
    // The smallest piece that holds the hole; a hole in nothing is the outside of a region around the sky.
    const holder = outer.findLast((piece) => pieceHolds(piece, hole));
    if (holder === undefined) return [wideField(rings)];
    groups.find((group) => group.includes(holder))!.push(hole);
  }
  const fields = groups.map(fieldOf);
  return fields.some((field) => field.wide) ? [wideField(rings)] : fields;
}

function wideField(rings: readonly OutlineRing[]): SkyField {
  return {
    rings,
    centreRaDeg: 0,
    centreDecDeg: 0,
    radiusDeg: 180,
    positionAngleDeg: 90,
    halfLengthDeg: 180,
    halfWidthDeg: 180,
    wide: true,
  };
}

/** Connected components of "close"; in the order of their first piece. */
function groupClose(pieces: readonly Piece[]): Piece[][] {
  const parent = pieces.map((_, i) => i);
  const root = (i: number): number => {
    let r = i;
    while (parent[r] !== r) r = parent[r]!;
    parent[i] = r;
    return r;
  };
  for (let i = 0; i < pieces.length; i++) {
    for (let j = i + 1; j < pieces.length; j++) {
      const [a, b] = [root(i), root(j)];
      if (a === b) continue;
      const larger = Math.max(pieces[i]!.radiusRad, pieces[j]!.radiusRad);
      const limit = Math.min(CLOSE_SHARE * larger, CLOSE_DEG * RAD_PER_DEG);
      if (piecesNear(pieces[i]!, pieces[j]!, limit)) parent[Math.max(a, b)] = Math.min(a, b);
    }
  }
  const groups = new Map<number, Piece[]>();
  pieces.forEach((piece, i) => {
    const group = groups.get(root(i));
    if (group) group.push(piece);
    else groups.set(root(i), [piece]);
  });
  return [...groups.values()];
}

function fieldOf(pieces: readonly Piece[]): SkyField {
  const rings = pieces.map((piece) => piece.ring);
  const outer = pieces.filter((piece) => piece.areaSr >= 0);
  const points = outer.flatMap((piece) => piece.points);
  let sum: Vec3 = [0, 0, 0];
  for (const piece of outer) sum = combine(1, sum, 1, piece.centre);
  const middle = unit(sum);
  const wideRad = WIDE_RADIUS_DEG * RAD_PER_DEG;
  // The smallest cap is only sought within a hemisphere; beyond it the field is wide in any case.
  if (points.some((p) => dot(middle, p) < 0.01)) return wideField(rings);
  const { centre, radiusRad } = smallestCap(points);
  if (radiusRad > wideRad) return wideField(rings);

  const { raDeg, decDeg } = unitToRaDec(centre);
  const positionAngleDeg = widestDirection(outer, centre);
  const angle = positionAngleDeg * RAD_PER_DEG;
  let halfLength = 0;
  let halfWidth = 0;
  for (const p of points) {
    const [north, east] = tangentPlace(centre, p);
    halfLength = Math.max(halfLength, Math.abs(north * cos(angle) + east * sin(angle)));
    halfWidth = Math.max(halfWidth, Math.abs(east * cos(angle) - north * sin(angle)));
  }
  return {
    rings,
    centreRaDeg: raDeg,
    centreDecDeg: decDeg,
    radiusDeg: radiusRad * DEG_PER_RAD,
    positionAngleDeg,
    halfLengthDeg: halfLength * DEG_PER_RAD,
    halfWidthDeg: halfWidth * DEG_PER_RAD,
    wide: false,
  };
}

/** North and east of the centre in radians, distances from it kept (azimuthal equidistant). */
function tangentPlace(centre: Vec3, p: Vec3): [north: number, east: number] {
  const { raDeg, decDeg } = unitToRaDec(centre);
  const [ra, dec] = [raDeg * RAD_PER_DEG, decDeg * RAD_PER_DEG];
  const east: Vec3 = [-sin(ra), cos(ra), 0];
  const north: Vec3 = [-sin(dec) * cos(ra), -sin(dec) * sin(ra), cos(dec)];
  const [x, y] = [dot(north, p), dot(east, p)];
  const sine = hypot(x, y);
  const scale = sine > 0 ? angleRad(centre, p) / sine : 1;
  return [x * scale, y * scale];
}

/**
 * Position angle of the outline's greatest variance about its mean in the tangent plane, each point weighted by the
 * length of outline that it stands for: the eigenvector of the covariance with the greater eigenvalue.
 */
function widestDirection(pieces: readonly Piece[], centre: Vec3): number {
  const places: { north: number; east: number; weight: number }[] = [];
  let [weights, northMean, eastMean] = [0, 0, 0];
  for (const { points } of pieces) {
    points.forEach((p, i) => {
      const before = points[(i + points.length - 1) % points.length]!;
      const after = points[(i + 1) % points.length]!;
      const weight = angleRad(before, p) + angleRad(p, after);
      const [north, east] = tangentPlace(centre, p);
      places.push({ north, east, weight });
      weights += weight;
      northMean += weight * north;
      eastMean += weight * east;
    });
  }
  northMean /= weights;
  eastMean /= weights;
  let [northNorth, northEast, eastEast] = [0, 0, 0];
  for (const { north, east, weight } of places) {
    const [n, e] = [north - northMean, east - eastMean];
    northNorth += weight * n * n;
    northEast += weight * n * e;
    eastEast += weight * e * e;
  }
  const covariance = new Matrix([
    [northNorth, northEast],
    [northEast, eastEast],
  ]);
  const { realEigenvalues, eigenvectorMatrix } = new EigenvalueDecomposition(covariance, {
    assumeSymmetric: true,
  });
  const [first, second] = realEigenvalues as [number, number];
  if (Math.max(first, second) < ROUND * Math.min(first, second)) return 90;
  const along = first > second ? 0 : 1;
  const angle = atan2(eigenvectorMatrix.get(1, along), eigenvectorMatrix.get(0, along)) * DEG_PER_RAD;
  const positive = angle < 0 ? angle + 180 : angle;
  return positive >= 180 ? positive - 180 : positive;
}
