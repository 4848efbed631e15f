import { Refusal } from '../../../shared-core/base/refusal.ts';
import { parseNumber } from '../../../shared-core/catalogue/numbers.ts';
import { type CosmologyParameters, validateCosmology } from '../../../shared-core/cosmology/parameters.ts';

export type ParameterName = keyof CosmologyParameters;
type NumberName = Exclude<ParameterName, 'omegaDe0' | 'neutrinoMassesEv'>;

/** The parameters that are one number each, in the order of the form. */
export const NUMBER_FIELDS: readonly {
  readonly name: NumberName;
  readonly label: string;
  readonly unit: string;
}[] = [
  { name: 'h0KmSMpc', label: 'H₀', unit: 'km/s/Mpc' },
  { name: 'omegaM0', label: 'Ω matter', unit: '' },
  { name: 'w0', label: 'w₀', unit: '' },
  { name: 'wa', label: 'wₐ', unit: '' },
  { name: 'tCmbK', label: 'T CMB', unit: 'K' },
  { name: 'nEff', label: 'N eff', unit: '' },
];

const LABELS: Readonly<Record<ParameterName, string>> = {
  h0KmSMpc: 'H₀',
  omegaM0: 'Ω matter',
  omegaDe0: 'Ω dark energy',
  w0: 'w₀',
  wa: 'wₐ',
  tCmbK: 'T CMB',
  nEff: 'N eff',
  neutrinoMassesEv: 'The neutrino masses',
};

/** A refusal of parameters: the sentence, in the form's own words, and the field that it stands under. */
export interface ParameterTrouble {
  readonly field: ParameterName;
  readonly sentence: string;
}

/** Why the core refuses the parameters, or null. The core's sentence begins with the name of the one to blame. */
export function parameterTrouble(parameters: CosmologyParameters): ParameterTrouble | null {
  try {
    validateCosmology(parameters);
    return null;
  } catch (error) {
    if (!(error instanceof Refusal)) throw error;
    const { message } = error;
    const field =
      (Object.keys(LABELS) as ParameterName[]).find((name) => message.startsWith(name)) ?? 'omegaM0';
    return {
      field,
      sentence: message.replace(
        /\b[a-z]+[A-Z0-9]\w*\b|\bwa\b/g,
        (name) => LABELS[name as ParameterName] ?? name,
      ),
    };
  }
}

/** Masses as typed, parted by commas or spaces; an empty text is none. Null where one is no number. */
export function readMasses(text: string): number[] | null {
  const cells = text.split(/[\s,;]+/).filter((cell) => cell !== '');
  const masses = cells.map(parseNumber);
  return masses.some(Number.isNaN) ? null : masses;
}
