import type { PreparedField } from '../geometry/preparedField.ts';
import type { PickIndex } from '../points/pickIndex.ts';
import type { StoreParts } from '../points/pointStore.ts';
import type { RadiusTable } from '../points/radiusTable.ts';
import type { ColouringInput, FootprintInput, GalaxyInput, ShellInput } from '../types.ts';

/** What the colour of a galaxy follows from. */
export interface ColourBasis {
  readonly colouring: ColouringInput;
  readonly shells: readonly ShellInput[];
  readonly table: RadiusTable;
}

/** What a store is made of. */
export interface StoreBasis extends ColourBasis {
  readonly galaxies: GalaxyInput;
  /** Unit vectors of the fields' centres, three numbers each. */
  readonly centres: Float64Array;
}

export type ConeTask =
  | { readonly kind: 'fields'; readonly footprint: FootprintInput }
  /** Arrays in shared memory; the store comes back in such memory too. */
  | { readonly kind: 'store'; readonly basis: StoreBasis; readonly base: number }
  | {
      readonly kind: 'colours';
      readonly parts: StoreParts;
      readonly buffer: SharedArrayBuffer;
      readonly basis: ColourBasis;
    }
  /** An index of each field of a store. */
  | { readonly kind: 'index'; readonly parts: StoreParts; readonly buffer: SharedArrayBuffer };

export interface ConeResults {
  readonly fields: readonly PreparedField[];
  readonly store: { readonly parts: StoreParts; readonly memory: WebAssembly.Memory };
  readonly colours: true;
  readonly index: readonly PickIndex[];
}

export type ToConeWorker =
  | { readonly id: number; readonly task: ConeTask }
  /** The result is not wanted any more. */
  | { readonly id: number; readonly task: null };

export type FromConeWorker =
  | { readonly id: number; readonly result: ConeResults[keyof ConeResults] | null }
  | { readonly id: number; readonly failed: string };
