import { Refusal } from '../../../shared-core/base/refusal.ts';
import type { ColumnMapping, RadialKind } from '../../../shared-core/catalogue/catalogue.ts';
import { resolveMapping } from '../../../shared-core/catalogue/mapping.ts';

/** A mapping in the making: the three that are needed may still be open. */
export interface MappingDraft {
  readonly ra: string | null;
  readonly dec: string | null;
  readonly radialColumn: string | null;
  readonly radialKind: RadialKind;
  readonly weight: string | null;
  readonly magnitude: string | null;
  readonly id: string | null;
}

export const EMPTY_DRAFT: MappingDraft = {
  ra: null,
  dec: null,
  radialColumn: null,
  radialKind: 'redshift',
  weight: null,
  magnitude: null,
  id: null,
};

export function draftOf(mapping: ColumnMapping | null): MappingDraft {
  if (mapping === null) return EMPTY_DRAFT;
  const { radial, ...rest } = mapping;
  return { ...rest, radialColumn: radial.column, radialKind: radial.kind };
}

/** The mapping of a finished draft; else a sentence that says what is missing or wrong. */
export function finishDraft(
  draft: MappingDraft,
  header: readonly string[],
): { readonly mapping: ColumnMapping } | { readonly sentence: string } {
  const { ra, dec, radialColumn, radialKind, weight, magnitude, id } = draft;
  if (ra === null || dec === null || radialColumn === null) {
    const open = [
      ...(ra === null ? ['right ascension'] : []),
      ...(dec === null ? ['declination'] : []),
      ...(radialColumn === null ? ['redshift'] : []),
    ];
    return { sentence: `Choose the column of ${open.join(', ').replace(/, (?!.*, )/, ' and ')}.` };
  }
  try {
    const radial = { column: radialColumn, kind: radialKind };
    return { mapping: resolveMapping(header, { ra, dec, radial, weight, magnitude, id }) };
  } catch (error) {
    if (error instanceof Refusal) return { sentence: error.message };
    throw error;
  }
}

/** The draft that fits the header, from parts that are guessed or were saved; names that are not there are left open. */
export function fittingDraft(draft: MappingDraft, header: readonly string[]): MappingDraft {
  const known = (name: string | null) => (name !== null && header.includes(name) ? name : null);
  return {
    ra: known(draft.ra),
    dec: known(draft.dec),
    radialColumn: known(draft.radialColumn),
    radialKind: draft.radialKind,
    weight: known(draft.weight),
    magnitude: known(draft.magnitude),
    id: known(draft.id),
  };
}

/** What a column is used as, in a word; null for one that is not used. */
export function roleOf(column: string, draft: MappingDraft): string | null {
  if (column === draft.ra) return 'RA';
  if (column === draft.dec) return 'Dec';
  if (column === draft.radialColumn) return draft.radialKind === 'redshift' ? 'z' : 'cz';
  if (column === draft.weight) return 'weight';
  if (column === draft.magnitude) return 'magnitude';
  return column === draft.id ? 'name' : null;
}

/** Whether the names in a header are enough to know the columns that are needed. */
export function isGuessable(header: readonly string[]): boolean {
  try {
    resolveMapping(header);
    return true;
  } catch (error) {
    if (error instanceof Refusal) return false;
    throw error;
  }
}
