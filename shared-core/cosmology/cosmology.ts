import { Refusal } from '../base/refusal.ts';
import { roundTo } from '../base/roundTo.ts';
import { cbrt, log1p, log10, square } from '../numerics/elementary/elementary.ts';
import { createBackgroundTable } from './backgroundTable.ts';
import { KM_PER_MPC, SECONDS_PER_GYR, SPEED_OF_LIGHT_KM_S } from './constants.ts';
import { createExpansion } from './expansion.ts';
import { createGeometry } from './geometry.ts';
import { createIntegrals } from './integrals.ts';
import { createInverses } from './inverses.ts';
import type { CosmologyParameters } from './parameters.ts';
import { logOnePlus } from './redshiftRange.ts';
import { validateCosmology } from './validation.ts';

/**
 * Distances, times and volumes of one universe. Redshifts are plain numbers, 0 <= z <= 1e9; every unit ends its name.
 * Equations are those of Hogg 1999 (astro-ph/9905116).
 */
export interface Cosmology {
  readonly parameters: CosmologyParameters;
  /** H0 / (100 km/s/Mpc). */
  readonly h: number;
  readonly omegaDe0: number;
  readonly omegaK0: number;
  /** Comoving distance of the antipode of a closed universe, pi times its radius of curvature; Infinity in any other. */
  readonly antipodeMpc: number;
  /** Photons, and neutrinos (massless and massive, as they weigh today). */
  readonly omegaGamma0: number;
  readonly omegaNu0: number;
  /** H(z) = H0 E(z), eq. 14. */
  hubbleKmSMpc(z: number): number;
  /** Along the line of sight, eq. 15. */
  comovingMpc(z: number): number;
  /** Comoving size over angle, eq. 16. @throws Refusal beyond the antipode of a closed universe, as the next two */
  transverseComovingMpc(z: number): number;
  /** Eq. 18. */
  angularDiameterMpc(z: number): number;
  /** Eq. 21. */
  luminosityMpc(z: number): number;
  /** Magnitudes, eq. 25; -Infinity at z = 0. */
  distanceModulus(z: number): number;
  /** Volume-averaged distance D_V = [z D_M^2 c/H]^(1/3), Eisenstein et al. 2005 (astro-ph/0501171), eq. 2. */
  volumeAveragedMpc(z: number): number;
  /** Eq. 30. */
  lookbackGyr(z: number): number;
  /** From the beginning to z; Infinity in a universe without a beginning (de Sitter). */
  ageGyr(z: number): number;
  /** Comoving distance light has travelled since the beginning; Infinity where that diverges. */
  particleHorizonMpc(): number;
  /** Of the whole sky within z, eq. 29. @throws Refusal beyond the antipode of a closed universe, as the next two */
  comovingVolumeMpc3(z: number): number;
  /** Of the whole sky between two redshifts, with full digits for shells of any thinness. */
  shellVolumeAllSkyMpc3(zMin: number, zMax: number): number;
  /** dV/dz/dOmega, eq. 28. */
  differentialVolumeMpc3PerSr(z: number): number;
  /** Inverse of comovingMpc, as the others of theirs: to rounding. @throws Refusal for what no redshift has */
  redshiftAtComovingMpc(comovingMpc: number): number;
  redshiftAtLookbackGyr(lookbackGyr: number): number;
  redshiftAtAgeGyr(ageGyr: number): number;
  redshiftAtVolumeMpc3(volumeMpc3: number): number;
  /** A table for per-galaxy work, valid over 0 <= z <= 1100. Built at first use, then kept. */
  table(): BackgroundTable;
}

/**
 * Fast interpolation, held to 1e-9 of direct quadrature for 1e-6 < z < 20 and 1e-7 up to z 1100.
 * Single values outside 0..1100 are refused.
 */
export interface BackgroundTable {
  comovingMpc(z: number): number;
  lookbackGyr(z: number): number;
  redshiftAtComovingMpc(comovingMpc: number): number;
  redshiftAtLookbackGyr(lookbackGyr: number): number;
  /** Fills the outputs from the redshifts; arrays of one length; NaN where z is outside 0..1100. */
  fill(redshift: Float64Array, comovingMpc: Float64Array, lookbackGyr: Float64Array | null): void;
}

