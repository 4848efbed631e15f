import type { OutlineRing } from '../../shared-core/sky/region.ts';

/** What the radius of the picture stands for. */
export type RadialReading = 'comoving' | 'redshift' | 'lookback';

/** From where the cone is seen. */
export type ViewName = 'sideOn' | 'downTheCone' | 'fromBehind' | 'whole' | 'aroundTheObserver' | 'parallel';

/**
 * The galaxies to draw; arrays of one length. Positions are given either as unit vectors (x to RA 0 Dec 0,
 * y to RA 90 Dec 0, z to Dec +90) or as RA and Dec in degrees. The arrays are read, never changed, and must stay
 * as they are until the next call.
 */
export interface GalaxyInput {
  readonly count: number;
  readonly directions:
    | { readonly x: Float32Array; readonly y: Float32Array; readonly z: Float32Array }
    | { readonly raDeg: Float64Array | Float32Array; readonly decDeg: Float64Array | Float32Array };
  readonly comovingMpc: Float64Array | Float32Array;
}

/** Colours of the galaxies: a number a galaxy, read between `from` and `to` of the map; NaN (not known) is grey. */
export type ColouringInput =
  | {
      readonly kind: 'values';
      readonly values: Float64Array | Float32Array;
      readonly from: number;
      readonly to: number;
      readonly map: string;
      readonly reversed?: boolean;
    }
  /** By the shell that holds the galaxy (edges of `setShells`); galaxies outside all shells are drawn faint. */
  | { readonly kind: 'shell' }
  /** Along the radius, as it is read at the moment. */
  | { readonly kind: 'radius'; readonly map: string; readonly reversed?: boolean };

/** One field of the region, seen as a cone of its own. */
export interface FieldInput {
  readonly centreRaDeg: number;
  readonly centreDecDeg: number;
  /** Greatest angle between the centre and the outline. */
  readonly radiusDeg: number;
  /** From north through east to the long axis of the field. */
  readonly positionAngleDeg: number;
  readonly rings: readonly OutlineRing[];
  /** How far the drawn outline may lie from the rings; a fine tolerance where it is not said. */
  readonly toleranceDeg?: number;
  readonly name?: string;
}

/** No fields at all means the whole sky. */
export interface FootprintInput {
  readonly fields: readonly FieldInput[];
  /** True for a region over about 70 degrees across, and for the whole sky (which has no rings). */
  readonly wide: boolean;
  /** True when the outline is an estimate from the catalogue, drawn smoothed: the caption says so. */
  readonly estimated?: boolean;
}

export interface ShellInput {
  readonly comovingMinMpc: number;
  readonly comovingMaxMpc: number;
  /** Short text that names the shell, such as "0.8 – 1.0". */
  readonly label: string;
  /** A heavier label, shown for the chosen or hovered shell, such as "0.8 ≤ z < 1". */
  readonly longLabel?: string;
}

export interface ShellsInput {
  readonly shells: readonly ShellInput[];
  readonly selected: number | null;
  readonly hovered: number | null;
}

/** A mark of a ruler. Level 0 is the most important; where marks would crowd, the higher levels give way. */
export interface Tick {
  readonly comovingMpc: number;
  readonly text: string;
  readonly level: number;
}

export interface RadialScaleInput {
  readonly reading: RadialReading;
  /** Strictly rising table from comoving distance to the displayed radius (Mpc, redshift or Gyr); starts at 0, 0. */
  readonly table: { readonly comovingMpc: Float64Array; readonly radius: Float64Array };
  readonly rulers: {
    readonly redshift: readonly Tick[];
    readonly lookback: readonly Tick[];
    readonly comoving: readonly Tick[];
  };
  /** Titles of the three rulers with their units, such as "comoving distance, Mpc". */
  readonly titles: { readonly redshift: string; readonly lookback: string; readonly comoving: string };
  /** Text for a length in Mpc on the scale bar, in the unit that the reader chose. */
  formatLength(mpc: number): string;
  /** Lengths of the scale bar are round in this unit: 1 for Mpc, 1/h for Mpc/h. */
  readonly lengthUnitMpc: number;
}

/** The part of the radial axis on screen, in the unit of the reading, and where the strip below puts its ends. */
export interface AxisWindow {
  readonly min: number;
  readonly max: number;
}
export interface AxisInsets {
  readonly leftPx: number;
  readonly rightPx: number;
}

export interface ConeTheme {
  readonly mode: 'dark' | 'light';
  /** CSS colours. */
  readonly background: string;
  readonly ink: string;
  readonly inkMuted: string;
  readonly line: string;
  readonly accent: string;
  readonly fontFamily: string;
  /** How much larger texts, lines and rulers are than on a usual screen; 1 if not given. */
  readonly enlarged?: number;
}

export interface GalaxyHit {
  /** Row in the arrays of `setGalaxies`. */
  readonly index: number;
  /** CSS pixels from the top left of the stage. */
  readonly xPx: number;
  readonly yPx: number;
}

export interface FrameStatistics {
  readonly drawn: number;
  readonly total: number;
  /** From the request to the picture. */
  readonly milliseconds: number;
  readonly layer: 'software' | 'webgl' | 'none';
  readonly atRest: boolean;
}

export interface ViewState {
  readonly view: ViewName;
  /** False once the picture was orbited away from the view. */
  readonly exact: boolean;
  readonly sidewaysFactor: number;
  readonly field: number;
  readonly fieldCount: number;
  /** What a reader must know: what is stretched, what is not to scale. */
  readonly caption: readonly string[];
}

export type DrawingState =
  /** No GPU was found (yet): the processor draws all. */
  | { readonly webgl: 'unused' }
  | { readonly webgl: 'ready'; readonly renderer: string; readonly software: boolean }
  /** The reason goes on after "shells cannot be drawn in 3D:"; everything else works as before. */
  | { readonly webgl: 'lost' | 'absent'; readonly reason: string };

export interface ConeEvents {
  readonly onHover?: (hit: GalaxyHit | null) => void;
  readonly onPick?: (hit: GalaxyHit | null, extend: boolean) => void;
  /** Where the marked galaxies stand once the view has come to rest elsewhere; those out of sight are left out. */
  readonly onMarksMoved?: (places: readonly GalaxyHit[]) => void;
  readonly onHoverShell?: (index: number | null) => void;
  readonly onPickShell?: (index: number | null) => void;
  readonly onAxisWindow?: (window: AxisWindow) => void;
  readonly onViewChanged?: (state: ViewState) => void;
  readonly onFrame?: (statistics: FrameStatistics) => void;
  readonly onDrawingState?: (state: DrawingState) => void;
  /** Why galaxies cannot be drawn, as a sentence; null once they can. */
  readonly onTrouble?: (sentence: string | null) => void;
}
