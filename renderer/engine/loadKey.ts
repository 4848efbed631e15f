import type { Wanted } from './protocol.ts';

/** What the reading of a file depends on, as one text: the same text, the same reading. */
export function loadKey({ source, mapping, cuts }: Pick<Wanted, 'source' | 'mapping' | 'cuts'>): string {
  return JSON.stringify([source, mapping, [...new Set(cuts.map((c) => c.column))].sort()]);
}
