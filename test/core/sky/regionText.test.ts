import fc from 'fast-check';
import { describe, expect, it } from 'vitest';
import { Refusal } from '../../../shared-core/base/refusal.ts';
import { parsePolygonText } from '../../../shared-core/sky/polygonText.ts';
import type { SkyShape } from '../../../shared-core/sky/region.ts';
import {
  describeRegion,
  formatShape,
  parseRegionShape,
  polygonFileOf,
} from '../../../shared-core/sky/regionText.ts';
import { region } from './sample.ts';

describe('shapes in one word', () => {
  it('are read', () => {
    expect(parseRegionShape('sky')).toEqual({ kind: 'wholeSky' });
    expect(parseRegionShape('box:350,10,-5,5')).toEqual({
      kind: 'box',
      raMinDeg: 350,
      raMaxDeg: 10,
      decMinDeg: -5,
      decMaxDeg: 5,
    });
    expect(parseRegionShape(' CAP: 150.1, +2.2, 1e-1 ')).toEqual({
      kind: 'cap',
      raDeg: 150.1,
      decDeg: 2.2,
      radiusDeg: 0.1,
    });
    expect(parseRegionShape('polygon-larger:0,0,1,0,.5,1.')).toEqual({
      kind: 'polygon',
      verticesDeg: [
        [0, 0],
        [1, 0],
        [0.5, 1],
      ],
      side: 'larger',
    });
  });

  it('come back to the last bit', () => {
    const number = fc.double({ noNaN: true, noDefaultInfinity: true });
    const shape: fc.Arbitrary<SkyShape> = fc.oneof(
      fc.constant({ kind: 'wholeSky' } as const),
      fc.record({ kind: fc.constant('cap' as const), raDeg: number, decDeg: number, radiusDeg: number }),
      fc.record({
        kind: fc.constant('box' as const),
        raMinDeg: number,
        raMaxDeg: number,
        decMinDeg: number,
        decMaxDeg: number,
      }),
      fc.record({
        kind: fc.constant('polygon' as const),
        verticesDeg: fc.array(fc.tuple(number, number), { minLength: 3, maxLength: 9 }),
        side: fc.constantFrom('smaller' as const, 'larger' as const),
      }),
    );
    fc.assert(
      fc.property(shape, (given) => {
        // JSON makes no difference between 0 and -0, and neither does the sky.
        expect(JSON.stringify(parseRegionShape(formatShape(given)))).toBe(JSON.stringify(given));
      }),
    );
  });

  it.each([
    'box:1,2,3',
    'box:1,2,3,4,5',
    'box:1,2,3,x',
    'box:1,2,3,',
    'box:0x10,2,3,4',
    'box',
    'cap:1,2',
    'cap:1,2,Infinity',
    'polygon:1,2,3,4',
    'polygon:1,2,3,4,5,6,7',
    'polygon:field.txt',
    'sky:1',
    'circle:1,2,3',
    '',
  ])('%j is refused by name', (word) => {
    const attempt = () => parseRegionShape(word);
    expect(attempt).toThrow(Refusal);
    expect(attempt).toThrow(`'${word}'`);
  });

  it('tells a polygon file from vertices', () => {
    expect(polygonFileOf('polygon:field.txt')).toEqual({ file: 'field.txt', side: 'smaller' });
    expect(polygonFileOf('polygon-larger:C:\\a,b\\f.txt')).toEqual({
      file: 'C:\\a,b\\f.txt',
      side: 'larger',
    });
    for (const word of ['polygon:0,0,1,0,1,1', 'box:1,2,3,4', 'sky', 'polygon:']) {
      expect(polygonFileOf(word)).toBeNull();
    }
  });
});

describe('regions in one line', () => {
  it.each([
    [['sky'], [], 'whole sky'],
    [['box:350,10,-5,5.25'], [], 'box RA 350 to 10, Dec -5 to 5.25 deg'],
    [
      ['cap:150.1,2.2,1', 'polygon:0,0,1,0,1,1'],
      ['cap:150,2,0.1'],
      'cap of radius 1 deg around RA 150.1, Dec 2.2 deg + polygon of 3 vertices, less cap of radius 0.1 deg around RA 150, Dec 2 deg',
    ],
    [['sky'], ['cap:1,1,1', 'cap:2,1,1', 'cap:3,1,1', 'box:1,2,3,4'], 'whole sky, less 3 caps + 1 box'],
  ] as const)('%j less %j', (parts, holes, words) => {
    expect(describeRegion(region(parts, holes))).toBe(words);
  });
});

describe('polygon text', () => {
  it('takes any usual separator, comments, a header, a byte-order mark and a closing vertex', () => {
    const text = '\uFEFFRA, Dec\r\n# a field\r\n10, 20\r\n11;20 # corner\r\n11\t21\r\n10 21\r\n10,20\r\n';
    expect(parsePolygonText(text)).toEqual([
      {
        kind: 'polygon',
        verticesDeg: [
          [10, 20],
          [11, 20],
          [11, 21],
          [10, 21],
        ],
        side: 'smaller',
      },
    ]);
  });

  it('separates polygons at blank lines, not at comments', () => {
    const polygons = parsePolygonText('\n1 1\n2 1\n# still the first\n2 2\n\n\n5 5\n6 5\n6 6\n', 'larger');
    expect(polygons.map((polygon) => [polygon.verticesDeg.length, polygon.side])).toEqual([
      [3, 'larger'],
      [3, 'larger'],
    ]);
  });

  it.each([
    ['', /no vertices/],
    ['# nothing\n', /no vertices/],
    ['RA Dec\n', /no vertices/],
    ['1 1\n2 2\n', /line 2 has 2 vertices/],
    ['1 1\n2 1\n1 1\n', /has 2 vertices/],
    ['1 1\n2 1\n2 2 3\n', /Line 3 of the polygon is '2 2 3'/],
    ['1 1\n12h30m 1\n2 2\n', /Line 2 of the polygon is '12h30m 1'/],
    ['1 1\nnan 1\n2 2\n', /Line 2/],
    ['1 1\n1e400 1\n2 2\n', /Line 2/],
    [`1 1\n${'x'.repeat(1000)}\n`, /'x{40}\.\.\.'/],
  ])('%j is refused with its line', (text, sentence) => {
    expect(() => parsePolygonText(text)).toThrow(Refusal);
    expect(() => parsePolygonText(text)).toThrow(sentence);
  });
});
