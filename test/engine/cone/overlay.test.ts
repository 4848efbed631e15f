import fc from 'fast-check';
import { describe, expect, it } from 'vitest';
import { captionLines, sidewaysText } from '../../../renderer/cone/caption.ts';
import { LabelPlacer } from '../../../renderer/cone/overlay/labelPlacer.ts';
import { roundLengthMpc } from '../../../renderer/cone/overlay/scaleBar.ts';

describe('labels', () => {
  it('never overlap and never leave the stage', () => {
    const box = fc.record({
      x: fc.integer({ min: -50, max: 350 }),
      y: fc.integer({ min: -50, max: 250 }),
      width: fc.integer({ min: 1, max: 120 }),
      height: fc.integer({ min: 1, max: 30 }),
    });
    fc.assert(
      fc.property(fc.array(box, { maxLength: 60 }), (boxes) => {
        const placer = new LabelPlacer({ x: 0, y: 0, width: 300, height: 200 });
        const placed = boxes.filter((b) => placer.place(b, 3));
        for (const [i, a] of placed.entries()) {
          expect(a.x >= 0 && a.y >= 0 && a.x + a.width <= 300 && a.y + a.height <= 200).toBe(true);
          for (const b of placed.slice(i + 1)) {
            const apart =
              a.x + a.width + 3 <= b.x ||
              b.x + b.width + 3 <= a.x ||
              a.y + a.height + 3 <= b.y ||
              b.y + b.height + 3 <= a.y;
            expect(apart).toBe(true);
          }
        }
      }),
      { seed: 9 },
    );
  });
});

describe('the scale bar', () => {
  it.each([1, 1 / 0.7])('is a round number of units of %d Mpc and between 70 and 175 pixels long', (unit) => {
    for (let scale = 1e-4; scale < 1e4; scale *= 1.7) {
      const mpc = roundLengthMpc(scale, unit);
      const lead = mpc / unit / 10 ** Math.floor(Math.log10((mpc / unit) * (1 + 1e-12)));
      expect([1, 2, 5].some((nice) => Math.abs(lead - nice) < 1e-9)).toBe(true);
      expect(mpc / scale).toBeGreaterThanOrEqual(70 - 1e-6);
      expect(mpc / scale).toBeLessThanOrEqual(175 + 1e-6);
    }
  });
});

describe('the caption', () => {
  const plain = {
    view: 'sideOn',
    reading: 'comoving',
    lanes: [{ name: '', sidewaysFactor: 1 }],
    field: 0,
    fieldCount: 1,
    fieldName: '',
    perspective: false,
    estimated: false,
  } as const;

  it('says nothing where all is to scale', () => {
    expect(captionLines(plain)).toEqual([]);
  });

  it('is never silent about a stretch', () => {
    expect(captionLines({ ...plain, lanes: [{ name: '', sidewaysFactor: 12 }] })).toEqual(['sideways × 12']);
    expect(sidewaysText(0.9)).toBe('sideways × 0.9');
  });

  it('says what the radius stands for when it is not a length', () => {
    expect(captionLines({ ...plain, reading: 'redshift' }).join()).toMatch(/redshift.*not to scale/);
    expect(captionLines({ ...plain, reading: 'lookback' }).join()).toMatch(/lookback time.*not to scale/);
  });

  it('names the field of several, and says that parallel cones are not where they are', () => {
    const one = { ...plain, field: 1, fieldCount: 3, fieldName: 'Deep A' };
    expect(captionLines(one)).toEqual(['field 2 of 3: Deep A']);
    const lanes = [plain.lanes[0], plain.lanes[0], plain.lanes[0]];
    expect(captionLines({ ...one, view: 'parallel', lanes }).join()).toMatch(/not in their true directions/);
  });

  it('tells an estimate from a given outline', () => {
    expect(captionLines({ ...plain, estimated: true }).join()).toMatch(/estimated/);
  });
});
