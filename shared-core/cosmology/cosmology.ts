import type { CosmologyParameters } from './parameters.ts';

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
  ageGyr(z: number): number;
  /** All-sky comoving volume within z. */
  comovingVolumeMpc3(z: number): number;
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
  /** Fills the outputs from the redshifts; arrays of one length; NaN where z is outside 0..1100. */
  fill(redshift: Float64Array, comovingMpc: Float64Array, lookbackGyr: Float64Array | null): void;
}
