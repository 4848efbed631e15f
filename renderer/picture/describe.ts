import type { PictureOptions } from '../../shared-core/picture/options.ts';
import { shownColumn, shownUnit } from '../../shared-core/report/quantity.ts';
import { SHELL_QUANTITIES } from '../../shared-core/report/shellQuantities.ts';
import { shellRanges } from '../../shared-core/report/shellRange.ts';
import { galaxiesText } from './caption.ts';
import type { PictureNumbers } from './numbers.ts';
import type { ViewDrawing } from './views/view.ts';

const DISTANCES = SHELL_QUANTITIES.filter((q) => q.key === 'comovingMinMpc' || q.key === 'comovingMaxMpc');

const VIEW_WORDS = {
  cone: 'Cone diagram',
  perspective: 'Cone in perspective',
  wedge: 'Wedge diagram',
  sky: 'Shells nested on the sky',
  'light-cone': 'Light-cone diagram',
} as const;

/**
 * The picture in words, for who cannot see it: kind, contents, depth, shells with their numbers, labels.
 * @param kind of picture, as the sentence begins
 */
export function describeInWords(
  options: PictureOptions,
  numbers: PictureNumbers,
  drawing: Pick<ViewDrawing, 'words' | 'notes'>,
  kind: string = VIEW_WORDS[options.view],
): string {
  const { facts, cosmology } = numbers;
  const out = [`${kind}: ${drawing.words}. ${galaxiesText(numbers)}`];
  const z = facts.selected?.sample.redshift;
  if (z && z.length > 0) {
    const [low, high] = [z[0]!, z[z.length - 1]!];
    out[0] += ` from redshift ${+low.toFixed(3)} to ${+high.toFixed(3)} (lookback time up to ${cosmology.lookbackGyr(high).toFixed(2)} Gyr)`;
  }
  out[0] += '.';
  if (options.shells) out.push(...shellSentences(numbers));
  if (numbers.colours.legend)
    out.push(
      `Colour shows ${numbers.colours.legend.title}, from ${numbers.colours.legend.low} to ${numbers.colours.legend.high}.`,
    );
  for (const label of options.labels)
    out.push(`Label at RA ${label.raDeg}, Dec ${label.decDeg}, redshift ${label.redshift}: ${label.text}.`);
  if (drawing.notes.length > 0) out.push(`Note: ${drawing.notes.join('; ')}.`);
  return out.join(' ');
}

/** A sentence for each shell, with the digits and the unit of length of the ledger. */
function shellSentences({ shells, all, units, facts }: PictureNumbers): string[] {
  const column = all === null ? shells : [...shells, all];
  const [near, far] = DISTANCES.map((quantity) => shownColumn(quantity, column, units));
  const unit = shownUnit(DISTANCES[0]!, units);
  return shellRanges(shells).map((range, i) => {
    const shell = shells[i]!;
    // A plan has none to count.
    const galaxies = facts.selected === null ? '' : `${held(shell.count)}, `;
    return `Shell ${range}: ${galaxies}comoving distance ${near!(shell)} to ${far!(shell)} ${unit}.`;
  });
}

const held = (count: number): string =>
  count === 0 ? 'no galaxies' : `${count} ${count === 1 ? 'galaxy' : 'galaxies'}`;
