import type { OutlineRing } from '../../../shared-core/sky/region.ts';

const DEGREE = Math.PI / 180;

/** An RA-Dec box as a ring, interior to the left seen from outside; points at most `step` degrees apart. */
export function boxRing(ra0: number, ra1: number, dec0: number, dec1: number, step = 0.5): OutlineRing {
  const ra: number[] = [];
  const dec: number[] = [];
  const side = (a: readonly [number, number], b: readonly [number, number]): void => {
    const n = Math.max(1, Math.ceil(Math.max(Math.abs(b[0] - a[0]), Math.abs(b[1] - a[1])) / step));
    for (let i = 0; i < n; i++) {
      ra.push(a[0] + ((b[0] - a[0]) * i) / n);
      dec.push(a[1] + ((b[1] - a[1]) * i) / n);
    }
  };
  side([ra0, dec0], [ra1, dec0]);
  side([ra1, dec0], [ra1, dec1]);
  side([ra1, dec1], [ra0, dec1]);
  side([ra0, dec1], [ra0, dec0]);
  return { raDeg: Float64Array.from(ra), decDeg: Float64Array.from(dec) };
}

/** A cap about a point; the interior is the cap, or all the rest of the sky when `outside`. */
export function capRing(
  raDeg: number,
  decDeg: number,
  radiusDeg: number,
  outside = false,
  points = 720,
): OutlineRing {
  const ra = new Float64Array(points);
  const dec = new Float64Array(points);
  const [a, d, r] = [raDeg * DEGREE, decDeg * DEGREE, radiusDeg * DEGREE];
  const centre = [Math.cos(d) * Math.cos(a), Math.cos(d) * Math.sin(a), Math.sin(d)] as const;
  const east = [-Math.sin(a), Math.cos(a), 0] as const;
  const north = [-Math.sin(d) * Math.cos(a), -Math.sin(d) * Math.sin(a), Math.cos(d)] as const;
  for (let i = 0; i < points; i++) {
    // From east to north: counter-clockwise seen from outside.
    const p = ((outside ? -1 : 1) * 2 * Math.PI * i) / points;
    const [x, y, z] = [0, 1, 2].map(
      (k) => Math.cos(r) * centre[k]! + Math.sin(r) * (Math.cos(p) * east[k]! + Math.sin(p) * north[k]!),
    ) as [number, number, number];
    ra[i] = Math.atan2(y, x) / DEGREE;
    dec[i] = Math.atan2(z, Math.hypot(x, y)) / DEGREE;
  }
  return { raDeg: ra, decDeg: dec };
}

/** Rings reversed: what was inside is outside. */
export const reversed = ({ raDeg, decDeg }: OutlineRing): OutlineRing => ({
  raDeg: raDeg.slice().reverse(),
  decDeg: decDeg.slice().reverse(),
});

/** Solid angle of a triangle of unit vectors, signed: Van Oosterom & Strackee 1983 (IEEE Trans. Biomed. Eng. 30, 125). */
export function triangleSteradian(p: ArrayLike<number>, i: number, j: number, k: number): number {
  const at = (n: number) => [p[3 * n]!, p[3 * n + 1]!, p[3 * n + 2]!] as const;
  const [a, b, c] = [at(i), at(j), at(k)];
  const dot = (u: readonly number[], v: readonly number[]) => u[0]! * v[0]! + u[1]! * v[1]! + u[2]! * v[2]!;
  const triple =
    a[0] * (b[1] * c[2] - b[2] * c[1]) +
    a[1] * (b[2] * c[0] - b[0] * c[2]) +
    a[2] * (b[0] * c[1] - b[1] * c[0]);
  return 2 * Math.atan2(triple, 1 + dot(a, b) + dot(b, c) + dot(c, a));
}

export const DEG2_PER_STERADIAN = (180 / Math.PI) ** 2;
