import { loadCatalogue } from '../../shared-core/catalogue/loadCatalogue.ts';
import { setAsideCsv } from '../../shared-core/catalogue/setAsideCsv.ts';
import { compileRegion } from '../../shared-core/sky/compileRegion.ts';
import type { Wanted } from './protocol.ts';

/** Every row of a file set aside under a wish, as CSV text in parts. */
export async function setAsideList(
  bytes: AsyncIterable<Uint8Array>,
  { mapping, region, cuts }: Pick<Wanted, 'mapping' | 'region' | 'cuts'>,
): Promise<string[]> {
  const given = region === null ? null : compileRegion(region);
  const list = setAsideCsv();
  await loadCatalogue(bytes, {
    ...(mapping === null ? {} : { mapping }),
    extras: [],
    contains: given === null ? null : (ra, dec) => given.contains(ra, dec),
    cuts,
    onSetAside: (row) => list.add(row),
  });
  return list.parts();
}
