import fc from 'fast-check';
import { describe, expect, it } from 'vitest';
import { captionLines, sidewaysText } from '../../../renderer/cone/caption.ts';
import { paintEdge } from '../../../renderer/cone/overlay/edgeRuler.ts';
import { LabelPlacer } from '../../../renderer/cone/overlay/labelPlacer.ts';
import { paintObserver } from '../../../renderer/cone/overlay/observer.ts';
import { Pen } from '../../../renderer/cone/overlay/pen.ts';
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

describe('texts where rulers meet at the observer', () => {
  const written: string[] = [];
  /** A canvas that remembers its texts; each letter is 6 px wide. */
  const context = new Proxy({} as CanvasRenderingContext2D, {
    get: (_, name) =>
      name === 'measureText'
        ? (text: string) => ({ width: 6 * text.length })
        : (text: unknown) => void (name === 'fillText' && written.push(String(text))),
    set: () => true,
  });
  const pixels = Float64Array.of(100, 0, 0, 100, 0, 100, 0, 100, 0, 0, 0, 1);
  const ticks = [0, 0.5, 1].map((comovingMpc) => ({ comovingMpc, text: String(comovingMpc), level: 0 }));
  const scene = (aligned: boolean) =>
    ({
      aligned,
      pixels,
      farMpc: 1,
      radius: (mpc: number) => mpc,
      scale: { titles: { redshift: '' }, rulers: { redshift: ticks } },
    }) as unknown as Parameters<typeof paintEdge>[1];
  const lane = { matrix: pixels, lift: 0, shape: { centre: [0, 1, 0] } } as unknown as Parameters<
    typeof paintEdge
  >[2];
  const newPen = () => {
    written.length = 0;
    return new Pen(context, {} as ConstructorParameters<typeof Pen>[1], 400, 400);
  };
  it('say the 0 of an edge only side-on, where no other ruler begins there', () => {
    paintEdge(newPen(), scene(true), lane, [1, 0, 0], 'redshift');
    expect(written).toEqual(['0', '0.5', '1']);
    paintEdge(newPen(), scene(false), lane, [1, 0, 0], 'redshift');
    expect(written).toEqual(['0.5', '1']);
  });
  it('keep a number off the name of the observer', () => {
    const pen = newPen();
    paintObserver(pen, scene(false), { lift: 0 }, true);
    expect(written).toEqual(['observer']);
    // The name is 48 px wide and begins 8 px beside the observer, at 100.
    expect(pen.text('9', 100 + 8 + 48 + 3 + 6, 76, '')).toBe(false);
    expect(pen.text('9', 100 + 8 + 48 + 3 + 14, 76, '')).toBe(true);
  });
});
