import { Refusal } from '../../shared-core/base/refusal.ts';
import { compileRegion } from '../../shared-core/sky/compileRegion.ts';
import { footprintFields } from '../../shared-core/sky/fields.ts';
import type { Footprint, Region } from '../../shared-core/sky/region.ts';
import type { FootprintPicture } from './protocol.ts';

/** A region made ready: what is asked of it here, and what the page is told of it. */
export interface ReadyRegion {
  readonly footprint: Footprint;
  readonly picture: FootprintPicture;
}

/** @throws Refusal as compileRegion does */
export function readyRegion(region: Region): ReadyRegion {
  const footprint = compileRegion(region);
  return { footprint, picture: footprintPicture(footprint) };
}

/** A footprint without its functions. */
export function footprintPicture(footprint: Footprint): FootprintPicture {
  return {
    origin: footprint.origin,
    areaDeg2: footprint.areaDeg2,
    estimate: footprint.estimate,
    rings: footprint.outline(),
    fields: footprintFields(footprint),
  };
}

/** Why one of the regions cannot be; null when each can. */
export function regionTrouble(regions: readonly Region[]): string | null {
  try {
    for (const region of regions) compileRegion(region);
    return null;
  } catch (error) {
    if (error instanceof Refusal) return error.message;
    throw error;
  }
}
