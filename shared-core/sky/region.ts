/** A piece of sky in ICRS right ascension and declination, degrees. */
export type SkyShape =
  | { readonly kind: 'wholeSky' }
  /** From raMinDeg eastward to raMaxDeg: 350 to 10 crosses RA 0. Edges of constant RA and constant Dec. */
  | {
      readonly kind: 'box';
      readonly raMinDeg: number;
      readonly raMaxDeg: number;
      readonly decMinDeg: number;
      readonly decMaxDeg: number;
    }
  | { readonly kind: 'cap'; readonly raDeg: number; readonly decDeg: number; readonly radiusDeg: number }
  /** Great-circle edges, either winding; the smaller of the two sides unless told. */
  | {
      readonly kind: 'polygon';
      readonly verticesDeg: readonly (readonly [raDeg: number, decDeg: number])[];
      readonly side: 'smaller' | 'larger';
    };

/** The observed sky: inside at least one part and in none of the holes. */
export interface Region {
  readonly parts: readonly SkyShape[];
  readonly holes: readonly SkyShape[];
}

/** One closed run of boundary points, at most half a degree apart, interior to the left seen from outside. */
export interface OutlineRing {
  readonly raDeg: Float64Array;
  readonly decDeg: Float64Array;
}

/** A region made ready: what the rest of the program asks of it. Also what an estimate from a catalogue gives. */
export interface Footprint {
  /** 'given': exact area of a region somebody stated; 'estimated': from occupied cells, never called exact. */
  readonly origin: 'given' | 'estimated';
  readonly areaDeg2: number;
  /**
   * Only of an estimate: the cell's size and count, how many are on the border and for how many whole cells these
   * count, and the area's uncertainty from them.
   */
  readonly estimate: {
    readonly nside: number;
    readonly cellAreaDeg2: number;
    readonly cells: number;
    readonly borderCells: number;
    readonly borderAsCells: number;
    readonly areaErrorDeg2: number;
  } | null;
  contains(raDeg: number, decDeg: number): boolean;
  /** The true outline for drawing and for exact areas; empty for the whole sky. */
  outline(): readonly OutlineRing[];
}
