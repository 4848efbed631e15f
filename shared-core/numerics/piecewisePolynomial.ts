import { cos } from './elementary/elementary.ts';

/**
 * Polynomials cell by cell, for tables that are read millions of times: eight coefficients a cell, lowest first,
 * in t = 0 to 1 across the cell. Cells are of equal width.
 */
export const COEFFICIENTS = 8;

/** Chebyshev-Lobatto points of [0, 1] in an order that keeps divided differences stable (ends first, then inward). */
function nodes(count: number): Float64Array {
  const sorted = Array.from({ length: count }, (_, j) => (1 - cos((Math.PI * j) / (count - 1))) / 2);
  const order = new Float64Array(count);
  // Leja order: each next point maximises the product of its distances to those taken
  for (let k = 0; k < count; k++) {
    let best = 0;
    let bestProduct = -1;
    sorted.forEach((point, j) => {
      let product = k === 0 ? 1 - point : 1;
      for (let i = 0; i < k; i++) product *= Math.abs(point - order[i]!);
      if (product > bestProduct) {
        bestProduct = product;
        best = j;
      }
    });
    order[k] = sorted[best]!;
  }
  return order;
}

const NODES_DEGREE_7 = nodes(COEFFICIENTS);
const NODES_DEGREE_6 = nodes(COEFFICIENTS - 1);

/** Coefficients of the polynomial through f at the nodes: Newton's divided differences, then expanded. */
function interpolate(
  f: (x: number) => number,
  points: Float64Array,
  start: number,
  width: number,
  into: Float64Array,
  at: number,
): void {
  const count = points.length;
  for (let k = 0; k < count; k++) into[at + k] = f(start + width * points[k]!);
  for (let level = 1; level < count; level++) {
    for (let k = count - 1; k >= level; k--) {
      into[at + k] = (into[at + k]! - into[at + k - 1]!) / (points[k]! - points[k - level]!);
    }
  }
  for (let level = count - 2; level >= 0; level--) {
    for (let k = level; k < count - 1; k++) into[at + k] = into[at + k]! - points[level]! * into[at + k + 1]!;
  }
}

/** Writes the polynomial of degree 7 that follows f across [start, start + width]. */
export function fitCell(
  f: (x: number) => number,
  start: number,
  width: number,
  into: Float64Array,
  at: number,
): void {
  interpolate(f, NODES_DEGREE_7, start, width, into, at);
}

/**
 * Writes the antiderivative (degree 7) of the polynomial of degree 6 that follows f across [start, start + width],
 * beginning at `startValue`. Returns its value at the end, so that cells join without a step.
 */
export function fitAntiderivativeCell(
  f: (x: number) => number,
  start: number,
  width: number,
  startValue: number,
  into: Float64Array,
  at: number,
): number {
  interpolate(f, NODES_DEGREE_6, start, width, into, at + 1);
  into[at] = startValue;
  let rise = 0;
  for (let k = COEFFICIENTS - 1; k >= 1; k--) {
    into[at + k] = (into[at + k]! * width) / k;
    rise += into[at + k]!;
  }
  return startValue + rise;
}

/** The polynomial whose coefficients begin at `at`. */
export function evaluateCell(coefficients: Float64Array, at: number, t: number): number {
  return (
    coefficients[at]! +
    t *
      (coefficients[at + 1]! +
        t *
          (coefficients[at + 2]! +
            t *
              (coefficients[at + 3]! +
                t *
                  (coefficients[at + 4]! +
                    t * (coefficients[at + 5]! + t * (coefficients[at + 6]! + t * coefficients[at + 7]!))))))
  );
}

/** Its derivative with respect to t. */
export function evaluateCellSlope(coefficients: Float64Array, at: number, t: number): number {
  let slope = 0;
  for (let k = COEFFICIENTS - 1; k >= 1; k--) slope = slope * t + k * coefficients[at + k]!;
  return slope;
}
