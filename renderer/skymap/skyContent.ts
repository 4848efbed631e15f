import type { SkyField } from '../../shared-core/sky/fields.ts';
import type { OutlineRing } from '../../shared-core/sky/region.ts';
import type { FootprintPicture, Selected } from '../engine/protocol.ts';
import { countText } from '../ui/numberText.ts';
import { decText, raText } from './graticule.ts';
import { middleRaDeg, type SkyTarget, targetOfPoints, WIDEST_CLOSE_LOOK_DEG } from './skyFrames.ts';

/** What the sky map shows under the galaxies. */
export interface SkyContent {
  readonly rings: readonly OutlineRing[];
  readonly fields: readonly SkyField[];
  /** Null while there is neither region nor estimate. */
  readonly origin: 'given' | 'estimated' | null;
  readonly areaDeg2: number | null;
}

const NOTHING: SkyContent = { rings: [], fields: [], origin: null, areaDeg2: null };

export const skyContent = (footprint: FootprintPicture | null): SkyContent => footprint ?? NOTHING;

/** What a close look would show: the field looked at, or else the galaxies; null where that is too wide. */
export function closeTarget(content: SkyContent, field: number, selected: Selected | null): SkyTarget | null {
  const { fields } = content;
  const looked = fields.length === 0 ? null : fields[fieldIndex(fields, field)]!;
  const target = looked ?? (selected === null ? null : targetOfPoints(selected.directions));
  const wide = looked?.wide === true || target === null || target.radiusDeg > WIDEST_CLOSE_LOOK_DEG;
  return wide ? null : target;
}

/** Any whole number as the index of a field: stepping past the last comes to the first. */
export function fieldIndex(fields: readonly unknown[], field: number): number {
  return fields.length === 0 ? 0 : ((field % fields.length) + fields.length) % fields.length;
}

/**
 * Where the map of the whole sky is centred, so that it is not cut through what is shown: by the fields, so that it
 * does not turn when the galaxies come, and by these where no field says it.
 */
export function middleOf({ fields }: SkyContent, selected: Selected | null): number | null {
  const narrow = fields.filter((field) => field.radiusDeg < WIDEST_CLOSE_LOOK_DEG);
  if (narrow.length > 0 || selected === null) return middleRaDeg(narrow.map((field) => field.centreRaDeg));
  return middleRaDeg(selected.raDeg);
}

export function placeText(raDeg: number, decDeg: number, decimals: number): string {
  return `RA ${raText(Number(raDeg.toFixed(decimals)))} Dec ${decText(Number(decDeg.toFixed(decimals)))}`;
}

/** The map in words, for those who do not see it. */
export function skySentence({ origin, areaDeg2, fields }: SkyContent, galaxies: number): string {
  const points =
    galaxies === 0 ? 'No galaxies.' : `${countText(galaxies)} ${galaxies === 1 ? 'galaxy' : 'galaxies'}.`;
  if (origin === null || areaDeg2 === null) return `${points} No region yet.`;
  const kind = origin === 'estimated' ? 'Region estimated from the catalogue' : 'Region as given';
  const area = `${kind}, ${areaDeg2.toPrecision(4)} square degrees`;
  if (fields.some((field) => field.wide)) return `${points} ${area}, wide on the sky.`;
  const where = fields
    .slice(0, 12)
    .map(
      (field) =>
        `${placeText(field.centreRaDeg, field.centreDecDeg, 1)}, radius ${field.radiusDeg.toPrecision(3)}°`,
    );
  const more = fields.length > where.length ? `; and ${fields.length - where.length} more` : '';
  return `${points} ${area}, in ${fields.length === 1 ? 'one field' : `${fields.length} fields`}: ${where.join('; ')}${more}.`;
}
