import type { ColumnMapping, Cut, RowAccount } from '../../shared-core/catalogue/catalogue.ts';
import type { Preview } from '../../shared-core/catalogue/preview.ts';
import type { CosmologyParameters } from '../../shared-core/cosmology/parameters.ts';
import type { SortedSample } from '../../shared-core/shells/sample.ts';
import type { SkyField } from '../../shared-core/sky/fields.ts';
import type { Footprint, OutlineRing, Region } from '../../shared-core/sky/region.ts';

/** Where the engine reads a catalogue. A url answers fetch: the host's own scheme, its loopback server, or a blob. */
export type EngineSource =
  | { readonly kind: 'demo'; readonly seed: number }
  | { readonly kind: 'url'; readonly url: string; readonly name: string; readonly sizeBytes: number };

/** Everything the engine's results depend on. The page sends the whole of it; stale stages alone are done again. */
export interface Wanted {
  readonly source: EngineSource | null;
  readonly mapping: ColumnMapping | null;
  readonly cuts: readonly Cut[];
  readonly region: Region | null;
  readonly cosmology: CosmologyParameters;
  /** Local density costs time, so it is made only when a colour asks for it. */
  readonly density: boolean;
  /** Columns whose numbers something is coloured by. */
  readonly columns: readonly string[];
}

/** The file as read: before region and cuts. */
export interface Loaded {
  readonly source: EngineSource;
  /** The loadKey of the wish that it was read for. */
  readonly readFor: string;
  readonly header: readonly string[];
  readonly mapping: ColumnMapping;
  readonly account: RowAccount;
  /** Of the bytes read, lower-case hexadecimal. */
  readonly sha256: string;
  readonly sizeBytes: number;
}

/** A footprint without its functions, so that it can travel. */
export interface FootprintPicture {
  readonly origin: Footprint['origin'];
  readonly areaDeg2: number;
  readonly estimate: Footprint['estimate'];
  readonly rings: readonly OutlineRing[];
  readonly fields: readonly SkyField[];
}

/** The galaxies that are in, sorted by redshift; arrays of one length. */
export interface Selected {
  readonly account: RowAccount;
  /** Rows set aside by each cut of the wish: by the first that they fail. */
  readonly cutCounts: readonly number[];
  readonly footprint: FootprintPicture | null;
  readonly sample: SortedSample;
  readonly directions: { readonly x: Float32Array; readonly y: Float32Array; readonly z: Float32Array };
  readonly raDeg: Float32Array;
  readonly decDeg: Float32Array;
  readonly magnitude: Float32Array | null;
}

/** Per galaxy, sorted by redshift, in the wanted cosmology. */
export interface Background {
  readonly comovingMpc: Float32Array;
  readonly lookbackGyr: Float32Array;
}

/** The numbers of a column, sorted by redshift; NaN where the file gives none. */
export interface ColumnValues {
  readonly column: string;
  readonly values: Float32Array;
}

export const STAGES = ['load', 'select', 'background', 'density', 'columns'] as const;
export type Stage = (typeof STAGES)[number];

export type EngineEvent =
  /** The region of the newest wish made ready, before any galaxy is looked at; null where none is given. */
  | { readonly kind: 'region'; readonly region: FootprintPicture | null }
  | { readonly kind: 'progress'; readonly stage: Stage; readonly fraction: number | null }
  | { readonly kind: 'loaded'; readonly loaded: Loaded | null }
  | { readonly kind: 'selected'; readonly selected: Selected | null }
  | { readonly kind: 'background'; readonly background: Background | null }
  | { readonly kind: 'density'; readonly density: Float32Array | null }
  | { readonly kind: 'columns'; readonly columns: readonly ColumnValues[] }
  /** A sentence for the person; the stages after it have no result. */
  | { readonly kind: 'failed'; readonly stage: Stage; readonly sentence: string }
  /** Everything is up to date with the wish of this number. */
  | { readonly kind: 'idle'; readonly serial: number };

/** One catalogue row for the person who points at it. */
export interface GalaxyRow {
  readonly line: number;
  readonly raDeg: number;
  readonly decDeg: number;
  readonly redshift: number;
  readonly weight: number | null;
  readonly magnitude: number | null;
  readonly extras: readonly (readonly [column: string, value: number])[];
}

export type EngineRequest =
  | { readonly kind: 'want'; readonly serial: number; readonly wanted: Wanted }
  | { readonly kind: 'row'; readonly id: number; readonly index: number }
  | { readonly kind: 'name'; readonly id: number; readonly line: number }
  | { readonly kind: 'preview'; readonly id: number; readonly source: EngineSource }
  | { readonly kind: 'checkRegions'; readonly id: number; readonly regions: readonly Region[] }
  | { readonly kind: 'setAsideList'; readonly id: number }
  | { readonly kind: 'repeatsList'; readonly id: number };

export type EngineAnswer =
  | {
      readonly kind: 'answer';
      readonly id: number;
      readonly value: GalaxyRow | string | null | Preview | Blob;
    }
  | { readonly kind: 'refused'; readonly id: number; readonly sentence: string };

export type { Preview };
