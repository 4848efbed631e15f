/** The smallest power of two that is at least this number (0 < least < 2^1023); 1 for anything below. */
export function powerOfTwoFrom(least: number): number {
  let size = 1;
  while (size < least) size *= 2;
  return size;
}