/**
 * The homogeneous universe of these parameters, by adaptive quadrature: relative error below 1e-12.
 *
 * @throws Refusal from here for parameters that make no universe (see validateCosmology); from the methods for a
 * redshift out of range, from the transverse, angular-diameter and luminosity distances and from the volumes beyond
 * the antipode of a closed universe, and from the inverses for a value that no redshift has
 */
export function createCosmology(parameters: CosmologyParameters): Cosmology {
  validateCosmology(parameters);
  const h0 = parameters.h0KmSMpc;
  const expansion = createExpansion(parameters);
  const integrals = createIntegrals(expansion);
  const hubbleMpc = SPEED_OF_LIGHT_KM_S / h0;
  const hubbleGyr = KM_PER_MPC / h0 / SECONDS_PER_GYR;
  const geometry = createGeometry(hubbleMpc, expansion.omegaK0);
  let table: BackgroundTable | null = null;

  const eOf = (z: number) => Math.sqrt(expansion.eSquared(logOnePlus(z)));
  const comovingMpc = (z: number) => hubbleMpc * integrals.comoving(0, logOnePlus(z));
  // Beyond the antipode space would be counted a second time.
  const withinAntipode = (z: number, comoving: number): number => {
    if (comoving <= geometry.antipode) return comoving;
    throw new Refusal(
      `Redshift ${roundTo(z, 6)} lies beyond the antipode of this closed universe (comoving distance ${comoving.toPrecision(6)} Mpc, antipode ${geometry.antipode.toPrecision(6)} Mpc); choose a lower redshift or less curvature.`,
      'use',
    );
  };
  const transverseComovingMpc = (z: number) => geometry.transverse(withinAntipode(z, comovingMpc(z)));
  const luminosityMpc = (z: number) => transverseComovingMpc(z) * (1 + z);
  const shellVolumeAllSkyMpc3 = (zMin: number, zMax: number) => {
    const near = logOnePlus(zMin);
    logOnePlus(zMax);
    if (zMax < zMin) {
      throw new Refusal(
        `A shell from z = ${zMin} to ${zMax} runs backwards; give the lower redshift first.`,
        'use',
      );
    }
    const nearMpc = hubbleMpc * integrals.comoving(0, near);
    const thickness = hubbleMpc * integrals.comoving(near, log1p((zMax - zMin) / (1 + zMin)));
    return geometry.shellVolume(nearMpc, withinAntipode(zMax, nearMpc + thickness), thickness);
  };

  return {
    parameters,
    h: h0 / 100,
    omegaDe0: expansion.omegaDe0,
    omegaK0: expansion.omegaK0,
    antipodeMpc: geometry.antipode,
    omegaGamma0: expansion.omegaGamma0,
    omegaNu0: expansion.omegaNu0,
    hubbleKmSMpc: (z) => h0 * eOf(z),
    comovingMpc,
    transverseComovingMpc,
    angularDiameterMpc: (z) => transverseComovingMpc(z) / (1 + z),
    luminosityMpc,
    distanceModulus: (z) => 5 * log10(luminosityMpc(z)) + 25,
    volumeAveragedMpc: (z) => cbrt((z * square(transverseComovingMpc(z)) * hubbleMpc) / eOf(z)),
    lookbackGyr: (z) => hubbleGyr * integrals.time(0, logOnePlus(z)),
    ageGyr: (z) => hubbleGyr * integrals.timeToBeginning(logOnePlus(z)),
    particleHorizonMpc: () => hubbleMpc * integrals.comovingToBeginning(0),
    comovingVolumeMpc3: (z) => {
      const comoving = withinAntipode(z, comovingMpc(z));
      return geometry.shellVolume(0, comoving, comoving);
    },
    shellVolumeAllSkyMpc3,
    differentialVolumeMpc3PerSr: (z) => (hubbleMpc * square(transverseComovingMpc(z))) / eOf(z),
    ...createInverses(integrals, geometry, hubbleMpc, hubbleGyr),
    table: () => (table ??= createBackgroundTable(integrals, hubbleMpc, hubbleGyr)),
  };
}
