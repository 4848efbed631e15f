const SPLITTER = 134217729;

/**
 * What rounding took from the product p = a * b: a b = p + productError(a, b, p) exactly, for |a|, |b| < 2^990 and a
 * product well above the subnormals.
 *
 * Source: T. J. Dekker, "A floating-point technique for extending the available precision", Numer. Math. 18, 224
 * (1971).
 */
export function productError(a: number, b: number, p: number): number {
  const ca = SPLITTER * a;
  const aHigh = ca - (ca - a);
  const aLow = a - aHigh;
  const cb = SPLITTER * b;
  const bHigh = cb - (cb - b);
  const bLow = b - bHigh;
  return aLow * bLow - (p - aHigh * bHigh - aLow * bHigh - aHigh * bLow);
}
