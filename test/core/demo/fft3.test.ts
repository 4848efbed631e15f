import { describe, expect, it } from 'vitest';
import { fourierCube } from '../../../shared-core/demo/fft3.ts';
import { createRandom } from '../../../shared-core/numerics/random.ts';

function randomCube(n: number, seed: number): [re: Float64Array, im: Float64Array] {
  const random = createRandom(seed);
  return [
    Float64Array.from({ length: n ** 3 }, () => random.normal()),
    Float64Array.from({ length: n ** 3 }, () => random.normal()),
  ];
}

describe('fourierCube', () => {
  it('is the sum that defines the transform', () => {
    const n = 4;
    const [re, im] = randomCube(n, 1);
    const [gotRe, gotIm] = [re.slice(), im.slice()];
    fourierCube(gotRe, gotIm, n, 'forward');
    for (let k = 0; k < n ** 3; k++) {
      const wave = [Math.floor(k / 16), Math.floor(k / 4) % 4, k % 4] as const;
      let sumRe = 0;
      let sumIm = 0;
      for (let x = 0; x < n ** 3; x++) {
        const place = [Math.floor(x / 16), Math.floor(x / 4) % 4, x % 4] as const;
        const phase = (-2 * Math.PI * (wave[0] * place[0] + wave[1] * place[1] + wave[2] * place[2])) / n;
        sumRe += re[x]! * Math.cos(phase) - im[x]! * Math.sin(phase);
        sumIm += re[x]! * Math.sin(phase) + im[x]! * Math.cos(phase);
      }
      // Rounding of 64 terms of order 1
      expect(gotRe[k]).toBeCloseTo(sumRe, 11);
      expect(gotIm[k]).toBeCloseTo(sumIm, 11);
    }
  });

  it('is undone by the inverse, up to n^3, and keeps the sum of squares (Parseval)', () => {
    const n = 16;
    const [re, im] = randomCube(n, 2);
    const [gotRe, gotIm] = [re.slice(), im.slice()];
    fourierCube(gotRe, gotIm, n, 'forward');
    const squares = (a: Float64Array, b: Float64Array) =>
      a.reduce((sum, value, i) => sum + value ** 2 + b[i]! ** 2, 0);
    expect(squares(gotRe, gotIm) / n ** 3 / squares(re, im)).toBeCloseTo(1, 12);
    fourierCube(gotRe, gotIm, n, 'inverse');
    let worst = 0;
    for (let i = 0; i < n ** 3; i++) {
      worst = Math.max(worst, Math.abs(gotRe[i]! / n ** 3 - re[i]!), Math.abs(gotIm[i]! / n ** 3 - im[i]!));
    }
    // Some 12 stages of rounding
    expect(worst).toBeLessThan(1e-13);
  });
});
