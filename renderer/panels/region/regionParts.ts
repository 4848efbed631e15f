import type { Region, SkyShape } from '../../../shared-core/sky/region.ts';

/** Where a shape of the region stands. */
export interface ShapePlace {
  readonly list: 'parts' | 'holes';
  readonly index: number;
}

/** The region with shapes added to a list, or in the place of an old one (which may be of the other list). */
export function withShapes(
  region: Region | null,
  list: 'parts' | 'holes',
  shapes: readonly SkyShape[],
  inPlaceOf: ShapePlace | null,
): Region {
  const base = region ?? { parts: [], holes: [] };
  if (inPlaceOf === null) return { ...base, [list]: [...base[list], ...shapes] };
  if (inPlaceOf.list === list)
    return { ...base, [list]: base[list].toSpliced(inPlaceOf.index, 1, ...shapes) };
  const without = { ...base, [inPlaceOf.list]: base[inPlaceOf.list].toSpliced(inPlaceOf.index, 1) };
  return { ...without, [list]: [...without[list], ...shapes] };
}

/** The region without one of its shapes; null once no observed part is left, since holes alone are no region. */
export function withoutShape(region: Region, { list, index }: ShapePlace): Region | null {
  const next = { ...region, [list]: region[list].toSpliced(index, 1) };
  return next.parts.length === 0 ? null : next;
}
