import { Refusal } from '../base/refusal.ts';
import { cos, sin, square } from '../numerics/elementary/elementary.ts';
import { circleAround } from './arc.ts';
import type { SkyShape } from './region.ts';
import { type CompiledShape, EDGE_TOLERANCE_RAD } from './shape.ts';
import { checkDec, checkRa } from './shapeChecks.ts';
import { normaliseRaDeg, RAD_PER_DEG, raDecToUnit } from './vectors.ts';

/**
 * A cap of radius in (0, 180] degrees; area 2 pi (1 - cos r) = 4 pi sin^2(r/2).
 * @throws Refusal for a centre or radius outside its range.
 */
export function compileCap(cap: Extract<SkyShape, { kind: 'cap' }>): CompiledShape {
  const { raDeg, decDeg, radiusDeg } = cap;
  checkRa('cap', 'RA', raDeg);
  checkDec('cap', 'Dec', decDeg);
  if (!(radiusDeg > 0 && radiusDeg <= 180)) {
    throw new Refusal(
      `The cap's radius is ${radiusDeg} but must be above 0 and at most 180 degrees: give its angular radius.`,
      'use',
    );
  }
  const centre = raDecToUnit(normaliseRaDeg(raDeg), decDeg);
  const half = sin((radiusDeg * RAD_PER_DEG) / 2);
  const areaSr = 4 * Math.PI * half * half;
  if (radiusDeg === 180) return { arcs: [], areaSr, centre, radiusRad: Math.PI, side: () => 1 };

  // Squared chords keep their digits for small angles; a cap above 90 degrees is judged from its antipode.
  const large = radiusDeg > 90;
  const sign = large ? -1 : 1;
  const [cx, cy, cz] = [sign * centre[0], sign * centre[1], sign * centre[2]];
  const nearRad = (large ? 180 - radiusDeg : radiusDeg) * RAD_PER_DEG;
  const chord2 = (angle: number): number => 4 * square(sin(angle / 2));
  const inner2 = chord2(Math.max(0, nearRad - EDGE_TOLERANCE_RAD));
  const outer2 = chord2(nearRad + EDGE_TOLERANCE_RAD);
  const nearDecDeg = sign * decDeg;
  const decReachDeg = (nearRad / RAD_PER_DEG) * (1 + 1e-12) + 1e-9;

  return {
    arcs: [{ circle: circleAround(centre, radiusDeg), startRad: 0, sweepRad: 2 * Math.PI }],
    areaSr,
    centre,
    radiusRad: Math.min(Math.PI, radiusDeg * RAD_PER_DEG + 1e-7),
    side(ra, dec) {
      if (Math.abs(dec - nearDecDeg) > decReachDeg) return large ? 1 : -1;
      const a = ra * RAD_PER_DEG;
      const b = dec * RAD_PER_DEG;
      const c = cos(b);
      const dx = c * cos(a) - cx;
      const dy = c * sin(a) - cy;
      const dz = sin(b) - cz;
      const s = dx * dx + dy * dy + dz * dz;
      if (s > outer2) return large ? 1 : -1;
      if (s < inner2) return large ? -1 : 1;
      return 0;
    },
  };
}
