import fc from 'fast-check';
import { describe, expect, it } from 'vitest';
import { cardCorner, pairPoints } from '../../../renderer/stage/cardCorner.ts';
import { picksAfter } from '../../../renderer/stage/picking.ts';

const hit = (index: number) => ({ index, xPx: 10 * index, yPx: 0 });

describe('galaxies picked by clicks', () => {
  it('are one, or two where the click means a second', () => {
    expect(picksAfter([], hit(1), false)).toEqual([hit(1)]);
    expect(picksAfter([hit(1)], hit(2), false)).toEqual([hit(2)]);
    expect(picksAfter([hit(1)], hit(2), true)).toEqual([hit(1), hit(2)]);
    expect(picksAfter([hit(1), hit(2)], hit(3), true)).toEqual([hit(1), hit(3)]);
    expect(picksAfter([], hit(2), true)).toEqual([hit(2)]);
    expect(picksAfter([hit(1)], null, false)).toEqual([]);
  });
  it('stay where the second click finds none, or the first again', () => {
    expect(picksAfter([hit(1)], null, true)).toEqual([hit(1)]);
    expect(picksAfter([hit(1), hit(2)], hit(1), true)).toEqual([hit(1), hit(2)]);
  });
});

describe('the corner of the card', () => {
  const stage = { widthPx: 600, heightPx: 400 };
  const card = { widthPx: 250, heightPx: 180 };
  it('is kept while no point is under the card', () => {
    expect(cardCorner([], stage, card, 'bottom-right')).toBe('bottom-right');
    expect(cardCorner([{ xPx: 100, yPx: 100 }], stage, card, 'top-right')).toBe('top-right');
  });
  it('makes way for a measured pair, its line and its label', () => {
    const pair = pairPoints([
      { xPx: 300, yPx: 390 },
      { xPx: 590, yPx: 390 },
    ]);
    // The two stand at the foot of the stage: the card goes to its head.
    expect(cardCorner(pair, stage, card, 'bottom-right')).toBe('top-left');
    const across = pairPoints([
      { xPx: 590, yPx: 10 },
      { xPx: 10, yPx: 390 },
    ]);
    expect(cardCorner(across, stage, card, 'bottom-left')).toMatch(/top-left|bottom-right/);
  });
  it('never covers a point where a corner is clear of all', () => {
    const place = fc.record({ xPx: fc.integer({ min: 0, max: 600 }), yPx: fc.integer({ min: 0, max: 400 }) });
    const covers = (corner: string, { xPx, yPx }: { xPx: number; yPx: number }) =>
      (corner.endsWith('left') ? xPx <= 250 : xPx >= 350) &&
      (corner.startsWith('top') ? yPx <= 180 : yPx >= 220);
    fc.assert(
      fc.property(fc.array(place, { minLength: 1, maxLength: 3 }), (points) => {
        const found = cardCorner(points, stage, card, 'bottom-right');
        // Three points can stand in three corners at most.
        expect(points.some((point) => covers(found, point))).toBe(false);
      }),
    );
  });
});
