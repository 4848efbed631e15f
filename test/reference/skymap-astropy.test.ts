import { readFileSync } from 'node:fs';
import { describe, expect, it } from 'vitest';
import { unitVector } from '../../renderer/skymap/skyFrames.ts';
import {
  outlineProjection,
  pointProjection,
  type SkyFrame,
  skyAt,
} from '../../renderer/skymap/skyProjection.ts';

interface Row {
  readonly kind: SkyFrame['kind'];
  readonly centreRaDeg: number;
  readonly centreDecDeg: number;
  readonly raDeg: readonly number[];
  readonly decDeg: readonly number[];
  readonly xPx: readonly number[];
  readonly yPx: readonly number[];
}
const reference = JSON.parse(readFileSync(new URL('./skymap-astropy.json', import.meta.url), 'utf8')) as {
  readonly pxPerRad: number;
  readonly rows: readonly Row[];
};

// Rounding of both sides over a few hundred pixels.
const TOLERANCE_PX = 1e-9;

describe('the sky map against astropy WCS (AIT, ZEA)', () => {
  for (const row of reference.rows) {
    const { kind, centreRaDeg, centreDecDeg } = row;
    const frame: SkyFrame = {
      kind,
      centreRaDeg,
      centreDecDeg,
      scalePx: reference.pxPerRad,
      xPx: 0,
      yPx: 0,
    };
    it(`${kind} around RA ${centreRaDeg} Dec ${centreDecDeg}`, () => {
      const project = outlineProjection(frame);
      const points = pointProjection(frame);
      const at = { x: 0, y: 0 };
      expect(row.raDeg.length).toBe(40);
      for (const [i, ra] of row.raDeg.entries()) {
        const dec = row.decDeg[i]!;
        points(...unitVector(ra, dec), at);
        expect(Math.hypot(at.x - row.xPx[i]!, at.y - row.yPx[i]!)).toBeLessThan(TOLERANCE_PX);
        const [x, y] = project([ra, dec])!;
        expect(Math.hypot(x - row.xPx[i]!, y - row.yPx[i]!)).toBeLessThan(TOLERANCE_PX);
        const back = skyAt(frame, row.xPx[i]!, row.yPx[i]!)!;
        expect(back.decDeg).toBeCloseTo(dec, 3);
        expect(Math.cos(((back.raDeg - ra) * Math.PI) / 180)).toBeCloseTo(1, 6);
      }
    });
  }
});
