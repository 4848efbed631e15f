import { asin } from '../numerics/elementary/elementary.ts';
import { type Arc, arcEnd, arcExtent, arcPoint, arcStart } from './arc.ts';
import { binEdges, type EdgeSpans, spansMeridian } from './polygonBins.ts';
import { EDGE_TOLERANCE_RAD, type Side } from './shape.ts';
import {
  cross,
  DEG_PER_RAD,
  dot,
  perpendicular,
  raDecToUnit,
  SPREAD_DIRECTIONS,
  unitToRaDec,
  type Vec3,
} from './vectors.ts';

/** An edge this near to a pole of the frame would make longitudes there meaningless. */
const POLE_CLEARANCE_RAD = 1e-6;
/** Room for the rounding of asin near the poles. */
const LAT_PADDING_DEG = 1e-6;

interface Frame {
  readonly x: Vec3;
  readonly y: Vec3;
  readonly z: Vec3;
  /** True when x, y, z are the ICRS axes. */
  readonly icrs: boolean;
}

/** Distance in radians from the edges to the nearer of +-pole. */
function poleDistance(edges: readonly Arc[], pole: Vec3): number {
  let most = 0;
  for (const edge of edges) {
    const { min, max } = arcExtent(edge, pole);
    most = Math.max(most, -min, max);
  }
  return Math.sqrt(Math.max(0, 2 * (1 - most)));
}

function chooseFrame(edges: readonly Arc[]): Frame {
  const north: Vec3 = [0, 0, 1];
  if (poleDistance(edges, north) > POLE_CLEARANCE_RAD) {
    return { x: [1, 0, 0], y: [0, 1, 0], z: north, icrs: true };
  }
  let z = north;
  let best = 0;
  for (const direction of SPREAD_DIRECTIONS) {
    const distance = poleDistance(edges, direction);
    if (distance > best) {
      best = distance;
      z = direction;
    }
  }
  const x = perpendicular(z);
  return { x, y: cross(z, x), z, icrs: false };
}

/** Longitude in [0, 360) and latitude of an ICRS vector in the frame, degrees. */
function inFrame(frame: Frame, v: Vec3): { raDeg: number; decDeg: number } {
  return unitToRaDec(frame.icrs ? v : [dot(frame.x, v), dot(frame.y, v), dot(frame.z, v)]);
}

interface Edges extends EdgeSpans {
  /** Normals (three numbers an edge) with north positive: n.x > 0 is north of the edge. */
  readonly normals: Float64Array;
  /** Western then eastern end, six numbers an edge. */
  readonly ends: Float64Array;
  readonly runsEast: Uint8Array;
}

function layOut(arcs: readonly Arc[], frame: Frame, longitudes: readonly number[]): Edges {
  const count = arcs.length;
  const edges = {
    count,
    westDeg: new Float64Array(count),
    eastDeg: new Float64Array(count),
    latMinDeg: new Float64Array(count),
    latMaxDeg: new Float64Array(count),
    normals: new Float64Array(3 * count),
    ends: new Float64Array(6 * count),
    runsEast: new Uint8Array(count),
  };
  for (let i = 0; i < count; i++) {
    const arc = arcs[i]!;
    const from = longitudes[i]!;
    const to = longitudes[(i + 1) % count]!;
    // The short way round; an edge of half a turn would run through a pole, which the frame rules out.
    const east = Math.abs(to - from) < 180 ? to >= from : to < from;
    edges.runsEast[i] = east ? 1 : 0;
    edges.westDeg[i] = east ? from : to;
    edges.eastDeg[i] = east ? to : from;
    const sign = east ? 1 : -1;
    const { n } = arc.circle;
    edges.normals.set([sign * n[0], sign * n[1], sign * n[2]], 3 * i);
    const [a, b] = [arcStart(arc), arcEnd(arc)];
    edges.ends.set(east ? [...a, ...b] : [...b, ...a], 6 * i);
    const extent = arcExtent(arc, frame.z);
    edges.latMinDeg[i] = asin(Math.max(-1, extent.min)) * DEG_PER_RAD - LAT_PADDING_DEG;
    edges.latMaxDeg[i] = asin(Math.min(1, extent.max)) * DEG_PER_RAD + LAT_PADDING_DEG;
  }
  return edges;
}

function height(edges: Edges, i: number, x: number, y: number, z: number): number {
  const n = edges.normals;
  return n[3 * i]! * x + n[3 * i + 1]! * y + n[3 * i + 2]! * z;
}

