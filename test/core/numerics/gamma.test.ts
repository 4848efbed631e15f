import { describe, expect, it } from 'vitest';
import { lnGamma } from '../../../shared-core/numerics/gamma.ts';

describe('lnGamma', () => {
  it('agrees with scipy 1.10 gammaln (computed)', () => {
    for (const [x, expected] of [
      [0.1, 2.252712651734206],
      [0.5, 0.5723649429247],
      [1.5, -0.12078223763524526],
      [7.99, 8.50501160608848],
      [8, 8.525161361065415],
      [20.5, 40.8315009745308],
      [1e3, 5905.220423209181],
      [1e9, 19723265827.503716],
    ] as const) {
      expect(Math.abs(lnGamma(x) - expected)).toBeLessThan(1e-13 * Math.max(1, Math.abs(expected)));
    }
  });

  it('is the logarithm of the factorial', () => {
    let factorial = 1;
    for (let n = 1; n <= 20; n++) {
      factorial *= n;
      expect(lnGamma(n + 1)).toBeCloseTo(Math.log(factorial), 12);
    }
  });
});
