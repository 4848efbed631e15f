import type { Command } from 'commander';
import { Refusal } from '../../shared-core/base/refusal.ts';
import { compileRegion } from '../../shared-core/sky/compileRegion.ts';
import type { Footprint, Region, SkyShape } from '../../shared-core/sky/region.ts';
import {
  parsePolygonText,
  parseRegionShape,
  polygonFileOf,
  SHAPE_FORMS,
} from '../../shared-core/sky/regionText.ts';
import { readTextFile } from './files.ts';

export interface RegionOptions {
  region?: string[];
  hole?: string[];
}

const collect = (text: string, before: string[] = []): string[] => [...before, text];

/** The options that say which sky was observed. */
export function addRegionOptions(command: Command): Command {
  const forms = `polygon:FILE, ${SHAPE_FORMS}`;
  return command
    .option('--region <shape>', `observed sky: ${forms}; repeat it for several pieces`, collect)
    .option('--hole <shape>', 'sky left out, in the same forms; repeat it for several', collect);
}

/** The files that the region will be read from. */
export function regionFiles({ region = [], hole = [] }: RegionOptions): string[] {
  return [...region, ...hole].flatMap((text) => polygonFileOf(text)?.file ?? []);
}

/** The region asked for, ready to use; null when none was given and the area must be estimated. */
export async function regionOf(
  options: RegionOptions,
): Promise<{ footprint: Footprint; region: Region } | null> {
  if (options.region === undefined) {
    if (options.hole !== undefined)
      throw new Refusal('--hole came without --region: give the observed sky that the hole is in.', 'use');
    return null;
  }
  const region: Region = { parts: await shapes(options.region), holes: await shapes(options.hole ?? []) };
  return { footprint: compileRegion(region), region };
}

async function shapes(texts: readonly string[]): Promise<SkyShape[]> {
  const all = await Promise.all(
    texts.map(async (text): Promise<SkyShape[]> => {
      const named = polygonFileOf(text);
      if (named === null) return [parseRegionShape(text)];
      return parsePolygonText(await readTextFile(named.file, 'a polygon'), named.side);
    }),
  );
  return all.flat();
}
