import { type GeoProjection, type GeoRawProjection, geoAzimuthalEqualAreaRaw, geoProjection } from 'd3-geo';

const DEGREE = Math.PI / 180;

/** Half the width and height of the Hammer map of the whole sphere at scale 1. */
export const HAMMER_HALF_WIDTH = 2 * Math.SQRT2;
export const HAMMER_HALF_HEIGHT = Math.SQRT2;

/** Which part of the sky is drawn, and how: both projections keep areas. */
export interface SkyFrame {
  /** Hammer shows the whole sphere; Lambert's azimuthal equal-area map shows a field around its centre. */
  readonly kind: 'hammer' | 'lambert';
  readonly centreRaDeg: number;
  readonly centreDecDeg: number;
  /** Pixels in a radian at the centre. */
  readonly scalePx: number;
  /** Pixel of the centre. */
  readonly xPx: number;
  readonly yPx: number;
}

/**
 * The Hammer projection: Lambert's azimuthal equal-area map of the sphere with halved longitudes, twice as wide.
 * Source: Snyder & Voxland 1989, An Album of Map Projections, USGS Professional Paper 1453, p. 232 (value from memory).
 */
const hammerRaw: GeoRawProjection = Object.assign(
  (lambda: number, phi: number): [number, number] => {
    const [x, y] = geoAzimuthalEqualAreaRaw(lambda / 2, phi);
    return [2 * x, y];
  },
  {
    invert(x: number, y: number): [number, number] {
      const [lambda, phi] = geoAzimuthalEqualAreaRaw.invert!(x / 2, y);
      return [2 * lambda, phi];
    },
  },
);

/** The projection for outlines and graticules: right ascension grows to the left, north is up. */
export function outlineProjection(frame: SkyFrame): GeoProjection {
  return geoProjection(frame.kind === 'hammer' ? hammerRaw : geoAzimuthalEqualAreaRaw)
    .rotate([-frame.centreRaDeg, -frame.centreDecDeg])
    .reflectX(true)
    .scale(frame.scalePx)
    .translate([frame.xPx, frame.yPx])
    .precision(0.3);
}

/** The same map for many points at once: pixels of unit vectors, written to `out`. */
export type PointProjection = (x: number, y: number, z: number, out: { x: number; y: number }) => void;

/** Agrees with `outlineProjection`, without trigonometry for every point. */
export function pointProjection(frame: SkyFrame): PointProjection {
  const [ra, dec] = [frame.centreRaDeg * DEGREE, frame.centreDecDeg * DEGREE];
  const [sinRa, cosRa, sinDec, cosDec] = [Math.sin(ra), Math.cos(ra), Math.sin(dec), Math.cos(dec)];
  const { scalePx, xPx, yPx } = frame;
  const hammer = frame.kind === 'hammer';
  return (x, y, z, out) => {
    // Towards the centre, east of it, north of it.
    const along = cosDec * (cosRa * x + sinRa * y) + sinDec * z;
    const east = cosRa * y - sinRa * x;
    const north = cosDec * z - sinDec * (cosRa * x + sinRa * y);
    if (hammer) {
      // cos(lat) cos(lon/2) and cos(lat) sin(lon/2) by the half-angle formulas.
      const cosLat = Math.hypot(along, east);
      const half = Math.sqrt(Math.max(0, cosLat * (cosLat + along)) / 2);
      const side = Math.sign(east) * Math.sqrt(Math.max(0, cosLat * (cosLat - along)) / 2);
      const stretch = Math.sqrt(2 / (1 + half));
      out.x = xPx - scalePx * 2 * stretch * side;
      out.y = yPx - scalePx * stretch * north;
    } else {
      const stretch = Math.sqrt(2 / Math.max(1e-12, 1 + along));
      out.x = xPx - scalePx * stretch * east;
      out.y = yPx - scalePx * stretch * north;
    }
  };
}

/** The place under a pixel; null outside of the map of the sphere. */
export function skyAt(frame: SkyFrame, xPx: number, yPx: number): { raDeg: number; decDeg: number } | null {
  const x = (xPx - frame.xPx) / frame.scalePx;
  const y = (yPx - frame.yPx) / frame.scalePx;
  const inside =
    frame.kind === 'hammer'
      ? (x / HAMMER_HALF_WIDTH) ** 2 + (y / HAMMER_HALF_HEIGHT) ** 2 <= 1
      : Math.hypot(x, y) <= 2;
  if (!inside) return null;
  const [lon, lat] = outlineProjection(frame).invert!([xPx, yPx])!;
  return { raDeg: ((lon % 360) + 360) % 360, decDeg: lat };
}
