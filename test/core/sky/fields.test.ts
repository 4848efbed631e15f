import { describe, expect, it } from 'vitest';
import { compileRegion } from '../../../shared-core/sky/compileRegion.ts';
import { smallestCap } from '../../../shared-core/sky/enclosingCap.ts';
import { estimateFootprint } from '../../../shared-core/sky/estimate.ts';
import { footprintFields, type SkyField } from '../../../shared-core/sky/fields.ts';
import { angleRad, raDecToUnit, separationDeg } from '../../../shared-core/sky/vectors.ts';
import { region, seeded } from './sample.ts';

const fieldsOf = (parts: readonly string[], holes: readonly string[] = []): readonly SkyField[] =>
  footprintFields(compileRegion(region(parts, holes)));

function onlyField(parts: readonly string[], holes: readonly string[] = []): SkyField {
  const [field, ...more] = fieldsOf(parts, holes);
  expect(more).toEqual([]);
  return field!;
}

describe('fields of a footprint', () => {
  it('a cap: its own centre and radius', () => {
    const field = onlyField(['cap:359,60,3']);
    expect(separationDeg(field.centreRaDeg, field.centreDecDeg, 359, 60)).toBeLessThan(1e-6);
    // Its outline's points lie on the rim itself.
    expect(field.radiusDeg).toBeCloseTo(3, 6);
    expect(field.wide).toBe(false);
    expect(field.positionAngleDeg).toBe(90);
  });

  it.each([
    ['east to west', 'box:10,30,-2,2', 90],
    ['north to south', 'box:10,12,-10,10', 0],
    ['a slanted sliver', 'polygon:20,0,30,10,29.5,10.5,19.5,0.5', 45],
    ['slanted the other way', 'polygon:20,0,10,10,10.5,10.5,20.5,0.5', 135],
  ])('position angle of a field that runs %s', (_, word, angle) => {
    const field = onlyField([word]);
    // Within 2 degrees: a great circle bends against the meridians, and 0 and 180 are one direction.
    const off = Math.abs(((field.positionAngleDeg - angle + 270) % 180) - 90);
    expect(off).toBeLessThan(2);
    expect(field.halfLengthDeg).toBeGreaterThan(2 * field.halfWidthDeg);
    expect(field.halfLengthDeg).toBeLessThanOrEqual(field.radiusDeg + 1e-9);
  });

  it('has the lengths of the field along and across', () => {
    const field = onlyField(['box:350,10,-2,2']);
    expect(field.halfLengthDeg).toBeCloseTo(10, 1);
    expect(field.halfWidthDeg).toBeCloseTo(2, 1);
    expect(separationDeg(field.centreRaDeg, field.centreDecDeg, 0, 0)).toBeLessThan(1e-6);
  });

  it('several fields far apart are several, the largest first, each with its own holes', () => {
    const fields = fieldsOf(
      ['cap:10,0,1', 'box:100,120,0,10', 'cap:200,-40,2'],
      ['cap:110,5,1', 'cap:200,-40,0.5'],
    );
    expect(fields.map((field) => Math.round(field.centreRaDeg))).toEqual([110, 200, 10]);
    expect(fields.map((field) => field.rings.length)).toEqual([2, 2, 1]);
  });

  it('pieces that lie close together are one', () => {
    expect(fieldsOf(['cap:10,0,2', 'cap:14.9,0,2']).length).toBe(1);
    expect(fieldsOf(['cap:10,0,2', 'cap:16,0,2']).length).toBe(2);
    expect(fieldsOf(['box:0,20,0,10', 'cap:22,5,0.5']).length).toBe(1);
  });

  it.each([
    ['the whole sky', ['sky'], []],
    ['the sky less a band', ['sky'], ['box:0,360,-20,20']],
    ['the sky less a few stars', ['sky'], ['cap:10,10,1', 'cap:50,50,1']],
    ['a cap of 71 degrees', ['cap:10,10,71'], []],
    ['a cap of 120 degrees', ['cap:10,10,120'], []],
    ['a belt', ['box:0,360,-5,5'], []],
    ['a long strip', ['box:0,200,-5,5'], []],
    ['a wide field and a small one', ['cap:10,10,80', 'cap:190,-10,1'], []],
  ] as const)('%s is one wide field', (_, parts, holes) => {
    const field = onlyField(parts, holes);
    expect(field.wide).toBe(true);
    expect(field.rings.length).toBe(compileRegion(region(parts, holes)).outline().length);
  });

  it('a cap of 69 degrees, a ring around the pole and a field over RA 0 are not wide', () => {
    expect(onlyField(['cap:10,10,69']).wide).toBe(false);
    const ring = onlyField(['box:0,360,80,85']);
    expect([ring.wide, ring.rings.length]).toEqual([false, 2]);
    expect(ring.centreDecDeg).toBeCloseTo(90, 6);
    expect(ring.radiusDeg).toBeCloseTo(10, 6);
  });

  it('every outline point of a field lies in its cap, and every ring is in one field', () => {
    const random = seeded(12);
    const raDeg = Array.from({ length: 4000 }, (_, i) => (i % 3) * 80 + 6 * random());
    const decDeg = raDeg.map(() => 10 * random());
    const footprint = estimateFootprint(raDeg, decDeg);
    const fields = footprintFields(footprint);
    expect(fields.length).toBe(3);
    expect(fields.flatMap((field) => field.rings).length).toBe(footprint.outline().length);
    for (const field of fields) {
      for (const ring of field.rings) {
        ring.raDeg.forEach((ra, i) => {
          const away = separationDeg(ra, ring.decDeg[i]!, field.centreRaDeg, field.centreDecDeg);
          expect(away).toBeLessThanOrEqual(field.radiusDeg + 1e-9);
        });
      }
    }
  });
});

describe('smallest cap around points', () => {
  it('agrees with trying all pairs and triples', () => {
    const random = seeded(3);
    for (let round = 0; round < 50; round++) {
      const points = Array.from({ length: 3 + Math.floor(6 * random()) }, () =>
        raDecToUnit(40 * random(), 60 * random() - 20),
      );
      const cap = smallestCap(points);
      const reach = Math.max(...points.map((p) => angleRad(cap.centre, p)));
      expect(reach).toBeCloseTo(cap.radiusRad, 10);
      // No smaller cap: every subset of three needs at most this one, and some subset needs all of it.
      let needed = 0;
      for (const a of points)
        for (const b of points)
          for (const c of points) needed = Math.max(needed, smallestCap([a, b, c]).radiusRad);
      expect(cap.radiusRad).toBeCloseTo(needed, 10);
    }
  });

  it('one point, two points, equal points, points in a row', () => {
    const [a, b, c] = [raDecToUnit(10, 0), raDecToUnit(20, 0), raDecToUnit(30, 0)];
    expect(smallestCap([a]).radiusRad).toBe(0);
    expect(smallestCap([a, a, a]).radiusRad).toBe(0);
    expect(smallestCap([a, b]).radiusRad).toBeCloseTo((5 * Math.PI) / 180, 12);
    expect(smallestCap([b, a, c]).radiusRad).toBeCloseTo((10 * Math.PI) / 180, 12);
  });
});
