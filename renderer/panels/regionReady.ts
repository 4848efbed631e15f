import { compileRegion } from '../../shared-core/sky/compileRegion.ts';
import { footprintFields, type SkyField } from '../../shared-core/sky/fields.ts';
import type { Footprint, Region } from '../../shared-core/sky/region.ts';

interface Ready {
  readonly footprint: Footprint;
  fields: readonly SkyField[] | null;
}

// Regions are never changed in place, so what was made of one stays true of it.
const made = new WeakMap<Region, Ready>();

function readyOf(region: Region): Ready {
  let ready = made.get(region);
  if (ready === undefined) {
    ready = { footprint: compileRegion(region), fields: null };
    made.set(region, ready);
  }
  return ready;
}

/** The footprint of a region, made once. @throws Refusal as compileRegion does */
export function regionFootprint(region: Region): Footprint {
  return readyOf(region).footprint;
}

/** The fields of a region, made once. */
export function regionFields(region: Region): readonly SkyField[] {
  const ready = readyOf(region);
  return (ready.fields ??= footprintFields(ready.footprint));
}
