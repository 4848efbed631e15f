import { describe, expect, it } from 'vitest';
import {
  COEFFICIENTS,
  evaluateCell,
  evaluateCellSlope,
  fitAntiderivativeCell,
  fitCell,
} from '../../../shared-core/numerics/piecewisePolynomial.ts';

const T = [0, 0.1, 0.35, 0.5, 0.77, 1];

describe('a cell', () => {
  it('holds any polynomial of degree 7', () => {
    const f = (x: number) => 3 - x + 2 * x ** 3 - 0.5 * x ** 7;
    const cell = new Float64Array(COEFFICIENTS);
    fitCell(f, -1, 2, cell, 0);
    for (const t of T) expect(evaluateCell(cell, 0, t)).toBeCloseTo(f(-1 + 2 * t), 12);
  });

  it('follows exp across 0.1 to rounding, with its slope', () => {
    const cell = new Float64Array(3 * COEFFICIENTS);
    fitCell(Math.exp, 1, 0.1, cell, COEFFICIENTS);
    for (const t of T) {
      const exact = Math.exp(1 + 0.1 * t);
      expect(Math.abs(evaluateCell(cell, COEFFICIENTS, t) / exact - 1)).toBeLessThan(1e-15);
      // The slope loses digits as differences do: 1e-16 over the width of 0.1, times the degree squared
      expect(Math.abs(evaluateCellSlope(cell, COEFFICIENTS, t) / (0.1 * exact) - 1)).toBeLessThan(1e-11);
    }
  });

  it('integrates cos from any start, and tells its end', () => {
    const cell = new Float64Array(COEFFICIENTS);
    const end = fitAntiderivativeCell(Math.cos, 0.2, 0.1, Math.sin(0.2), cell, 0);
    for (const t of T) expect(evaluateCell(cell, 0, t)).toBeCloseTo(Math.sin(0.2 + 0.1 * t), 14);
    expect(end).toBe(evaluateCell(cell, 0, 1));
  });
});
