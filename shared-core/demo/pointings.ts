import type { Random } from '../numerics/random.ts';
import type { FieldSky } from './fieldSky.ts';
import { POINTING_DEG, type SurveyField } from './scenario.ts';

/** How likely a galaxy's redshift was measured. */
export interface Pointings {
  /** Probability at a place inside the field (degrees) for an apparent magnitude. Above 0, at most 1. */
  success(raDeg: number, decDeg: number, magnitude: number): number;
}

/** Loss at the depth limit; none from this many magnitudes above it. */
const FAINT_LOSS = 0.3;
const FAINT_RANGE_MAG = 2;

/** Gives every square pointing of a field its own share, between the field's worst and best. */
export function createPointings(field: SurveyField, sky: FieldSky, random: Random): Pointings {
  const columns = Math.ceil((2 * sky.halfRaDeg) / POINTING_DEG);
  const rows = Math.ceil((2 * sky.halfDecDeg) / POINTING_DEG);
  const [worst, best] = field.completeness;
  const share = Float64Array.from(
    { length: columns * rows },
    () => worst + (best - worst) * random.uniform(),
  );
  const firstRa = sky.middleRaDeg - sky.halfRaDeg;
  const firstDec = sky.middleDecDeg - sky.halfDecDeg;
  const faintFrom = field.depthMag - FAINT_RANGE_MAG;
  return {
    success(raDeg, decDeg, magnitude) {
      const column = Math.floor((raDeg - firstRa) / POINTING_DEG);
      const row = Math.floor((decDeg - firstDec) / POINTING_DEG);
      const faint = Math.max(0, (magnitude - faintFrom) / FAINT_RANGE_MAG);
      return share[row * columns + column]! * (1 - FAINT_LOSS * faint * faint);
    },
  };
}
