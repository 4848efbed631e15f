import { areaText, estimateWords } from '../../../shared-core/report/areaWords.ts';
import {
  formatNumber,
  type Quantity,
  type ShownUnits,
  shownColumn,
  shownUnit,
} from '../../../shared-core/report/quantity.ts';
import { PLAN_QUANTITIES, SHELL_QUANTITIES } from '../../../shared-core/report/shellQuantities.ts';
import type { ShellStatistics } from '../../../shared-core/shells/shell.ts';
import type { ShellConditions } from '../../../shared-core/shells/statistics.ts';
import type { FootprintPicture } from '../../engine/protocol.ts';
import { p0Texts } from '../../strip/p0Text.ts';
import { unitText } from '../../ui/unitText.ts';

/** One thing that went into a number, as it was for this shell. */
export interface ExplainedInput {
  readonly name: string;
  readonly text: string;
  readonly unit: string;
}

/** What stands under a number when it is opened, beside the quantity's own words. */
export interface Explanation {
  readonly inputs: readonly ExplainedInput[];
  readonly uncertainty: string;
}

/** What the explanation of a shell's number needs to know. */
export interface ExplainedShell {
  readonly shell: ShellStatistics;
  /** All rows of the ledger: numbers are written as in their columns there. */
  readonly column: readonly ShellStatistics[];
  readonly conditions: ShellConditions;
  readonly estimate: FootprintPicture['estimate'];
  readonly units: ShownUnits;
  readonly cosmologyName: string;
  /** No catalogue is in. */
  readonly planned: boolean;
}

/** @param planned without a catalogue: what galaxies would say has no number */
export const shellQuantity = (key: string, planned = false): Quantity<ShellStatistics> | undefined =>
  (planned ? PLAN_QUANTITIES : SHELL_QUANTITIES).find((q) => q.key === key);

/** The quantities of the shell that each quantity is made of; further inputs are named by a word. */
const INPUTS: Readonly<Record<string, readonly string[]>> = {
  zMin: [],
  zMax: [],
  count: ['zMin', 'zMax'],
  weightedCount: ['zMin', 'zMax', 'count'],
  zMean: ['count'],
  zMedian: ['count'],
  zEffective: ['weightedCount', 'densityPerMpc3', 'p0'],
  comovingMinMpc: ['zMin', 'cosmology'],
  comovingMaxMpc: ['zMax', 'cosmology'],
  lookbackMinGyr: ['zMin', 'cosmology'],
  lookbackMaxGyr: ['zMax', 'cosmology'],
  ageMinGyr: ['zMin', 'cosmology'],
  ageMaxGyr: ['zMax', 'cosmology'],
  volumeMpc3: ['zMin', 'zMax', 'area', 'cosmology'],
  densityPerMpc3: ['weightedCount', 'volumeMpc3'],
  densityErrorPerMpc3: ['count', 'weightedCount', 'volumeMpc3'],
  effectiveVolumeMpc3: ['densityPerMpc3', 'volumeMpc3', 'p0'],
  effectiveVolumeUniformMpc3: ['densityPerMpc3', 'volumeMpc3', 'p0'],
  fundamentalWavenumberPerMpc: ['volumeMpc3'],
};

const BY_QUADRATURE =
  'Computed to a relative error below 1e-12; what is uncertain is the cosmology, whose errors are not carried through.';
const CHOSEN = 'None: it is chosen.';
const COUNTED =
  'None as a count of rows. As a sample of the universe it scatters: by Poisson alone, by the square root of N, and by clustering on top.';

/** What went into a number of a shell, and how sure it is. */
export function explain(key: string, of: ExplainedShell): Explanation {
  return {
    inputs: (INPUTS[key] ?? []).map((name) => input(name, of)),
    uncertainty:
      shellQuantity(key, of.planned)?.value(of.shell) === null && of.planned
        ? 'It takes the galaxies of a catalogue: without one it has no number.'
        : uncertainty(key, of),
  };
}

function input(
  name: string,
  { shell, column, conditions, estimate, units, cosmologyName, planned }: ExplainedShell,
): ExplainedInput {
  switch (name) {
    case 'cosmology':
      return { name: 'cosmology', text: cosmologyName, unit: '' };
    case 'p0':
      return { name: 'P0', text: p0Texts(conditions.p0Mpc3PerH3, units).join(' = '), unit: '' };
    case 'area': {
      const { value, error } = areaText({ areaDeg2: conditions.areaDeg2, estimate });
      return {
        name: estimate === null ? 'area, exact' : 'area, an estimate',
        text: error === null ? value : `${value} ± ${error}`,
        unit: 'deg^2',
      };
    }
    default: {
      const quantity = shellQuantity(name, planned)!;
      return {
        name: quantity.title,
        text: shownColumn(quantity, column, units)(shell),
        unit: shownUnit(quantity, units),
      };
    }
  }
}

function uncertainty(key: string, { shell, column, conditions, estimate, units }: ExplainedShell): string {
  const share = estimate === null ? null : estimate.areaErrorDeg2 / conditions.areaDeg2;
  const percent = (value: number) => `${formatNumber(100 * value, { significant: 2 })} %`;
  const area = share === null ? 'The area is exact.' : `The estimated area adds ${percent(share)}.`;
  switch (key) {
    case 'zMin':
    case 'zMax':
      return CHOSEN;
    case 'count':
    case 'weightedCount':
      return COUNTED;
    case 'zMean':
    case 'zMedian':
      return 'No error is given: the redshift errors of the catalogue are not read.';
    case 'zEffective':
      return 'No error is given. It depends on P0, and a little on how n(z) is cut into slices.';
    case 'volumeMpc3':
      return estimate === null
        ? `${BY_QUADRATURE} ${area}`
        : `${area} The area is estimated ${unitText(estimateWords(estimate))}. ${BY_QUADRATURE}`;
    case 'densityPerMpc3': {
      if (shell.count === 0) return 'No galaxy, no error: the density is 0 for want of data.';
      if (shell.densityPerMpc3 === 0)
        return 'No share can be given: the weights of the galaxies add up to 0, and so the density is 0.';
      const error = shellQuantity('densityErrorPerMpc3')!;
      const poisson = `Poisson ± ${shownColumn(error, column, units)(shell)} ${shownUnit(error, units)} (${percent(shell.densityErrorPerMpc3 / shell.densityPerMpc3)}), without clustering.`;
      return `${poisson} ${area}`;
    }
    case 'densityErrorPerMpc3':
      return 'It is itself an error: counting noise alone.';
    case 'effectiveVolumeMpc3':
    case 'effectiveVolumeUniformMpc3':
      return `No error is given: it follows n and V. ${area}`;
    case 'fundamentalWavenumberPerMpc':
      return share === null ? area : `A third of the area's error: ${percent(share / 3)}.`;
    default:
      return BY_QUADRATURE;
  }
}
