import type { Cosmology } from '../../shared-core/cosmology/cosmology.ts';
import { type ShownUnits, UNITS } from '../../shared-core/report/quantity.ts';
import { type RadialAxis, radialAxis } from '../../shared-core/shells/radial.ts';
import type { RadialReading } from '../../shared-core/study/schema.ts';

/** One of the three ways to read the depth, in the units shown. */
export interface Reading {
  readonly kind: RadialReading;
  /** Short name: z, Gyr, Mpc or Mpc/h. */
  readonly unit: string;
  readonly words: string;
  /** Shown number = reading of the RadialAxis x factor. */
  readonly factor: number;
  /** The shown number at a redshift, for drawing. */
  shownAt(z: number): number;
  /** The redshift of a shown number, for drawing. */
  redshiftAt(shown: number): number;
  /** The same to the last digit, for an edge that a person puts there. @throws Refusal where there is none */
  exactRedshiftAt(shown: number): number;
}

export type Readings = Readonly<Record<RadialReading, Reading>>;

/**
 * The radial axis from the table of the cosmology (z in 0..1100; held to 1e-7): a hundred times faster than the
 * quadrature, and far finer than a pixel.
 */
export function drawnAxis(kind: RadialReading, cosmology: Cosmology): RadialAxis {
  const table = cosmology.table();
  switch (kind) {
    case 'redshift':
      return radialAxis(kind, cosmology);
    case 'comoving':
      return {
        kind,
        at: (z) => table.comovingMpc(z),
        redshiftAt: (d) => (d <= 0 ? 0 : table.redshiftAtComovingMpc(d)),
      };
    case 'lookback':
      return {
        kind,
        at: (z) => table.lookbackGyr(z),
        redshiftAt: (t) => (t <= 0 ? 0 : table.redshiftAtLookbackGyr(t)),
      };
  }
}

/** The three readings in a cosmology and in the units that the reader chose. */
export function readingsOf(cosmology: Cosmology, units: ShownUnits): Readings {
  const factor = units.perH ? units.h ** UNITS.Mpc.lengthPower : 1;
  return {
    redshift: reading('redshift', 'z', 'redshift', 1, cosmology),
    lookback: reading('lookback', UNITS.Gyr.plain[0], 'lookback time', 1, cosmology),
    comoving: reading(
      'comoving',
      UNITS.Mpc.plain[units.perH ? 1 : 0],
      'comoving distance',
      factor,
      cosmology,
    ),
  };
}

function reading(
  kind: RadialReading,
  unit: string,
  words: string,
  factor: number,
  cosmology: Cosmology,
): Reading {
  const drawn = drawnAxis(kind, cosmology);
  const exact = radialAxis(kind, cosmology);
  return {
    kind,
    unit,
    words,
    factor,
    shownAt: (z) => drawn.at(z) * factor,
    redshiftAt: (shown) => drawn.redshiftAt(shown / factor),
    exactRedshiftAt: (shown) => exact.redshiftAt(shown / factor),
  };
}
