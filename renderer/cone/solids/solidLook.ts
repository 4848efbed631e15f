import type { Triple } from '../../colour/oklab.ts';

/** How much stronger a wall looks that is seen edge on. */
export const RIM = 2.5;

/** How one shell is drawn: radii on the display scale, colour as sRGB bytes, strength 0..1. */
export interface SolidLook {
  readonly inner: number;
  readonly outer: number;
  readonly colour: Triple;
  readonly alpha: number;
}
