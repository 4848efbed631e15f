import { Refusal } from '../base/refusal.ts';
import { createBackgroundTable } from './backgroundTable.ts';
import { KM_PER_MPC, SECONDS_PER_GYR, SPEED_OF_LIGHT_KM_S } from './constants.ts';
import { createExpansion } from './expansion.ts';
import { createGeometry } from './geometry.ts';
import { createIntegrals } from './integrals.ts';
import { createInverses } from './inverses.ts';
import type { CosmologyParameters } from './parameters.ts';
import { logOnePlus } from './redshiftRange.ts';
import { validateCosmology } from './validation.ts';

/** Distances, times and volumes of one universe. Redshifts are plain numbers; every unit ends its name. */
export interface Cosmology {
  readonly parameters: CosmologyParameters;
  /** H0 / (100 km/s/Mpc). */
  readonly h: number;
  readonly omegaDe0: number;
  readonly omegaK0: number;
  /** Photons, and neutrinos (massless and massive, as they weigh today). */
  readonly omegaGamma0: number;
  readonly omegaNu0: number;
  hubbleKmSMpc(z: number): number;
  comovingMpc(z: number): number;
  transverseComovingMpc(z: number): number;
  angularDiameterMpc(z: number): number;
  luminosityMpc(z: number): number;
  distanceModulus(z: number): number;
  /** Volume-averaged distance D_V = [z D_M^2 c/H]^(1/3). */
  volumeAveragedMpc(z: number): number;
  lookbackGyr(z: number): number;
  /** Infinity in a universe without a beginning (de Sitter). */
  ageGyr(z: number): number;
  /** Comoving distance light has travelled since the beginning; Infinity where that diverges. */
  particleHorizonMpc(): number;
  /** All-sky comoving volume within z. */
  comovingVolumeMpc3(z: number): number;
  /** All-sky comoving volume between two redshifts, with full digits for shells of any thinness. */
  shellVolumeAllSkyMpc3(zMin: number, zMax: number): number;
  /** dV/dz/dOmega. */
  differentialVolumeMpc3PerSr(z: number): number;
  redshiftAtComovingMpc(comovingMpc: number): number;
  redshiftAtLookbackGyr(lookbackGyr: number): number;
  redshiftAtAgeGyr(ageGyr: number): number;
  redshiftAtVolumeMpc3(volumeMpc3: number): number;
  /** A table for per-galaxy work, valid over 0 <= z <= 1100. Built at first use, then kept. */
  table(): BackgroundTable;
}

/** Fast interpolation, held to 1e-9 of direct quadrature for 1e-6 < z < 20 and 1e-7 up to z 1100. */
export interface BackgroundTable {
  comovingMpc(z: number): number;
  lookbackGyr(z: number): number;
  redshiftAtComovingMpc(comovingMpc: number): number;
  redshiftAtLookbackGyr(lookbackGyr: number): number;
  /** Fills the outputs from the redshifts; arrays of one length; NaN where z is outside 0..1100. */
  fill(redshift: Float64Array, comovingMpc: Float64Array, lookbackGyr: Float64Array | null): void;
}

/**
 * Distances, times and volumes of a homogeneous universe by adaptive quadrature, relative error below 1e-12:
 * Hogg 1999 (astro-ph/9905116), eq. 14 to 30. All methods take 0 <= z <= 1e9.
 *
 * At z = 0 the distance modulus is -Infinity. Where the past has no end (de Sitter) the age is Infinity.
 *
 * @throws Refusal from here for parameters that make no universe (see validateCosmology); from the methods for a
 * redshift out of range, from the transverse, angular-diameter and luminosity distances beyond the antipode of a
 * closed universe, and from the inverses for a value that no redshift has
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
  const transverseComovingMpc = (z: number) => {
    const comoving = comovingMpc(z);
    if (comoving > geometry.antipode) {
      throw new Refusal(
        `Redshift ${z} lies beyond the antipode of this closed universe (comoving distance ${comoving.toPrecision(6)} Mpc, antipode ${geometry.antipode.toPrecision(6)} Mpc); choose a lower redshift or less curvature.`,
        'use',
      );
    }
    return geometry.transverse(comoving);
  };
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
    const thickness = hubbleMpc * integrals.comoving(near, Math.log1p((zMax - zMin) / (1 + zMin)));
    return geometry.shellVolume(nearMpc, nearMpc + thickness, thickness);
  };

  return {
    parameters,
    h: h0 / 100,
    omegaDe0: expansion.omegaDe0,
    omegaK0: expansion.omegaK0,
    omegaGamma0: expansion.omegaGamma0,
    omegaNu0: expansion.omegaNu0,
    hubbleKmSMpc: (z) => h0 * eOf(z),
    comovingMpc,
    transverseComovingMpc,
    angularDiameterMpc: (z) => transverseComovingMpc(z) / (1 + z),
    luminosityMpc,
    distanceModulus: (z) => 5 * Math.log10(luminosityMpc(z)) + 25,
    volumeAveragedMpc: (z) => Math.cbrt((z * transverseComovingMpc(z) ** 2 * hubbleMpc) / eOf(z)),
    lookbackGyr: (z) => hubbleGyr * integrals.time(0, logOnePlus(z)),
    ageGyr: (z) => hubbleGyr * integrals.timeToBeginning(logOnePlus(z)),
    particleHorizonMpc: () => hubbleMpc * integrals.comovingToBeginning(0),
    comovingVolumeMpc3: (z) => {
      const comoving = comovingMpc(z);
      return geometry.shellVolume(0, comoving, comoving);
    },
    shellVolumeAllSkyMpc3,
    differentialVolumeMpc3PerSr: (z) => (hubbleMpc * transverseComovingMpc(z) ** 2) / eOf(z),
    ...createInverses(integrals, geometry, hubbleMpc, hubbleGyr),
    table: () => (table ??= createBackgroundTable(integrals, hubbleMpc, hubbleGyr)),
  };
}
