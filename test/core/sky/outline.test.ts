import { geoArea } from 'd3-geo';
import { describe, expect, it } from 'vitest';
import { compileRegion } from '../../../shared-core/sky/compileRegion.ts';
import type { OutlineRing } from '../../../shared-core/sky/region.ts';
import {
  cross,
  raDecToUnit,
  separationDeg,
  unit,
  unitToRaDec,
  type Vec3,
} from '../../../shared-core/sky/vectors.ts';
import { randomShape, region, seeded, WHOLE_DEG2 } from './sample.ts';

const outlineOf = (parts: readonly string[], holes: readonly string[] = []): readonly OutlineRing[] =>
  compileRegion(region(parts, holes)).outline();

function steps(ring: OutlineRing): { from: Vec3; to: Vec3; lengthDeg: number }[] {
  return Array.from(ring.raDeg, (ra, i) => {
    const k = (i + 1) % ring.raDeg.length;
    const [ra2, dec, dec2] = [ring.raDeg[k]!, ring.decDeg[i]!, ring.decDeg[k]!];
    return {
      from: raDecToUnit(ra, dec),
      to: raDecToUnit(ra2, dec2),
      lengthDeg: separationDeg(ra, dec, ra2, dec2),
    };
  });
}

describe('outline of a region', () => {
  it('is empty for the whole sky, however it is put together', () => {
    expect(outlineOf(['sky'])).toEqual([]);
    expect(outlineOf(['cap:0,0,180'])).toEqual([]);
    expect(outlineOf(['box:0,360,-90,90'])).toEqual([]);
    expect(outlineOf(['box:0,180,-90,90', 'box:180,360,-90,90'])).toEqual([]);
  });

  it.each([
    ['a cap', ['cap:10,20,5'], [], 1],
    ['a box', ['box:0,10,0,10'], [], 1],
    ['a belt', ['box:0,360,-10,10'], [], 2],
    ['a box up to the pole', ['box:0,90,60,90'], [], 1],
    ['two boxes side by side', ['box:0,10,0,10', 'box:10,20,0,10'], [], 1],
    ['two boxes that touch at a corner', ['box:0,10,0,10', 'box:10,20,10,20'], [], 2],
    ['a cap with a hole', ['cap:10,20,5'], ['cap:10,20,1'], 2],
    ['a cap cut in two', ['cap:10,0,5'], ['box:0,20,-1,1'], 2],
    ['a hole on the edge', ['box:0,20,0,10'], ['box:15,25,2,8'], 1],
    ['a cross of two boxes', ['box:0,30,10,20', 'box:10,20,0,30'], [], 1],
  ] as const)('%s', (_, parts, holes, rings) => {
    expect(outlineOf(parts, holes).length).toBe(rings);
  });

  it('has points at most half a degree apart, RA in [0, 360), region on the left', () => {
    const random = seeded(31);
    for (let round = 0; round < 60; round++) {
      const parts = Array.from({ length: 1 + Math.floor(3 * random()) }, () => randomShape(random));
      const holes = Array.from({ length: Math.floor(2 * random()) }, () => randomShape(random));
      let footprint: ReturnType<typeof compileRegion>;
      try {
        footprint = compileRegion({ parts, holes });
      } catch (error) {
        expect(String(error)).toMatch(/leave nothing/);
        continue;
      }
      let faults = 0;
      for (const ring of footprint.outline()) {
        expect(ring.raDeg.length).toBe(ring.decDeg.length);
        expect(ring.raDeg.every((ra) => ra >= 0 && ra < 360)).toBe(true);
        for (const { from, to, lengthDeg } of steps(ring)) {
          if (lengthDeg > 0.5 + 1e-9) faults++;
          // 3% of the step to either side of its middle: a chord of 1/12 rad lies up to 1% within its circle.
          if (lengthDeg < 0.1) continue;
          const left = cross(from, to);
          for (const side of [1, -1]) {
            const off = side * 0.06;
            const p = unitToRaDec(
              unit([
                from[0] + to[0] + off * left[0],
                from[1] + to[1] + off * left[1],
                from[2] + to[2] + off * left[2],
              ]),
            );
            if (footprint.contains(p.raDeg, p.decDeg) !== (side === 1)) faults++;
          }
        }
      }
      expect(faults).toBe(0);
    }
  });

  it('encloses the area', () => {
    for (const [parts, holes] of [
      [['cap:10,20,5', 'box:8,30,18,25'], ['cap:20,21,2']],
      [['polygon:0,0,30,5,10,30', 'cap:0,0,10'], []],
    ] as const) {
      const footprint = compileRegion(region(parts, holes));
      // d3-geo wants outer rings clockwise and closed.
      const coordinates = footprint.outline().map(({ raDeg, decDeg }) => {
        const points = Array.from(raDeg, (ra, i): [number, number] => [ra, decDeg[i]!]).reverse();
        return [...points, points[0]!];
      });
      const area = (geoArea({ type: 'Polygon', coordinates }) * WHOLE_DEG2) / (4 * Math.PI);
      // Half-degree chords cut a circle of some degrees short by 2e-3 of its area.
      expect(area / footprint.areaDeg2).toBeCloseTo(1, 2);
    }
  });

  it('runs through the true corners', () => {
    const [ring] = outlineOf(['box:0,20,0,10'], ['box:10,30,5,20']);
    const corners = [
      [0, 0],
      [20, 0],
      [20, 5],
      [10, 5],
      [10, 10],
      [0, 10],
    ] as const;
    for (const [ra, dec] of corners) {
      const nearest = Math.min(
        ...Array.from(ring!.raDeg, (a, i) => separationDeg(a, ring!.decDeg[i]!, ra, dec)),
      );
      expect(nearest).toBeLessThan(1e-9);
    }
  });

  it('is the same object each time, so that it can be kept', () => {
    const footprint = compileRegion(region(['cap:0,0,1']));
    expect(footprint.outline()).toBe(footprint.outline());
  });
});
