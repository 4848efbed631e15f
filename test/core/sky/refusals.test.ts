import { describe, expect, it } from 'vitest';
import { Refusal } from '../../../shared-core/base/refusal.ts';
import { compileRegion } from '../../../shared-core/sky/compileRegion.ts';
import type { Region, SkyShape } from '../../../shared-core/sky/region.ts';
import { region } from './sample.ts';

function refusalOf(what: Region): Refusal {
  try {
    compileRegion(what);
  } catch (error) {
    expect(error).toBeInstanceOf(Refusal);
    return error as Refusal;
  }
  throw new Error('the region was accepted');
}

const polygon = (...verticesDeg: [number, number][]): SkyShape => ({
  kind: 'polygon',
  verticesDeg,
  side: 'smaller',
});

describe('regions that are none are refused with a sentence', () => {
  it.each<[string, Region, RegExp]>([
    ['no part', { parts: [], holes: [] }, /no part/],
    [
      'a self-crossing polygon',
      region(['polygon:0,0,10,10,10,0,0,10']),
      /\(0, 0\) to \(10, 10\) crosses or touches/,
    ],
    ['a corner that touches an edge', region(['polygon:0,0,10,0,10,10,5,0,0,10']), /crosses or touches/],
    ['two vertices', { parts: [polygon([0, 0], [1, 1])], holes: [] }, /2 vertices but needs at least 3/],
    ['one vertex', { parts: [polygon([0, 0])], holes: [] }, /1 vertex but needs at least 3/],
    ['a vertex twice in a row', region(['polygon:0,0,0,0,1,1,0,1']), /vertices 1 and 2 are both at \(0, 0\)/],
    ['the first vertex again at the end', region(['polygon:0,0,1,0,1,1,0,0']), /vertices 4 and 1 are both/],
    ['a vertex visited twice', region(['polygon:0,0,1,0,2,1,1,0,0,1']), /crosses or touches|must not repeat/],
    ['opposite neighbours', region(['polygon:0,0,180,0,90,10']), /opposite on the sky/],
    ['vertices in a row', region(['polygon:0,0,10,0,20,0']), /folds back/],
    ['a spike', region(['polygon:0,0,10,0,5,0,5,5']), /folds back on itself at \(10, 0\)/],
    ['a polygon too small to be one', region(['polygon:0,0,1e-6,0,0,1e-6']), /encloses no area/],
    ['a box with equal Dec', region(['box:0,10,5,5']), /Dec from 5 to 5/],
    ['a box with Dec the wrong way', region(['box:0,10,5,-5']), /Dec from 5 to -5/],
    ['a box of no RA', region(['box:10,10,0,5']), /RA from 10 to 10/],
    ['a box of no RA, a turn apart', region(['box:-10,350,0,5', 'box:350,-10,0,5']), /RA from 350 to -10/],
    ['a box over more than a turn', region(['box:-200,200,0,5']), /more than the full circle/],
    ['RA 361', region(['box:0,361,0,5']), /second RA is 361 .*-360 to 360/],
    ['Dec -91', region(['box:0,10,-91,5']), /lower Dec is -91 .*-90 to 90/],
    ['a cap of radius 0', region(['cap:0,0,0']), /radius is 0/],
    ['a cap of negative radius', region(['cap:0,0,-1']), /radius is -1/],
    ['a cap of radius 181', region(['cap:0,0,181']), /radius is 181/],
    ['a cap too small', region(['cap:0,0,1e-6']), /tenth of an arcsecond/],
    [
      'a Dec that is no number',
      { parts: [{ kind: 'cap', raDeg: 0, decDeg: Number.NaN, radiusDeg: 1 }], holes: [] },
      /Dec is NaN/,
    ],
    [
      'an endless RA',
      { parts: [polygon([0, 0], [Number.POSITIVE_INFINITY, 1], [0, 1])], holes: [] },
      /RA of vertex 2 is Infinity/,
    ],
    ['a hole that is none', region(['sky'], ['box:0,10,5,5']), /Dec from 5 to 5/],
    ['a hole that leaves nothing', region(['cap:5,5,3'], ['cap:5,5,3']), /leave nothing/],
    [
      'holes that leave nothing together',
      region(['box:0,20,0,10'], ['box:-5,10,-1,11', 'box:10,25,-1,11']),
      /leave nothing/,
    ],
    ['the sky less the sky', region(['sky'], ['box:0,180,-90,90', 'box:180,360,-90,90']), /leave nothing/],
  ])('%s', (_, what, sentence) => {
    const refusal = refusalOf(what);
    expect(refusal.message).toMatch(sentence);
    expect(refusal.kind).toBe('use');
    expect(refusal.message.split('\n').length).toBe(1);
    // What to do stands after a colon.
    expect(refusal.message).toMatch(/: .+\.$/);
  });

  it('accepts RA from -360 to 360 and takes it modulo a turn', () => {
    const area = compileRegion(region(['box:350,10,0,5'])).areaDeg2;
    for (const word of ['box:-10,10,0,5', 'box:-10,-350,0,5', 'box:350,-350,0,5']) {
      const footprint = compileRegion(region([word]));
      expect(footprint.areaDeg2).toBeCloseTo(area, 10);
      expect([footprint.contains(355, 1), footprint.contains(-5, 1), footprint.contains(20, 1)]).toEqual([
        true,
        true,
        false,
      ]);
    }
  });
});
