import { Refusal } from '../base/refusal.ts';
import type { Cosmology } from '../cosmology/cosmology.ts';
import type { Quantity } from './quantity.ts';

/** Everything the background says of one redshift. */
export interface DistanceRow {
  readonly z: number;
  readonly comovingMpc: number;
  readonly transverseComovingMpc: number;
  readonly angularDiameterMpc: number;
  readonly luminosityMpc: number;
  readonly distanceModulus: number;
  readonly volumeAveragedMpc: number;
  readonly lookbackGyr: number;
  readonly ageGyr: number;
  readonly hubbleKmSMpc: number;
  readonly comovingVolumeMpc3: number;
  readonly differentialVolumeMpc3PerSr: number;
}

/**
 * Distances, times and volumes at each redshift, by direct quadrature.
 * @throws Refusal ('use') for a redshift outside 0..1100
 */
export function distanceRows(cosmology: Cosmology, redshifts: readonly number[]): DistanceRow[] {
  return redshifts.map((z) => {
    if (!(Number.isFinite(z) && z >= 0 && z <= 1100))
      throw new Refusal(`Redshift ${z} came, expected a number from 0 to 1100: correct it.`, 'use');
    return {
      z,
      comovingMpc: cosmology.comovingMpc(z),
      transverseComovingMpc: cosmology.transverseComovingMpc(z),
      angularDiameterMpc: cosmology.angularDiameterMpc(z),
      luminosityMpc: cosmology.luminosityMpc(z),
      distanceModulus: cosmology.distanceModulus(z),
      volumeAveragedMpc: cosmology.volumeAveragedMpc(z),
      lookbackGyr: cosmology.lookbackGyr(z),
      ageGyr: cosmology.ageGyr(z),
      hubbleKmSMpc: cosmology.hubbleKmSMpc(z),
      comovingVolumeMpc3: cosmology.comovingVolumeMpc3(z),
      differentialVolumeMpc3PerSr: cosmology.differentialVolumeMpc3PerSr(z),
    };
  });
}

const HOGG = 'Hogg 1999, astro-ph/9905116';

/** Every number of a redshift, in the order of tables. */
export const DISTANCE_QUANTITIES: readonly Quantity<DistanceRow>[] = [
  {
    key: 'z',
    title: 'z',
    latexTitle: '$z$',
    unit: 'none',
    value: (d) => d.z,
    show: { decimals: 4 },
    meaning: 'Redshift.',
    formula: 'as given',
    source: 'the question',
  },
  length(
    'comovingMpc',
    'D_C',
    '$D_{\\rm C}$',
    'Line-of-sight comoving distance.',
    'D_C = c / H0 * integral of dz / E(z)',
    'eq. 15',
  ),
  length(
    'transverseComovingMpc',
    'D_M',
    '$D_{\\rm M}$',
    'Transverse comoving distance.',
    'D_M = S_k(D_C)',
    'eq. 16',
  ),
  length(
    'angularDiameterMpc',
    'D_A',
    '$D_{\\rm A}$',
    'Angular-diameter distance.',
    'D_A = D_M / (1 + z)',
    'eq. 18',
  ),
  length('luminosityMpc', 'D_L', '$D_{\\rm L}$', 'Luminosity distance.', 'D_L = (1 + z) D_M', 'eq. 21'),
  {
    key: 'distanceModulus',
    title: 'DM',
    latexTitle: '$\\mu$',
    unit: 'mag',
    value: (d) => (Number.isFinite(d.distanceModulus) ? d.distanceModulus : null),
    show: { decimals: 4 },
    meaning: 'Distance modulus, without h: lengths in Mpc.',
    formula: 'DM = 5 log10(D_L / 10 pc)',
    source: `${HOGG}, eq. 25`,
  },
  {
    ...length(
      'volumeAveragedMpc',
      'D_V',
      '$D_{\\rm V}$',
      'Volume-averaged distance.',
      'D_V = [z D_M^2 c / H(z)]^(1/3)',
      '',
    ),
    source: 'Eisenstein et al. 2005, astro-ph/0501171, eq. 2',
  },
  {
    key: 'lookbackGyr',
    title: 'lookback',
    latexTitle: '$t_{\\rm L}$',
    unit: 'Gyr',
    startsBlock: true,
    value: (d) => d.lookbackGyr,
    show: { decimals: 4 },
    meaning: 'Lookback time.',
    formula: 't_L = 1 / H0 * integral from 0 to z of dz / [(1 + z) E(z)]',
    source: `${HOGG}, eq. 30`,
  },
  {
    key: 'ageGyr',
    title: 'age',
    latexTitle: '$t$',
    unit: 'Gyr',
    value: (d) => d.ageGyr,
    show: { decimals: 4 },
    meaning: 'Age of the universe at that redshift.',
    formula: 't = 1 / H0 * integral from z to infinity of dz / [(1 + z) E(z)]',
    source: `${HOGG}, section 10`,
  },
  {
    key: 'hubbleKmSMpc',
    title: 'H',
    latexTitle: '$H(z)$',
    unit: 'kmSMpc',
    value: (d) => d.hubbleKmSMpc,
    show: { decimals: 3 },
    meaning: 'Hubble parameter.',
    formula: 'H = H0 E(z)',
    source: `${HOGG}, eq. 14`,
  },
  {
    key: 'comovingVolumeMpc3',
    keyPerH: 'comovingVolumeMpc3PerH3',
    title: 'V_C all sky',
    latexTitle: '$V_{\\rm C}$',
    unit: 'Mpc3',
    value: (d) => d.comovingVolumeMpc3,
    show: { significant: 6 },
    meaning: 'Comoving volume of the whole sky out to that redshift.',
    formula: 'V_C = 4 pi / 3 * D_M^3 for a flat universe',
    source: `${HOGG}, eq. 29`,
  },
  {
    key: 'differentialVolumeMpc3PerSr',
    keyPerH: 'differentialVolumeMpc3PerH3PerSr',
    title: 'dV/dz/dOmega',
    latexTitle: '$\\mathrm{d}V/\\mathrm{d}z/\\mathrm{d}\\Omega$',
    unit: 'Mpc3PerSr',
    value: (d) => d.differentialVolumeMpc3PerSr,
    show: { significant: 6 },
    meaning: 'Comoving volume per unit redshift and solid angle.',
    formula: 'dV/dz/dOmega = c D_M^2 / H(z)',
    source: `${HOGG}, eq. 28`,
  },
];

function length(
  key: Exclude<keyof DistanceRow, 'z'>,
  title: string,
  latexTitle: string,
  meaning: string,
  formula: string,
  equation: string,
): Quantity<DistanceRow> {
  return {
    key,
    keyPerH: `${key}PerH`,
    title,
    latexTitle,
    unit: 'Mpc',
    value: (d) => d[key],
    show: { decimals: 3 },
    meaning,
    formula,
    source: `${HOGG}, ${equation}`,
  };
}
