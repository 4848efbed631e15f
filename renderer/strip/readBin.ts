import type { StripModel } from './stripModel.ts';
import { binTexts, depthTexts } from './words.ts';

/** The bin under a pixel column, in words; nothing without galaxies. */
export function readBin(model: StripModel, px: number): string[] {
  const profile = model.profile.value;
  const scale = model.scale.value;
  if (profile === null || scale === null) return [];
  const { bins, count, density, power, unit } = profile;
  const { factor, unit: readingUnit } = model.primary.value;
  const shown = scale.readingAt(px) * factor;
  const index = Math.floor((shown - bins.shownEdges[0]!) / bins.step + 1e-9);
  if (index < 0 || index >= count.length) return [];
  return binTexts(
    bins.shownEdges[index]!,
    bins.shownEdges[index + 1]!,
    readingUnit,
    {
      count: count[index]!,
      density: power === null ? null : density[index]!,
      power: power === null ? null : power[index]!,
    },
    unit,
  );
}

/** The depth under a pixel column, read in all three ways. */
export function depthAt(model: StripModel, px: number): string {
  const scale = model.scale.value;
  return scale === null ? '' : depthTexts(scale.redshiftAt(px), model.readings.value).join(' · ');
}
