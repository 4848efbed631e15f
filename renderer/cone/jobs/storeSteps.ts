import { indexer } from '../points/colouring.ts';
import { PointStore, type StoreMemory } from '../points/pointStore.ts';
import type { StoreBasis } from './messages.ts';

/** Galaxies sorted and coloured, step by step: on the page as in the worker. */
export function* storeSteps(basis: StoreBasis, memory: StoreMemory): Generator<void, PointStore> {
  const { galaxies, centres, table, colouring, shells } = basis;
  const store = yield* PointStore.build(galaxies, centres, table, memory);
  yield* store.colour(indexer(colouring, shells, table));
  return store;
}
