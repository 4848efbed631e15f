import { formatNumber } from '../../../shared-core/report/quantity.ts';
import type { ShellStatistics } from '../../../shared-core/shells/shell.ts';
import type { ShellConditions } from '../../../shared-core/shells/statistics.ts';
import type { FootprintPicture } from '../../engine/protocol.ts';

/** Something a scientist would want to be told about a shell, and the quantity it is about. */
export interface ShellWarning {
  readonly key: string;
  readonly sentence: string;
}

/** Below this the Poisson error of the density is above a tenth (1/sqrt(100)): common practice, no source. */
const FEW_GALAXIES = 100;
/** Effective volumes that differ by more than this are told: our choice. */
const UNEVEN = 0.1;

/**
 * What to beware of in a shell: no or few galaxies, shot noise above the signal (n P0 < 1), n(z) uneven inside the
 * shell, and an area that is only estimated. Nothing for a plan without a catalogue but the last.
 */
export function shellWarnings(
  shell: ShellStatistics,
  conditions: ShellConditions,
  estimate: FootprintPicture['estimate'],
  planned: boolean,
): ShellWarning[] {
  const out: ShellWarning[] = [];
  const tell = (key: string, sentence: string) => void out.push({ key, sentence });
  const percent = (share: number) => `${formatNumber(100 * share, { significant: 2 })} %`;

  if (!planned && shell.count === 0)
    tell('count', 'No galaxy lies in this shell: it has a volume, but nothing was measured in it.');
  if (!planned && shell.count > 0) {
    const galaxies = `${shell.count} ${shell.count === 1 ? 'galaxy' : 'galaxies'}`;
    if (shell.densityPerMpc3 === 0) {
      tell('weightedCount', `The weights of the ${galaxies} add up to 0: nothing follows from this shell.`);
    } else if (shell.count < FEW_GALAXIES)
      tell(
        'count',
        `Only ${galaxies}: the Poisson error of n is ${percent(shell.densityErrorPerMpc3 / shell.densityPerMpc3)}.`,
      );
    const power = shell.densityPerMpc3 * (conditions.p0Mpc3PerH3 / conditions.cosmology.h ** 3);
    if (power > 0 && power < 1)
      tell(
        'densityPerMpc3',
        `n P0 is ${formatNumber(power, { significant: 2 })}, below 1: shot noise is above the signal, more galaxies help more than more volume.`,
      );
    const ratio = shell.effectiveVolumeMpc3 / shell.effectiveVolumeUniformMpc3;
    if (shell.densityPerMpc3 > 0 && Math.abs(ratio - 1) > UNEVEN)
      tell(
        'effectiveVolumeMpc3',
        `V eff is ${percent(ratio)} of V eff uniform, what an even density would give: n(z) changes a good deal inside this shell, narrower shells would show it.`,
      );
  }
  if (estimate !== null)
    tell(
      'volumeMpc3',
      `The area is estimated, to ${percent(estimate.areaErrorDeg2 / conditions.areaDeg2)}: that error enters V and n and stands beside the errors given here.`,
    );
  return out;
}
