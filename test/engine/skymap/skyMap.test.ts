import { geoContains } from 'd3-geo';
import fc from 'fast-check';
import { describe, expect, it } from 'vitest';
import type { Selected } from '../../../renderer/engine/protocol.ts';
import { readyRegion } from '../../../renderer/engine/regionReady.ts';
import { decText, graticule, raText } from '../../../renderer/skymap/graticule.ts';
import { outlineArea, outlineLines } from '../../../renderer/skymap/outlines.ts';
import {
  closeTarget,
  fieldIndex,
  middleOf,
  skyContent,
  skySentence,
} from '../../../renderer/skymap/skyContent.ts';
import {
  closeFrame,
  type Directions,
  type MapBox,
  middleRaDeg,
  targetOfPoints,
  unitVector,
  wholeSkyFrame,
} from '../../../renderer/skymap/skyFrames.ts';
import { countPoints, dotRadius, type SkyCounts, tonePoints } from '../../../renderer/skymap/skyPoints.ts';
import { pointProjection, type SkyFrame, skyAt } from '../../../renderer/skymap/skyProjection.ts';
import { compileRegion } from '../../../shared-core/sky/compileRegion.ts';
import { footprintFields } from '../../../shared-core/sky/fields.ts';
import type { Region } from '../../../shared-core/sky/region.ts';

const BOX: MapBox = { left: 36, top: 2, right: 246, bottom: 130 };
const box = (raMinDeg: number, raMaxDeg: number, decMinDeg: number, decMaxDeg: number) =>
  ({ kind: 'box', raMinDeg, raMaxDeg, decMinDeg, decMaxDeg }) as const;
const cap = (raDeg: number, decDeg: number, radiusDeg: number) =>
  ({ kind: 'cap', raDeg, decDeg, radiusDeg }) as const;

const REGIONS: Record<string, Region> = {
  'a box over RA 0': { parts: [box(350, 20, -10, 25)], holes: [] },
  'three fields': { parts: [box(30, 40, -7, -2), cap(150, 2, 3), cap(334, 0, 4)], holes: [] },
  'a cap with holes': { parts: [cap(200, 30, 50)], holes: [cap(200, 30, 6), cap(230, 40, 4)] },
  'the sky without the galactic belt': { parts: [cap(192.86, 27.13, 60), cap(12.86, -27.13, 60)], holes: [] },
  'a pole': { parts: [cap(0, 90, 12)], holes: [] },
};

/** A spiral of directions, evenly over the sphere. */
function spread(count: number): { raDeg: number; decDeg: number }[] {
  return Array.from({ length: count }, (_, i) => ({
    raDeg: (i * 222.4922359) % 360,
    decDeg: (Math.asin(1 - (2 * i + 1) / count) * 180) / Math.PI,
  }));
}

describe('outlines for the drawing', () => {
  for (const [name, region] of Object.entries(REGIONS)) {
    it(`fills ${name} where the region is`, () => {
      const compiled = compileRegion(region);
      const area = outlineArea(compiled.outline());
      let inside = 0;
      for (const { raDeg, decDeg } of spread(1500)) {
        // The outline's points are up to half a degree apart, so the two may differ only near the border.
        const near = [0.3, -0.3].some(
          (d) =>
            compiled.contains(raDeg, Math.max(-90, Math.min(90, decDeg + d))) !==
              compiled.contains(raDeg, decDeg) ||
            compiled.contains(raDeg + d / Math.max(0.01, Math.cos((decDeg * Math.PI) / 180)), decDeg) !==
              compiled.contains(raDeg, decDeg),
        );
        if (near) continue;
        expect(geoContains(area, [raDeg, decDeg])).toBe(compiled.contains(raDeg, decDeg));
        if (compiled.contains(raDeg, decDeg)) inside++;
      }
      expect(inside).toBeGreaterThan(0);
    });
  }
  it('closes every ring', () => {
    const rings = compileRegion(REGIONS['a cap with holes']!).outline();
    const lines = outlineLines(rings).coordinates;
    expect(lines).toHaveLength(3);
    for (const line of lines) expect(line.at(-1)).toEqual(line[0]);
  });
});

