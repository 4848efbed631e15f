/** Sum with a running correction (Neumaier 1974): the error does not grow with the number of terms. */
export function compensatedSum(values: ArrayLike<number>): number {
  let sum = 0;
  let lost = 0;
  for (let i = 0; i < values.length; i++) {
    const value = values[i]!;
    const next = sum + value;
    lost += Math.abs(sum) >= Math.abs(value) ? sum - next + value : value - next + sum;
    sum = next;
  }
  // Once the sum is infinite the correction is NaN and says nothing
  return Number.isFinite(sum) ? sum + lost : sum;
}

/**
 * Sums of the first 0, 1, ... n values, each as if by compensatedSum: the sum of values i to j - 1 is
 * result[j] - result[i].
 */
export function runningSums(values: ArrayLike<number>): Float64Array<ArrayBuffer> {
  const sums = new Float64Array(values.length + 1);
  let sum = 0;
  let lost = 0;
  for (let i = 0; i < values.length; i++) {
    const value = values[i]!;
    const next = sum + value;
    lost += Math.abs(sum) >= Math.abs(value) ? sum - next + value : value - next + sum;
    sum = next;
    sums[i + 1] = Number.isFinite(sum) ? sum + lost : sum;
  }
  return sums;
}
