import type { PictureOptions } from '../../shared-core/picture/options.ts';
import { galaxiesText } from './caption.ts';
import type { PictureNumbers } from './numbers.ts';
import type { ViewDrawing } from './views/view.ts';

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
  const { shells, facts, cosmology } = numbers;
  const out = [`${kind}: ${drawing.words}. ${galaxiesText(numbers)}`];
  const z = facts.selected?.sample.redshift;
  if (z && z.length > 0) {
    const [low, high] = [z[0]!, z[z.length - 1]!];
    out[0] += ` from redshift ${+low.toFixed(3)} to ${+high.toFixed(3)} (lookback time up to ${cosmology.lookbackGyr(high).toFixed(2)} Gyr)`;
  }
  out[0] += '.';
  if (options.shells)
    for (const s of shells)
      out.push(
        `Shell ${+s.zMin.toFixed(4)} < z < ${+s.zMax.toFixed(4)}: ${s.count === 0 ? 'no galaxies' : `${s.count} galaxies`}, comoving distance ${s.comovingMinMpc.toFixed(0)} to ${s.comovingMaxMpc.toFixed(0)} Mpc.`,
      );
  if (numbers.colours.legend)
    out.push(
      `Colour shows ${numbers.colours.legend.title}, from ${numbers.colours.legend.low} to ${numbers.colours.legend.high}.`,
    );
  for (const label of options.labels)
    out.push(`Label at RA ${label.raDeg}, Dec ${label.decDeg}, redshift ${label.redshift}: ${label.text}.`);
  if (drawing.notes.length > 0) out.push(`Note: ${drawing.notes.join('; ')}.`);
  return out.join(' ');
}
