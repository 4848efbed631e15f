import { type Arc, pointOnCircle } from './arc.ts';
import type { OutlineRing } from './region.ts';
import { RAD_PER_DEG, unitToRaDec } from './vectors.ts';

/** Points of an outline stand no farther apart than this. */
export const OUTLINE_STEP_DEG = 0.5;

/**
 * Points along rings of arcs, at every arc's start and at equal steps of at most half a degree; RA in [0, 360).
 * The last point is joined to the first, which is not repeated.
 */
export function outlineRings(rings: readonly (readonly Arc[])[]): OutlineRing[] {
  return rings.map((ring) => {
    const ra: number[] = [];
    const dec: number[] = [];
    for (const { circle, startRad, sweepRad } of ring) {
      const length = sweepRad * circle.r;
      const steps = Math.max(1, Math.ceil(length / (OUTLINE_STEP_DEG * RAD_PER_DEG) - 1e-9));
      // A full circle needs three points to be a ring at all; small ones get enough to look round.
      const count = sweepRad > 1 ? Math.max(steps, Math.ceil(12 * sweepRad)) : steps;
      for (let k = 0; k < count; k++) {
        const { raDeg, decDeg } = unitToRaDec(pointOnCircle(circle, startRad + (k / count) * sweepRad));
        ra.push(raDeg);
        dec.push(decDeg);
      }
    }
    return { raDeg: Float64Array.from(ra), decDeg: Float64Array.from(dec) };
  });
}
