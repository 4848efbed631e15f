import { Refusal } from '../base/refusal.ts';
import { cbrt, expm1, log, log1p, square } from '../numerics/elementary/elementary.ts';
import { findRisingRoot } from '../numerics/roots.ts';
import type { Cosmology } from './cosmology.ts';
import type { Geometry } from './geometry.ts';
import type { ExpansionIntegrals } from './integrals.ts';
import { MAX_REDSHIFT } from './redshiftRange.ts';

type Inverses = Pick<
  Cosmology,
  'redshiftAtComovingMpc' | 'redshiftAtLookbackGyr' | 'redshiftAtAgeGyr' | 'redshiftAtVolumeMpc3'
>;

const MAX_LOG = log1p(MAX_REDSHIFT);

/** Redshift of a distance, time or volume: Newton on the quadrature in u = ln(1+z), to rounding. */
export function createInverses(
  integrals: ExpansionIntegrals,
  geometry: Geometry,
  hubbleMpc: number,
  hubbleGyr: number,
): Inverses {
  const { comovingIntegrand, timeIntegrand } = integrals;

  const logAtComoving = (target: number) =>
    findRisingRoot(
      (u) => ({ value: integrals.comoving(0, u) - target, slope: comovingIntegrand(u) }),
      0,
      MAX_LOG,
      target,
    );

  const redshiftAtComovingMpc = (comovingMpc: number) => {
    const farthest = hubbleMpc * integrals.comoving(0, MAX_LOG);
    refuseUnless(
      comovingMpc >= 0 && comovingMpc <= farthest,
      'Comoving distance',
      comovingMpc,
      'Mpc',
      farthest,
    );
    return expm1(logAtComoving(comovingMpc / hubbleMpc));
  };

  return {
    redshiftAtComovingMpc,

    redshiftAtLookbackGyr: (lookbackGyr) => {
      const longest = hubbleGyr * integrals.time(0, MAX_LOG);
      refuseUnless(lookbackGyr >= 0 && lookbackGyr <= longest, 'Lookback time', lookbackGyr, 'Gyr', longest);
      const target = lookbackGyr / hubbleGyr;
      const u = findRisingRoot(
        (at) => ({ value: integrals.time(0, at) - target, slope: timeIntegrand(at) }),
        0,
        MAX_LOG,
        target,
      );
      return expm1(u);
    },

    // ln(age) is nearly a straight line in u
    redshiftAtAgeGyr: (ageGyr) => {
      const today = hubbleGyr * integrals.timeToBeginning(0);
      if (today === Number.POSITIVE_INFINITY) {
        throw new Refusal(
          'This universe has no beginning, so an age gives no redshift; ask by lookback time.',
          'use',
        );
      }
      const youngest = hubbleGyr * integrals.timeToBeginning(MAX_LOG);
      if (!(ageGyr >= youngest && ageGyr <= today)) {
        throw new Refusal(
          `Age ${ageGyr} Gyr is outside the history of this universe; give one from ${youngest.toExponential(2)} to ${today.toPrecision(8)} Gyr.`,
          'use',
        );
      }
      const target = ageGyr / hubbleGyr;
      const u = findRisingRoot(
        (at) => {
          const age = integrals.timeToBeginning(at);
          return { value: -log(age / target), slope: timeIntegrand(at) / age };
        },
        0,
        MAX_LOG,
        -log(ageGyr / today),
      );
      return expm1(u);
    },

    // the cube root of the volume is nearly a straight line in the comoving distance
    redshiftAtVolumeMpc3: (volumeMpc3) => {
      const farthest = Math.min(hubbleMpc * integrals.comoving(0, MAX_LOG), geometry.antipode);
      const largest = geometry.shellVolume(0, farthest, farthest);
      refuseUnless(volumeMpc3 >= 0 && volumeMpc3 <= largest, 'All-sky volume', volumeMpc3, 'Mpc^3', largest);
      const target = cbrt(volumeMpc3);
      const comoving = findRisingRoot(
        (at) => {
          const side = cbrt(geometry.shellVolume(0, at, at));
          return {
            value: side - target,
            slope: (4 * Math.PI * square(geometry.transverse(at))) / (3 * side * side),
          };
        },
        0,
        farthest,
        target / cbrt((4 * Math.PI) / 3),
      );
      return redshiftAtComovingMpc(comoving);
    },
  };
}

function refuseUnless(fits: boolean, what: string, came: number, unit: string, limit: number): void {
  if (fits) return;
  throw new Refusal(
    `${what} ${came} ${unit} is at no redshift of this cosmology; give one from 0 to ${limit.toPrecision(8)} ${unit}.`,
    'use',
  );
}
