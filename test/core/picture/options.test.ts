import { describe, expect, it } from 'vitest';
import { Refusal } from '../../../shared-core/base/refusal.ts';
import { parsePictureSize, pictureOptions } from '../../../shared-core/picture/options.ts';

describe('sizes', () => {
  it.each([
    ['7680x4320', 300, 7680, 4320],
    ['8k', 300, 7680, 4320],
    ['180x120mm', 300, 2126, 1417],
    // ISO 216: A4 is 210 x 297 mm, A0 841 x 1189 mm; an inch is 25.4 mm.
    ['a4', 300, 3508, 2480],
    ['a4-portrait', 300, 2480, 3508],
    ['A0', 300, 14043, 9933],
  ])('%s at %i dpi', (text, dpi, widthPx, heightPx) => {
    expect(parsePictureSize(text, dpi)).toEqual({ widthPx, heightPx });
  });

  it.each(['0x0', '0x500', '1000000x1000000', '16385x100', '63x100', 'big', '-5x5', '1e9x5', ''])(
    'refuses %j with a sentence',
    (text) => {
      expect(() => parsePictureSize(text, 300)).toThrow(Refusal);
    },
  );

  it('takes the largest size', () => {
    expect(parsePictureSize('16384x16384', 300)).toEqual({ widthPx: 16_384, heightPx: 16_384 });
  });
});

describe('options', () => {
  it('fills in what is not said', () => {
    expect(pictureOptions({})).toMatchObject({
      view: 'cone',
      style: 'dark',
      rulers: true,
      transparent: false,
    });
  });

  it.each([
    [{ view: 'globe' }, /at view/],
    [{ widthPx: 0 }, /at widthPx/],
    [{ heightPx: 1e6 }, /at heightPx/],
    [{ unknown: 1 }, /unknown/i],
    [{ slab: { kind: 'declination', decMinDeg: 5, decMaxDeg: 5 } }, /lower one first/],
    [{ labels: [{ text: '', raDeg: 0, decDeg: 0, redshift: 1 }] }, /at labels.0.text/],
    [{ title: 'x'.repeat(3000) }, /at title/],
  ])('refuses %j', (raw, words) => {
    expect(() => pictureOptions(raw)).toThrow(words);
  });
});
