import type { Cosmology } from '../cosmology/cosmology.ts';

/** A way to read the one radial axis: a monotone function of redshift and its inverse. */
export interface RadialAxis {
  readonly kind: 'comoving' | 'redshift' | 'lookback';
  /** Reading at a redshift: Mpc, plain number or Gyr. */
  at(z: number): number;
  /** The redshift at a reading. @throws Refusal where there is none */
  redshiftAt(reading: number): number;
}

/** The axis of a kind in a cosmology, z in 0..1100. */
export function radialAxis(kind: RadialAxis['kind'], cosmology: Cosmology): RadialAxis {
  switch (kind) {
    case 'redshift':
      return { kind, at: (z) => z, redshiftAt: (z) => z };
    case 'comoving':
      return {
        kind,
        at: (z) => cosmology.comovingMpc(z),
        redshiftAt: (d) => (d <= 0 ? 0 : cosmology.redshiftAtComovingMpc(d)),
      };
    case 'lookback':
      return {
        kind,
        at: (z) => cosmology.lookbackGyr(z),
        redshiftAt: (t) => (t <= 0 ? 0 : cosmology.redshiftAtLookbackGyr(t)),
      };
  }
}
