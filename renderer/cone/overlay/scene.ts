import type { Triple } from '../../colour/oklab.ts';
import type { Lane } from '../geometry/arrangement.ts';
import type { PreparedField } from '../geometry/preparedField.ts';
import type { PixelMatrix } from '../geometry/projection.ts';
import type { RadialReading, RadialScaleInput, ShellsInput, ViewName } from '../types.ts';
import type { Point } from './pen.ts';

/** Galaxies pointed out: the hovered, the picked, and the line between two. */
export interface Marks {
  readonly hovered: Point | null;
  readonly picked: readonly (Point | null)[];
  readonly pairText: string;
}

/** A lane with its matrix from sky direction times radius to CSS pixels. */
export interface PaintedLane extends Lane {
  readonly matrix: Float64Array;
  readonly shape: PreparedField;
}

/** Everything the overlay shows of one frame. */
export interface OverlayScene {
  readonly view: ViewName;
  readonly reading: RadialReading;
  /** Whether the picture's x axis is the strip's. */
  readonly aligned: boolean;
  /** Display space to CSS pixels. */
  readonly pixels: PixelMatrix;
  readonly unitsPerPixel: number;
  readonly perspective: boolean;
  readonly lanes: readonly PaintedLane[];
  readonly scale: RadialScaleInput;
  /** Displayed radius (1 at the far end) of a comoving distance. */
  readonly radius: (comovingMpc: number) => number;
  /** Comoving distance of the far end. */
  readonly farMpc: number;
  readonly shells: ShellsInput;
  readonly shellColours: readonly Triple[];
  readonly caption: readonly string[];
  readonly marks: Marks;
}
