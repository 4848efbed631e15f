import { describe, expect, it } from 'vitest';
import { COLOUR_MAPS, colourMap, type Ground } from '../../../renderer/colour/colourMap.ts';
import { legend } from '../../../renderer/colour/legend.ts';
import { linearToOklab, oklabToLinear } from '../../../renderer/colour/oklab.ts';
import { shellColours } from '../../../renderer/colour/shellColours.ts';
import { Refusal } from '../../../shared-core/base/refusal.ts';
import {
  contrast,
  DICHROMATS,
  deltaE76,
  labOfBytes,
  labOfLinear,
  linearOfBytes,
  seenBy,
} from './measures.ts';

const GROUNDS: readonly Ground[] = ['dark', 'light'];

describe('OKLab', () => {
  it('gives the published pairs', () => {
    // B. Ottosson 2020, table of XYZ pairs: the white point is (1, 0, 0). Red, from the same text's code: value from memory.
    const white = linearToOklab([1, 1, 1]);
    expect(white[0]).toBeCloseTo(1, 4);
    expect(Math.hypot(white[1], white[2])).toBeLessThan(1e-4);
    const red = linearToOklab([1, 0, 0]);
    for (const [i, v] of [0.62796, 0.22486, 0.12585].entries()) expect(red[i]).toBeCloseTo(v, 4);
  });

  it('is an inverse of itself', () => {
    for (const rgb of [
      [0.2, 0.4, 0.9],
      [1, 0.01, 0.3],
      [0.5, 0.5, 0.5],
    ] as const) {
      const back = oklabToLinear(linearToOklab(rgb));
      // The published matrices are inverse to each other to about seven digits.
      for (const [i, v] of rgb.entries()) expect(back[i]).toBeCloseTo(v, 5);
    }
  });
});

describe('the measures themselves', () => {
  it('leave greys grey for dichromats', () => {
    for (const m of Object.values(DICHROMATS)) {
      for (const i of [0, 3, 6]) expect(m[i]! + m[i + 1]! + m[i + 2]!).toBeCloseTo(1, 4);
    }
  });

  it('know the lightness of mid grey', () => {
    // sRGB 119, 119, 119 is L* 50: common practice, no source.
    expect(labOfBytes([119, 119, 119])[0]).toBeCloseTo(50, 0);
  });
});

describe.each(COLOUR_MAPS)('the colour map $name', ({ name }) => {
  describe.each(GROUNDS)('on a %s ground', (ground) => {
    const { bytes, oklab } = colourMap(name, ground);
    const lab = Array.from({ length: 256 }, (_, i) => labOfBytes(bytes, 3 * i));

    it('rises in lightness all the way', () => {
      for (let i = 4; i < 256; i++) expect(lab[i]![0]).toBeGreaterThan(lab[i - 4]![0]);
      expect(lab[255]![0] - lab[0]![0]).toBeGreaterThan(35);
    });

    it('goes in even steps', () => {
      const steps = Array.from({ length: 255 }, (_, i) =>
        Math.hypot(...oklab[i + 1]!.map((v, k) => v - oklab[i]![k]!)),
      );
      // Equal in OKLab along the path; where the gamut bends it, a step cuts the corner: a twentieth.
      expect(Math.max(...steps) / Math.min(...steps)).toBeLessThan(1.05);
      // In CIE L*a*b*, a space of other make, still no sixteenth looks more than 2.3 times as wide as another.
      const wide = Array.from({ length: 16 }, (_, i) => {
        let sum = 0;
        for (let j = 16 * i; j < Math.min(255, 16 * i + 16); j++) sum += deltaE76(lab[j]!, lab[j + 1]!);
        return sum / (Math.min(255, 16 * i + 16) - 16 * i);
      });
      expect(Math.max(...wide) / Math.min(...wide)).toBeLessThan(2.3);
    });

    it.each(Object.entries(DICHROMATS))('keeps its order and its steps under %s', (_, matrix) => {
      const seen = Array.from({ length: 256 }, (_, i) =>
        labOfLinear(seenBy(matrix, linearOfBytes(bytes, 3 * i))),
      );
      for (let i = 8; i < 256; i++) expect(seen[i]![0]).toBeGreaterThan(seen[i - 8]![0]);
      // Colours an eighth of the map apart stay told apart: 2.3 is a just noticeable difference (common practice).
      for (let i = 0; i + 32 < 256; i++) expect(deltaE76(seen[i]!, seen[i + 32]!)).toBeGreaterThan(2 * 2.3);
    });

    it('is seen against its ground', () => {
      const stage = ground === 'dark' ? [12, 16, 22] : [251, 251, 249];
      for (let i = 0; i < 256; i += 15) {
        expect(contrast(linearOfBytes(bytes, 3 * i), linearOfBytes(stage))).toBeGreaterThan(2);
      }
    });
  });
});

describe('the colours of shells', () => {
  it.each(GROUNDS)('tell neighbours apart on a %s ground, for dichromats too', (ground) => {
    for (const count of [2, 5, 8, 12]) {
      const colours = shellColours(count, ground);
      expect(colours).toHaveLength(count);
      for (let i = 1; i < count; i++) {
        const pair = [linearOfBytes(colours[i - 1]!), linearOfBytes(colours[i]!)] as const;
        expect(deltaE76(labOfLinear(pair[0]), labOfLinear(pair[1]))).toBeGreaterThan(8);
        for (const m of Object.values(DICHROMATS)) {
          const [a, b] = pair.map((c) => labOfLinear(seenBy(m, c)));
          expect(deltaE76(a!, b!)).toBeGreaterThan(5);
        }
      }
    }
  });

  it.each(GROUNDS)('are lines that are seen on a %s ground (WCAG 2.2, 1.4.11: 3 to 1)', (ground) => {
    const stage = linearOfBytes(ground === 'dark' ? [12, 16, 22] : [251, 251, 249]);
    for (const colour of shellColours(12, ground)) {
      expect(contrast(linearOfBytes(colour), stage)).toBeGreaterThan(3);
    }
  });
});

describe('a legend', () => {
  it('runs from the low to the high colour, and back when reversed', () => {
    const forward = legend('harbour', 'dark');
    const back = legend('harbour', 'dark', true);
    expect(forward.stops[0]!.css).toBe(back.stops.at(-1)!.css);
    expect(forward.stops.at(-1)!.position).toBe(1);
    expect(forward.cssGradient.startsWith('linear-gradient(to right, rgb(')).toBe(true);
  });

  it('refuses a map that is not there, and names those that are', () => {
    expect(() => legend('nothing', 'dark')).toThrow(Refusal);
    expect(() => legend('nothing', 'dark')).toThrow(/harbour/);
  });
});
