import { cube, powerOf, square } from '../numerics/elementary/elementary.ts';

/** Exact by definition (SI). */
export const SPEED_OF_LIGHT_KM_S = 299792.458;

/** IAU 2015 resolution B2: the parsec is 648000/pi astronomical units of 149597870700 m. */
export const KM_PER_MPC = (648000 / Math.PI) * 149597870.7 * 1e6;

/** Julian year of 365.25 days. */
export const SECONDS_PER_GYR = 365.25 * 86400 * 1e9;

/** CODATA 2018: G in m3/(kg s2); Boltzmann's constant in eV/K (exact); Stefan-Boltzmann in W/(m2 K4) (exact). */
export const GRAVITATION_SI = 6.6743e-11;
export const BOLTZMANN_EV_K = 1.380649e-23 / 1.602176634e-19;
export const STEFAN_BOLTZMANN_SI =
  (2 * powerOf(Math.PI, 5) * powerOf(1.380649e-23, 4)) / (15 * cube(6.62607015e-34) * square(299792458));