/** For a point on the edge's great circle: n x a and b x n point inward along the edge. */
function betweenEnds(edges: Edges, i: number, x: number, y: number, z: number): boolean {
  const { normals, ends } = edges;
  const [nx, ny, nz] = [normals[3 * i]!, normals[3 * i + 1]!, normals[3 * i + 2]!];
  const [ax, ay, az] = [ends[6 * i]!, ends[6 * i + 1]!, ends[6 * i + 2]!];
  const [bx, by, bz] = [ends[6 * i + 3]!, ends[6 * i + 4]!, ends[6 * i + 5]!];
  const fromA = (ny * az - nz * ay) * x + (nz * ax - nx * az) * y + (nx * ay - ny * ax) * z;
  const toB = (by * nz - bz * ny) * x + (bz * nx - bx * nz) * y + (bx * ny - by * nx) * z;
  return fromA >= -EDGE_TOLERANCE_RAD && toB >= -EDGE_TOLERANCE_RAD;
}

/** Whether the frame's north pole is inside: walk there from the edge widest in longitude. */
function poleIsInside(arcs: readonly Arc[], edges: Edges, frame: Frame): boolean {
  let widest = 0;
  let most = -1;
  for (let i = 0; i < edges.count; i++) {
    const width = edges.eastDeg[i]! - edges.westDeg[i]!;
    const span = width < 0 ? width + 360 : width;
    if (span > most) {
      most = span;
      widest = i;
    }
  }
  const probe = arcPoint(arcs[widest]!, 0.4871);
  const lon = inFrame(frame, probe).raDeg;
  // The inside is on the left of every edge: north of one that runs east. So begin just north of it.
  let inside = edges.runsEast[widest] === 1;
  for (let i = 0; i < edges.count; i++) {
    if (i !== widest && spansMeridian(edges, i, lon) && height(edges, i, ...probe) < 0) inside = !inside;
  }
  return inside;
}

/**
 * Point in polygon on the sphere: walk from the point along its meridian to the north pole of a frame and count the
 * edges crossed; the pole's own side is known. The frame is ICRS itself unless an edge comes near one of its poles.
 * Most points lie above or below all edges of their meridian bin and cost no trigonometry.
 *
 * @param arcs great-circle edges in order, interior on the left
 * @param vertexRaDeg RA in [0, 360) of each edge's start as it was given, so that a galaxy with the very RA of a
 * vertex meets the same number
 */
export function compilePolygonSide(
  arcs: readonly Arc[],
  vertexRaDeg: readonly number[],
): (raDeg: number, decDeg: number) => Side {
  const frame = chooseFrame(arcs);
  const longitudes = frame.icrs ? vertexRaDeg : arcs.map((arc) => inFrame(frame, arcStart(arc)).raDeg);
  const edges = layOut(arcs, frame, longitudes);
  const bins = binEdges(edges);
  const northInside = poleIsInside(arcs, edges, frame);
  const { latMinDeg, latMaxDeg } = edges;
  const binsPerDeg = bins.count / 360;

  return (raDeg, decDeg) => {
    let lon = raDeg;
    let lat = decDeg;
    let x = 0;
    let y = 0;
    let z = 0;
    let ready = false;
    if (!frame.icrs) {
      [x, y, z] = raDecToUnit(raDeg, decDeg);
      ready = true;
      const turned = inFrame(frame, [x, y, z]);
      lon = turned.raDeg;
      lat = turned.decDeg;
    }
    const bin = Math.min(bins.count - 1, Math.floor(lon * binsPerDeg));
    let inside = northInside;
    if (lat < bins.latMinDeg[bin]!) {
      inside = (bins.oddBelow[bin] === 1) !== northInside;
    } else if (lat <= bins.latMaxDeg[bin]!) {
      const last = bins.first[bin + 1]!;
      for (let k = bins.first[bin]!; k < last; k++) {
        const i = bins.edges[k]!;
        if (lat > latMaxDeg[i]!) continue;
        const crosses = spansMeridian(edges, i, lon);
        if (lat < latMinDeg[i]!) {
          if (crosses) inside = !inside;
          continue;
        }
        if (!ready) {
          [x, y, z] = raDecToUnit(raDeg, decDeg);
          ready = true;
        }
        const h = height(edges, i, x, y, z);
        if (Math.abs(h) <= EDGE_TOLERANCE_RAD && betweenEnds(edges, i, x, y, z)) return 0;
        if (crosses && h < 0) inside = !inside;
      }
    }
    return inside ? 1 : -1;
  };
}
