import { loadKey } from '../loadKey.ts';
import type { Stage, Wanted } from '../protocol.ts';

/** What the result of each stage depends on, as a text: the same text, the same result. In the order of the work. */
export function stageKeys(wish: Wanted): readonly (readonly [Stage, string])[] {
  const load = loadKey(wish);
  const select = load + key(wish.region, wish.cuts);
  const background = select + key(wish.cosmology);
  const density = background + key(wish.density);
  const columns = select + key(wish.columns);
  return [
    ['load', load],
    ['select', select],
    ['background', background],
    ['density', density],
    ['columns', columns],
  ];
}

/** The stages whose results end when a stage runs again, itself among them. */
export const RESTING_ON: Readonly<Record<Stage, readonly Stage[]>> = {
  load: ['load', 'select', 'background', 'density', 'columns'],
  select: ['select', 'background', 'density', 'columns'],
  background: ['background', 'density'],
  density: ['density'],
  columns: ['columns'],
};

function key(...parts: unknown[]): string {
  return JSON.stringify(parts);
}