describe('frames', () => {
  const equalArea = (frame: SkyFrame, raDeg: number, decDeg: number): number => {
    const project = pointProjection(frame);
    const [a, b, c] = [0, 1, 2].map(() => ({ x: 0, y: 0 })) as [
      { x: number; y: number },
      { x: number; y: number },
      { x: number; y: number },
    ];
    const step = 1e-3;
    const wide = step / Math.cos((decDeg * Math.PI) / 180);
    project(...unitVector(raDeg, decDeg), a);
    project(...unitVector(raDeg + wide, decDeg), b);
    project(...unitVector(raDeg, decDeg + step), c);
    const cross = (b.x - a.x) * (c.y - a.y) - (b.y - a.y) * (c.x - a.x);
    return cross / ((step * Math.PI) / 180) ** 2 / frame.scalePx ** 2;
  };
  it('keep areas, with right ascension to the left', () => {
    // Finite differences over 3.6 arcseconds.
    for (const frame of [
      wholeSkyFrame(BOX, 100),
      closeFrame(BOX, { centreRaDeg: 20, centreDecDeg: -40, radiusDeg: 5, rings: [] }),
    ])
      for (const [ra, dec] of [
        [100, 10],
        [20, -40],
        [60, 55],
        [350, -70],
      ] as const)
        expect(equalArea(frame, ra, dec)).toBeCloseTo(1, 4);
  });
  it('read back the place under a pixel', () => {
    const frame = closeFrame(BOX, { centreRaDeg: 359.5, centreDecDeg: 3, radiusDeg: 2, rings: [] });
    const at = { x: 0, y: 0 };
    pointProjection(frame)(...unitVector(0.4, 2.2), at);
    const back = skyAt(frame, at.x, at.y)!;
    expect(back.raDeg).toBeCloseTo(0.4, 9);
    expect(back.decDeg).toBeCloseTo(2.2, 9);
    expect(skyAt(wholeSkyFrame(BOX, null), BOX.left, BOX.top)).toBeNull();
  });
  it('hold the whole outline of a field in the box, as large as it goes', () => {
    for (const region of [
      REGIONS['a box over RA 0']!,
      REGIONS['a pole']!,
      { parts: [cap(150, 2, 0.05)], holes: [] },
    ]) {
      const compiled = compileRegion(region);
      const field = footprintFields(compiled)[0]!;
      const project = pointProjection(closeFrame(BOX, field));
      const xs: number[] = [];
      const ys: number[] = [];
      for (const { raDeg, decDeg } of field.rings)
        for (let i = 0; i < raDeg.length; i++) {
          const at = { x: 0, y: 0 };
          project(...unitVector(raDeg[i]!, decDeg[i]!), at);
          xs.push(at.x);
          ys.push(at.y);
        }
      expect(Math.min(...xs)).toBeGreaterThan(BOX.left);
      expect(Math.max(...xs)).toBeLessThan(BOX.right);
      expect(Math.min(...ys)).toBeGreaterThan(BOX.top);
      expect(Math.max(...ys)).toBeLessThan(BOX.bottom);
      const fill = Math.max(
        (Math.max(...xs) - Math.min(...xs)) / (BOX.right - BOX.left),
        (Math.max(...ys) - Math.min(...ys)) / (BOX.bottom - BOX.top),
      );
      expect(fill).toBeGreaterThan(0.8);
    }
  });
  it('put the rim of the whole sky away from the galaxies', () => {
    expect(middleRaDeg([350, 10, 5])).toBeCloseTo(1.67, 1);
    expect(middleRaDeg([0, 90, 180, 270])).toBeNull();
    expect(wholeSkyFrame(BOX, 355).centreRaDeg).toBe(0);
    expect(wholeSkyFrame(BOX, null).centreRaDeg).toBe(180);
  });
  it('fit galaxies that have no region, even a single one', () => {
    const one = unitVector(150, 2);
    const target = targetOfPoints({ x: [one[0]], y: [one[1]], z: [one[2]] })!;
    expect(target.centreRaDeg).toBeCloseTo(150, 9);
    expect(target.centreDecDeg).toBeCloseTo(2, 9);
    expect(Number.isFinite(closeFrame(BOX, target).scalePx)).toBe(true);
    expect(targetOfPoints({ x: [], y: [], z: [] })).toBeNull();
  });
});

describe('graticule', () => {
  it('writes right values beside its lines', () => {
    fc.assert(
      fc.property(
        fc.double({ min: 0, max: 359.9, noNaN: true }),
        fc.double({ min: -70, max: 70, noNaN: true }),
        fc.double({ min: 0.05, max: 20, noNaN: true }),
        (centreRaDeg, centreDecDeg, radiusDeg) => {
          const frame = closeFrame(BOX, { centreRaDeg, centreDecDeg, radiusDeg, rings: [] });
          const { labels } = graticule(frame, BOX, 12);
          expect(labels.length).toBeGreaterThan(1);
          for (const { text, x, y, anchor } of labels) {
            if (anchor === 'end') {
              // A line is drawn through 48 points: a small share of the radius away from the circle itself.
              const at = skyAt(frame, BOX.left, y - 12 * 0.35)!;
              expect(Math.abs(at.decDeg - Number(text.replace('−', '-').replace('°', '')))).toBeLessThan(
                0.02 * radiusDeg,
              );
            } else if (y > BOX.bottom) {
              const at = skyAt(frame, x, BOX.bottom)!;
              const off = ((at.raDeg - Number(text.replace('°', '')) + 540) % 360) - 180;
              expect(Math.abs(off) * Math.cos((at.decDeg * Math.PI) / 180)).toBeLessThan(0.02 * radiusDeg);
            }
          }
        },
      ),
      { numRuns: 60 },
    );
  });
  it('moves its right ascensions off the fields', () => {
    const frame = wholeSkyFrame(BOX, 180);
    const at = { x: 0, y: 0 };
    pointProjection(frame)(...unitVector(180, 0), at);
    const free = graticule(frame, BOX, 12).labels.filter((label) => label.anchor === 'middle');
    const moved = graticule(frame, BOX, 12, [[at.x, at.y]]).labels.filter(
      (label) => label.anchor === 'middle',
    );
    expect(free.find((label) => label.text === '180°')!.y).toBeCloseTo(at.y + 4.8, 6);
    expect(moved.find((label) => label.text === '180°')!.y).not.toBeCloseTo(at.y + 4.8, 0);
  });
  it('writes declinations with their sign', () => {
    expect([decText(-30), decText(2.5), decText(0), raText(0.1 + 0.2)]).toEqual([
      '−30°',
      '+2.5°',
      '0°',
      '0.3°',
    ]);
  });
});

