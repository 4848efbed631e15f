import type { Wanted } from './protocol.ts';

/** Columns that the cuts need, each once, in order of name. */
export const cutColumns = (cuts: Wanted['cuts']): string[] => [...new Set(cuts.map((c) => c.column))].sort();

/** What the reading of a file depends on, as one text: the same text, the same reading. */
export function loadKey({ source, mapping, cuts }: Pick<Wanted, 'source' | 'mapping' | 'cuts'>): string {
  return JSON.stringify([source, mapping, cutColumns(cuts)]);
}
