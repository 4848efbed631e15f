import { Refusal } from '../base/refusal.ts';

/** First index whose value is not below `value` in a rising array; its length if all are below. */
export function lowerBound(rising: ArrayLike<number>, value: number): number {
  let low = 0;
  let high = rising.length;
  while (low < high) {
    const middle = (low + high) >>> 1;
    if (rising[middle]! < value) low = middle + 1;
    else high = middle;
  }
  return low;
}

/** y at any x between the first and the last knot. @throws Refusal for an x outside them */
export type Interpolant = (x: number) => number;

/**
 * Straight lines between knots.
 * @throws Refusal unless there are two or more knots, finite, x strictly rising, x and y of one length
 */
export function linearInterpolant(x: Float64Array, y: Float64Array): Interpolant {
  checkKnots(x, y);
  return (at) => {
    const i = cellOf(x, at);
    const t = (at - x[i]!) / (x[i + 1]! - x[i]!);
    return y[i]! * (1 - t) + y[i + 1]! * t;
  };
}

/**
 * Piecewise cubic that keeps the data's shape: monotone where the data are, never beyond them
 * (Fritsch & Butland 1984, SIAM J. Sci. Stat. Comput. 5, 300; ends by the three-point formula, kept in shape).
 * @throws Refusal as linearInterpolant
 */
export function monotoneInterpolant(x: Float64Array, y: Float64Array): Interpolant {
  checkKnots(x, y);
  const slopes = shapeKeepingSlopes(x, y);
  return (at) => {
    const i = cellOf(x, at);
    const h = x[i + 1]! - x[i]!;
    const t = (at - x[i]!) / h;
    const s = 1 - t;
    return (
      s * s * ((1 + 2 * t) * y[i]! + t * h * slopes[i]!) +
      t * t * ((1 + 2 * s) * y[i + 1]! - s * h * slopes[i + 1]!)
    );
  };
}

function shapeKeepingSlopes(x: Float64Array, y: Float64Array): Float64Array {
  const last = x.length - 1;
  const slopes = new Float64Array(x.length);
  const width = (i: number) => x[i + 1]! - x[i]!;
  const secant = (i: number) => (y[i + 1]! - y[i]!) / width(i);
  if (last === 1) return slopes.fill(secant(0));
  for (let i = 1; i < last; i++) {
    const before = secant(i - 1);
    const after = secant(i);
    if (before * after <= 0) continue;
    const a = 2 * width(i) + width(i - 1);
    const b = width(i) + 2 * width(i - 1);
    slopes[i] = (a + b) / (a / before + b / after);
  }
  slopes[0] = endSlope(width(0), width(1), secant(0), secant(1));
  slopes[last] = endSlope(width(last - 1), width(last - 2), secant(last - 1), secant(last - 2));
  return slopes;
}

function endSlope(near: number, far: number, nearSecant: number, farSecant: number): number {
  const slope = ((2 * near + far) * nearSecant - near * farSecant) / (near + far);
  if (slope * nearSecant <= 0) return 0;
  if (nearSecant * farSecant < 0 && Math.abs(slope) > 3 * Math.abs(nearSecant)) return 3 * nearSecant;
  return slope;
}

function checkKnots(x: Float64Array, y: Float64Array): void {
  if (x.length < 2 || x.length !== y.length) {
    throw new Refusal(
      `Cannot interpolate ${x.length} x with ${y.length} y; give two or more of both.`,
      'use',
    );
  }
  for (let i = 0; i < x.length; i++) {
    if (!Number.isFinite(x[i]) || !Number.isFinite(y[i]) || (i > 0 && !(x[i]! > x[i - 1]!))) {
      throw new Refusal(`Knot ${i + 1} is (${x[i]}, ${y[i]}); give finite knots with x rising.`, 'use');
    }
  }
}

function cellOf(x: Float64Array, at: number): number {
  const last = x.length - 1;
  if (!(at >= x[0]! && at <= x[last]!)) {
    throw new Refusal(`${at} is outside the knots; give a value from ${x[0]} to ${x[last]}.`, 'use');
  }
  return Math.max(0, lowerBound(x, at) - 1);
}
