import { Refusal } from '../../../shared-core/base/refusal.ts';
import type { Region, SkyShape } from '../../../shared-core/sky/region.ts';
import { parsePolygonText } from '../../../shared-core/sky/regionText.ts';
import { fieldText, readNumber } from '../../ui/numberText.ts';

export type ShapeKind = SkyShape['kind'];

/** A shape in the making: what stands in the fields. Numbers of the other kinds are kept while one looks around. */
export interface ShapeDraft {
  readonly kind: ShapeKind;
  readonly fields: Readonly<Record<DraftName, string>>;
  readonly vertices: string;
  readonly side: 'smaller' | 'larger';
}

export type DraftName = 'raMin' | 'raMax' | 'decMin' | 'decMax' | 'ra' | 'dec' | 'radius';

/** The fields of each kind, in order, with what they are called. */
export const DRAFT_FIELDS: Readonly<
  Record<ShapeKind, readonly { readonly name: DraftName; readonly label: string }[]>
> = {
  wholeSky: [],
  box: [
    { name: 'raMin', label: 'RA from' },
    { name: 'raMax', label: 'RA to' },
    { name: 'decMin', label: 'Dec from' },
    { name: 'decMax', label: 'Dec to' },
  ],
  cap: [
    { name: 'ra', label: 'centre RA' },
    { name: 'dec', label: 'centre Dec' },
    { name: 'radius', label: 'radius' },
  ],
  polygon: [],
};

const NO_FIELDS: ShapeDraft['fields'] = {
  raMin: '',
  raMax: '',
  decMin: '',
  decMax: '',
  ra: '',
  dec: '',
  radius: '',
};

export function newDraft(kind: ShapeKind): ShapeDraft {
  return { kind, fields: NO_FIELDS, vertices: '', side: 'smaller' };
}

/** The draft that stands for a shape, to be changed. */
export function draftOfShape(shape: SkyShape): ShapeDraft {
  const base = newDraft(shape.kind);
  switch (shape.kind) {
    case 'wholeSky':
      return base;
    case 'box':
      return {
        ...base,
        fields: {
          ...NO_FIELDS,
          raMin: fieldText(shape.raMinDeg),
          raMax: fieldText(shape.raMaxDeg),
          decMin: fieldText(shape.decMinDeg),
          decMax: fieldText(shape.decMaxDeg),
        },
      };
    case 'cap':
      return {
        ...base,
        fields: {
          ...NO_FIELDS,
          ra: fieldText(shape.raDeg),
          dec: fieldText(shape.decDeg),
          radius: fieldText(shape.radiusDeg),
        },
      };
    case 'polygon':
      return {
        ...base,
        vertices: shape.verticesDeg.map(([ra, dec]) => `${ra} ${dec}`).join('\n'),
        side: shape.side,
      };
  }
}

/** What is wrong with a draft, and in which field where one is to blame. */
export interface DraftTrouble {
  readonly sentence: string;
  readonly field: DraftName | 'vertices' | null;
}

/**
 * The shapes of a finished draft (a text may hold several polygons), each checked; or what is wrong.
 *
 * @param check why one of the regions cannot be; null when each can
 */
export async function finishShape(
  draft: ShapeDraft,
  check: (regions: readonly Region[]) => Promise<string | null>,
): Promise<{ readonly shapes: readonly SkyShape[] } | DraftTrouble> {
  const numbers: Partial<Record<DraftName, number>> = {};
  for (const { name, label } of DRAFT_FIELDS[draft.kind]) {
    const read = readNumber(draft.fields[name], label);
    if ('sentence' in read) return { sentence: read.sentence, field: name };
    numbers[name] = read.value;
  }
  const blamed = (sentence: string): DraftTrouble => ({
    sentence,
    field: draft.kind === 'polygon' ? 'vertices' : blamedField(draft, numbers),
  });
  try {
    const shapes = shapesOf(draft, numbers as Record<DraftName, number>);
    const why = await check(shapes.map((shape) => ({ parts: [shape], holes: [] })));
    return why === null ? { shapes } : blamed(why);
  } catch (error) {
    if (error instanceof Refusal) return blamed(error.message);
    throw error;
  }
}

function shapesOf(draft: ShapeDraft, n: Record<DraftName, number>): readonly SkyShape[] {
  switch (draft.kind) {
    case 'wholeSky':
      return [{ kind: 'wholeSky' }];
    case 'box':
      return [
        { kind: 'box', raMinDeg: n.raMin, raMaxDeg: n.raMax, decMinDeg: n.decMin, decMaxDeg: n.decMax },
      ];
    case 'cap':
      return [{ kind: 'cap', raDeg: n.ra, decDeg: n.dec, radiusDeg: n.radius }];
    case 'polygon':
      return parsePolygonText(draft.vertices, draft.side);
  }
}

/** The field whose number alone is out of its range, so that the sentence stands under it. */
function blamedField({ kind }: ShapeDraft, numbers: Partial<Record<DraftName, number>>): DraftName | null {
  const outside = DRAFT_FIELDS[kind].find(({ name }) => {
    const value = numbers[name]!;
    if (name === 'radius') return !(value > 0 && value <= 180);
    return name.startsWith('ra') ? Math.abs(value) > 360 : Math.abs(value) > 90;
  });
  if (outside !== undefined) return outside.name;
  return kind === 'box' ? 'decMax' : kind === 'cap' ? 'radius' : null;
}
