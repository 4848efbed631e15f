import { cos, cosh, cube, sin, sinh, square } from '../numerics/elementary/elementary.ts';

/**
 * Curved space of radius R = D_H / sqrt|Omega_k| as in Hogg 1999 (astro-ph/9905116), eq. 16 and 29, in forms that
 * lose no digits for small distances, small curvature or thin shells.
 */
export interface Geometry {
  /** Transverse comoving distance: R sinh(D/R), D or R sin(D/R). */
  transverse(comoving: number): number;
  /** Volume of the whole sky between two comoving distances; `thickness` = far - near, kept apart for its digits. */
  shellVolume(near: number, far: number, thickness: number): number;
  /** Closed space: the comoving distance of the antipode, pi R; else Infinity. */
  readonly antipode: number;
}

export function createGeometry(hubbleDistance: number, omegaK0: number): Geometry {
  if (omegaK0 === 0) {
    return {
      transverse: (comoving) => comoving,
      shellVolume: (near, far, thickness) =>
        ((4 * Math.PI) / 3) * thickness * (near * near + near * far + far * far),
      antipode: Number.POSITIVE_INFINITY,
    };
  }
  const radius = hubbleDistance / Math.sqrt(Math.abs(omegaK0));
  const volumeUnit = 2 * Math.PI * cube(radius);
  if (omegaK0 > 0) {
    return {
      transverse: (comoving) => radius * sinh(comoving / radius),
      // integral of 2 sinh^2 = sinh(d) cosh(s) - d with d = far - near, s = far + near in units of R
      shellVolume: (near, far, thickness) => {
        const d = thickness / radius;
        const s = (near + far) / radius;
        return volumeUnit * (sinhMinusArgument(d) * cosh(s) + 2 * d * square(sinh(s / 2)));
      },
      antipode: Number.POSITIVE_INFINITY,
    };
  }
  return {
    transverse: (comoving) => radius * sin(comoving / radius),
    // integral of 2 sin^2 = d - sin(d) cos(s)
    shellVolume: (near, far, thickness) => {
      const d = thickness / radius;
      const s = (near + far) / radius;
      return volumeUnit * (argumentMinusSine(d) * cos(s) + 2 * d * square(sin(s / 2)));
    },
    antipode: Math.PI * radius,
  };
}

/** sinh t - t, from its series where the difference would lose digits. */
function sinhMinusArgument(t: number): number {
  return Math.abs(t) > 1 ? sinh(t) - t : cubicSeries(t, t * t);
}

/** t - sin t, likewise. */
function argumentMinusSine(t: number): number {
  return Math.abs(t) > 1 ? t - sin(t) : cubicSeries(t, -t * t);
}

/** t^3/3! (1 + q/(4 5) (1 + q/(6 7) (...))): nine terms reach 1e-17 for |q| <= 1. */
function cubicSeries(t: number, q: number): number {
  let nested = 1;
  for (let k = 9; k >= 1; k--) nested = 1 + (q * nested) / ((2 * k + 2) * (2 * k + 3));
  return (t * t * t * nested) / 6;
}
