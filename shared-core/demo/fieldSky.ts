import { asin, cos, sin } from '../numerics/elementary/elementary.ts';
import { compileBox } from '../sky/box.ts';
import { compileCap } from '../sky/cap.ts';
import { DEG_PER_RAD, RAD_PER_DEG } from '../sky/vectors.ts';
import { BRIGHT_STAR, type SurveyField } from './scenario.ts';

/** A field's outline made ready for drawing places around it and for asking what is inside. Degrees. */
export interface FieldSky {
  /** A cap, not a box. */
  readonly round: boolean;
  readonly middleRaDeg: number;
  readonly middleDecDeg: number;
  /** Half-widths of the RA-Dec box that just holds the field. */
  readonly halfRaDeg: number;
  readonly halfDecDeg: number;
  /** Solid angle of the field, its hole not taken out, steradians. */
  readonly areaSr: number;
  /** Truly inside the field and outside the star's hole; raDeg in [0, 360). */
  contains(raDeg: number, decDeg: number): boolean;
}

export function createFieldSky({ shape }: SurveyField): FieldSky {
  const star = compileCap(BRIGHT_STAR);
  const compiled = shape.kind === 'box' ? compileBox(shape) : compileCap(shape);
  const contains = (raDeg: number, decDeg: number) =>
    compiled.side(raDeg, decDeg) === 1 && star.side(raDeg, decDeg) === -1;
  if (shape.kind === 'box') {
    return {
      round: false,
      middleRaDeg: (shape.raMinDeg + shape.raMaxDeg) / 2,
      middleDecDeg: (shape.decMinDeg + shape.decMaxDeg) / 2,
      halfRaDeg: (shape.raMaxDeg - shape.raMinDeg) / 2,
      halfDecDeg: (shape.decMaxDeg - shape.decMinDeg) / 2,
      areaSr: compiled.areaSr,
      contains,
    };
  }
  // A cap reaches farthest in RA where sin(dRA) = sin(radius) / cos(Dec).
  const sinHalfRa = sin(shape.radiusDeg * RAD_PER_DEG) / cos(shape.decDeg * RAD_PER_DEG);
  return {
    round: true,
    middleRaDeg: shape.raDeg,
    middleDecDeg: shape.decDeg,
    halfRaDeg: asin(sinHalfRa) * DEG_PER_RAD,
    halfDecDeg: shape.radiusDeg,
    areaSr: compiled.areaSr,
    contains,
  };
}

/** Half-widths of the box with a margin on the sky on every side, degrees. */
export function widenedHalfRaDeg(sky: FieldSky, marginDeg: number): number {
  return sky.halfRaDeg + marginDeg / cos(sky.middleDecDeg * RAD_PER_DEG);
}

/** Solid angle of that widened box, steradians. */
export function widenedSr(sky: FieldSky, marginDeg: number): number {
  const ra = 2 * widenedHalfRaDeg(sky, marginDeg) * RAD_PER_DEG;
  const dec = (sky.halfDecDeg + marginDeg) * RAD_PER_DEG;
  return ra * 2 * cos(sky.middleDecDeg * RAD_PER_DEG) * sin(dec);
}
