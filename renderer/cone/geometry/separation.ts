/** A galaxy's place: unit vector and comoving distance. */
export interface ComovingPlace {
  readonly raDeg: number;
  readonly decDeg: number;
  readonly comovingMpc: number;
}

/** Comoving separation of two galaxies in Mpc and the angle between them. */
export interface Separation {
  readonly totalMpc: number;
  /** Along the line of sight to the point midway between them; never negative. */
  readonly alongMpc: number;
  /** Across that line of sight. */
  readonly acrossMpc: number;
  readonly angleDeg: number;
}

const DEGREE = Math.PI / 180;

/**
 * Comoving separation of two galaxies, along and across the line of sight to their midpoint, as used in clustering
 * work: with s = r1 - r2 and l = (r1 + r2)/2, along = |s.l|/|l| and across = sqrt(s.s - along^2).
 * Space is taken as flat, with the line-of-sight comoving distance as radius: in a curved cosmology the values hold for
 * separations small against the curvature radius.
 *
 * Source: Fisher, Davis, Strauss, Yahil & Huchra 1994, MNRAS 266, 50, section 2 (value from memory).
 *
 * @param a,b RA and Dec in degrees, comoving distance in Mpc, not negative
 */
export function separation(a: ComovingPlace, b: ComovingPlace): Separation {
  const p = place(a);
  const q = place(b);
  const s = p.map((v, i) => v - q[i]!);
  const l = p.map((v, i) => v + q[i]!);
  const sumSquares = (v: readonly number[]): number => v.reduce((sum, x) => sum + x * x, 0);
  const total = Math.sqrt(sumSquares(s));
  const length = Math.sqrt(sumSquares(l));
  const along = length > 0 ? Math.abs(s.reduce((sum, x, i) => sum + x * l[i]!, 0)) / length : total;
  // total^2 - along^2 without cancellation: (total - along)(total + along).
  const across = Math.sqrt(Math.max(0, total - along) * (total + along));
  return { totalMpc: total, alongMpc: along, acrossMpc: across, angleDeg: angleBetweenDeg(a, b) };
}

const place = ({ raDeg, decDeg, comovingMpc }: ComovingPlace): number[] => {
  const cosDec = Math.cos(decDeg * DEGREE);
  return [
    comovingMpc * cosDec * Math.cos(raDeg * DEGREE),
    comovingMpc * cosDec * Math.sin(raDeg * DEGREE),
    comovingMpc * Math.sin(decDeg * DEGREE),
  ];
};

/** Angle between two sky positions, degrees; haversine form, exact for small angles. */
function angleBetweenDeg(a: ComovingPlace, b: ComovingPlace): number {
  const h =
    Math.sin(((a.decDeg - b.decDeg) * DEGREE) / 2) ** 2 +
    Math.cos(a.decDeg * DEGREE) *
      Math.cos(b.decDeg * DEGREE) *
      Math.sin(((a.raDeg - b.raDeg) * DEGREE) / 2) ** 2;
  return (2 * Math.asin(Math.min(1, Math.sqrt(h)))) / DEGREE;
}