describe('points', () => {
  const size = { widthPx: 246, heightPx: 148 };
  const counted = (directions: Directions, frame: SkyFrame): SkyCounts => {
    const steps = countPoints(directions, frame, BOX, size, 1);
    for (;;) {
      const { done, value } = steps.next();
      if (done) return value;
    }
  };
  it('count every galaxy in the box once, where each is one pixel', () => {
    const places = spread(5000);
    const at = places.map(({ raDeg, decDeg }) => unitVector(raDeg, decDeg));
    const directions = { x: at.map((v) => v[0]), y: at.map((v) => v[1]), z: at.map((v) => v[2]) };
    const whole = counted(directions, wholeSkyFrame(BOX, null));
    expect(whole.counts.reduce((a, b) => a + b, 0)).toBe(5000);
    const frame = closeFrame(BOX, { centreRaDeg: 0, centreDecDeg: 0, radiusDeg: 30, rings: [] });
    const project = pointProjection(frame);
    const seen = at.filter((v) => {
      const px = { x: 0, y: 0 };
      project(...v, px);
      return px.x >= BOX.left && px.x < BOX.right && px.y >= BOX.top && px.y < BOX.bottom;
    }).length;
    expect(counted(directions, frame).counts.reduce((a, b) => a + b, 0)).toBe(seen);
    expect(seen).toBeGreaterThan(100);
  });
  it('draw few galaxies larger', () => {
    expect(dotRadius(12, 1)).toBeGreaterThan(dotRadius(1000, 1));
    expect(dotRadius(1000, 1)).toBeGreaterThan(dotRadius(1e6, 1));
  });
  it('are fuller where galaxies crowd, and nowhere without any', () => {
    const counts = Uint16Array.of(0, 1, 2, 40);
    const rgba = new Uint8ClampedArray(16);
    tonePoints({ width: 2, height: 2, counts }, [10, 20, 30], rgba);
    const alpha = [3, 7, 11, 15].map((i) => rgba[i]!);
    expect(alpha[0]).toBe(0);
    expect(alpha[1]).toBeGreaterThan(0.25 * 255);
    expect(alpha[2]).toBeGreaterThan(alpha[1]!);
    expect(alpha[3]).toBeGreaterThan(alpha[2]!);
    expect([...rgba.subarray(4, 7)]).toEqual([10, 20, 30]);
  });
});

describe('what the map shows', () => {
  it('takes a plan without a catalogue', () => {
    const content = skyContent(readyRegion(REGIONS['three fields']!).picture);
    expect(content.fields).toHaveLength(3);
    expect(content.origin).toBe('given');
    expect(closeTarget(content, 4, null)!.centreRaDeg).toBeCloseTo(content.fields[1]!.centreRaDeg, 9);
    expect(skySentence(content, 0)).toMatch(
      /^No galaxies\. Region as given, \d+(\.\d+)? square degrees, in 3 fields: RA /,
    );
  });
  it('stays with the whole sky for wide regions, and without anything', () => {
    const wholeSky = readyRegion({ parts: [{ kind: 'wholeSky' }], holes: [] }).picture;
    expect(closeTarget(skyContent(wholeSky), 0, null)).toBeNull();
    expect(closeTarget(skyContent(null), 0, null)).toBeNull();
    expect(skySentence(skyContent(null), 0)).toBe('No galaxies. No region yet.');
    expect(middleOf(skyContent(null), null)).toBeNull();
  });
  it('is centred by the fields, so that it does not turn when galaxies come, and else by these', () => {
    const fields = skyContent(readyRegion(REGIONS['three fields']!).picture);
    const elsewhere = { raDeg: Float32Array.of(301, 299) } as unknown as Selected;
    expect(middleOf(fields, elsewhere)).toBe(middleOf(fields, null));
    expect(middleOf(skyContent(null), elsewhere)).toBeCloseTo(300, 4);
  });
  it('steps around the fields in both directions', () => {
    expect([fieldIndex([1, 2, 3], 3), fieldIndex([1, 2, 3], -1), fieldIndex([], 2)]).toEqual([0, 2, 0]);
  });
});
